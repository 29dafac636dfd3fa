import { describe, expect, it } from 'vitest'
import { businessDaysTo } from '@/lib/domain/clocks/standing'
import { calendarOf, itemOf, on, told, type Told } from '../../unit/clocks/told'
import { assigned, cbto, dollars, expectDue, posted, requested, rolling } from './cluster-told'

// Source: as said in cluster-told.ts; each date was counted by hand.

const mesa: Told[] = [
  requested(200),
  on('2025-05-02', 'window_open', 'opened'),
  posted('2025-06-10', 'file', 'readiness', 500_000),
  on('2025-06-10', 'file', 'filed'),
  on('2025-06-13', 'validity', 'valid'),
  on('2025-08-15', 'engagement_close', 'closed'),
  on('2026-05-04', 'cluster_report', 'issued'),
  assigned('2026-05-04', 18_400_000, 'cluster_study'),
  on('2026-05-18', 'report_meeting', 'held'),
  on('2026-06-05', 'gate_1', undefined, { obligation: 'land' }),
  posted('2026-06-05', 'gate_1', 'deposit', 420_000),
  on('2026-06-15', 'restudy_decision', 'restudy'),
]
const mesaRestudied: Told[] = [
  ...mesa,
  on('2026-11-23', 'cluster_report', 'issued', { instance: 2 }),
  assigned('2026-11-23', 24_100_000, 'cluster_restudy'),
]

describe('Mesa Larga, a restudy', () => {
  it('the first report was 78 business days late, its gate rolled off a Sunday', () => {
    expectDue(rolling, cbto, mesa, [
      ['cluster_report', '2026-01-12'],
      ['report_meeting', '2026-05-18'],
      ['gate_1', '2026-06-08'],
    ])
    expect(businessDaysTo(calendarOf('cbto'), '2026-01-12', '2026-05-04')).toBe(78)
  })

  it('the restudy counts 150 calendar days from its notice, at another penalty a day', () => {
    expectDue(rolling, cbto, mesa, [['cluster_report', '2026-11-12', 2]])
    const report = itemOf(rolling, cbto, told(...mesa), 'cluster_report', 2)
    expect(report.consequence.say).toContain('$2,000')
    expect(businessDaysTo(calendarOf('cbto'), '2026-11-12', '2026-11-23')).toBe(7)
  })

  it('a booked meeting makes the gate after it provisional: Monday 28 December', () => {
    const booked: Told = {
      kind: 'scheduled',
      step: 'report_meeting',
      instance: 2,
      dueOn: '2026-12-08',
    }
    const facts = [...mesaRestudied, booked]
    expectDue(rolling, cbto, facts, [
      ['report_meeting', '2026-12-08', 2],
      ['gate_1', '2026-12-28', 2],
    ])
    const deposit = itemOf(rolling, cbto, told(...facts), 'gate_1', 2, 'deposit')
    expect([deposit.provisional, deposit.startBy]).toEqual([true, '2026-12-18'])
    expect([deposit.moneyTargetMinor, deposit.moneyHeldMinor]).toEqual([
      dollars(1_205_000),
      dollars(920_000),
    ])
  })

  it('the higher cost of the restudy does not reopen the gate passed before it', () => {
    const gate = itemOf(rolling, cbto, told(...mesaRestudied), 'gate_1', 1)
    expect([gate.status, gate.doneOn]).toEqual(['done', '2026-06-05'])
    const deposit = itemOf(rolling, cbto, told(...mesaRestudied), 'gate_1', 1, 'deposit')
    expect(deposit.moneyTargetMinor).toBe(dollars(920_000))
  })

  it('a restudy that lowers the cost leaves nothing to post', () => {
    const lowered = [
      ...mesa,
      on('2026-11-23', 'cluster_report', 'issued', { instance: 2 }),
      assigned('2026-11-23', 10_000_000, 'cluster_restudy'),
      on('2026-12-08', 'report_meeting', 'held', { instance: 2 }),
      on('2026-12-14', 'gate_1', undefined, { instance: 2, obligation: 'land' }),
    ]
    const gate = itemOf(rolling, cbto, told(...lowered), 'gate_1', 2)
    expect([gate.status, gate.doneOn]).toEqual(['done', '2026-12-14'])
  })

  it('no posting closes the gate while no cost is assigned', () => {
    const facts = mesa.filter((fact) => fact.kind !== 'changed' || !fact.receivedOn)
    const gate = itemOf(rolling, cbto, told(...facts), 'gate_1')
    expect(gate.status).toBe('open')
  })
})
