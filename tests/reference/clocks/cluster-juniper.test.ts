import { describe, expect, it } from 'vitest'
import { schedule } from '@/lib/domain/clocks/schedule'
import { businessDaysTo } from '@/lib/domain/clocks/standing'
import { calendarOf, itemOf, on, told, type Told } from '../../unit/clocks/told'
import { assigned, ave, dollars, expectDue, posted, pro, requested } from './cluster-told'

// Source: as said in cluster-told.ts; each date was counted by hand.

const juniperFiled: Told[] = [
  requested(48),
  on('2026-01-05', 'window_open', 'opened'),
  posted('2026-02-10', 'file', 'fee', 5_000),
  posted('2026-02-10', 'file', 'study_deposit', 83_000),
  posted('2026-02-10', 'file', 'readiness', 166_000),
  on('2026-02-10', 'file', 'filed'),
  on('2026-02-13', 'validity', 'deficient'),
]
const juniperToGateTwo: Told[] = [
  ...juniperFiled,
  // 16:40 Mountain, twenty minutes before the hour closes.
  on('2026-02-18', 'cure', 'supplied', { receivedAt: '2026-02-18T23:40:00Z' }),
  on('2026-02-19', 'validity', 'valid', { instance: 2 }),
  on('2026-02-19', 'window_close', 'closed'),
  on('2026-02-26', 'cluster_tender', 'sent'),
  on('2026-03-17', 'group_scoping', 'held'),
  on('2026-04-10', 'cluster_agreement', 'signed'),
  on('2026-04-20', 'engagement_close', 'closed'),
  on('2026-09-22', 'cluster_report', 'issued'),
  assigned('2026-09-22', 4_120_000, 'cluster_study'),
  on('2026-10-06', 'report_meeting', 'held'),
  on('2026-10-22', 'gate_1', undefined, { obligation: 'land' }),
  posted('2026-10-22', 'gate_1', 'deposit', 40_000),
  on('2026-11-03', 'restudy_decision', 'none'),
  on('2026-11-10', 'facilities_tender', 'sent'),
]

describe('Juniper Flat, a pro forma utility that does not roll', () => {
  it('each clock to gate 2 ends on the date counted by hand', () => {
    expectDue(pro, ave, juniperToGateTwo, [
      ['window_close', '2026-02-19'],
      ['file', '2026-02-19'],
      ['validity', '2026-02-18'],
      ['list_posted', '2026-03-05'],
      ['cluster_tender', '2026-02-26'],
      ['group_scoping', '2026-04-20'],
      ['engagement_close', '2026-04-20'],
      ['cluster_agreement', '2026-04-20'],
      ['cluster_report', '2026-09-17'],
      ['report_meeting', '2026-10-06'],
      ['gate_1', '2026-10-26'],
      ['restudy_decision', '2026-11-05'],
      ['facilities_tender', '2026-11-10'],
      ['gate_2', '2026-12-10'],
    ])
  })

  it('the cure has 10 business days, but never after the window closes', () => {
    const cure = itemOf(pro, ave, told(...juniperFiled), 'cure')
    expect([cure.dueOn, cure.provisional]).toEqual(['2026-02-19', false])
    expect(cure.derivation.map((line) => line.text).join(' ')).toContain(
      'Earlier of Mon 2 Mar 2026 and Thu 19 Feb 2026',
    )
    expect(cure.dueAt).toBe('2026-02-20T00:00:00.000Z')
  })

  it('the cluster report came 3 business days late, gate 1 was met in time on its last part', () => {
    const report = itemOf(pro, ave, told(...juniperToGateTwo), 'cluster_report')
    expect(report.doneLate).toBe(true)
    expect(businessDaysTo(calendarOf('ave'), report.dueOn!, report.doneOn!)).toBe(3)
    const gate = itemOf(pro, ave, told(...juniperToGateTwo), 'gate_1')
    expect([gate.status, gate.doneOn, gate.doneLate]).toEqual(['done', '2026-10-22', false])
  })

  it('gate 2 closes at 17:00 Mountain and has four parts that run beside one another', () => {
    const { items } = schedule(pro, ave, told(...juniperToGateTwo))
    const parts = items.filter((item) => item.step === 'gate_2')
    expect(parts.map((part) => [part.obligation, part.status, part.dueAt])).toEqual(
      ['', 'agreement', 'data', 'land', 'deposit'].map((part) => [
        part,
        'open',
        '2026-12-11T00:00:00.000Z',
      ]),
    )
  })

  it('its deposit is a total: 412,000 with 206,000 held, the wire begun by 3 December', () => {
    const deposit = itemOf(pro, ave, told(...juniperToGateTwo), 'gate_2', 1, 'deposit')
    expect([deposit.moneyTargetMinor, deposit.moneyHeldMinor, deposit.startBy]).toEqual([
      dollars(412_000),
      dollars(206_000),
      '2026-12-03',
    ])
    expect(deposit.derivation.at(-1)?.text).toBe(
      '10 % of $4,120,000 assigned = $412,000. Held $206,000, so $206,000 is left to post.',
    )
  })

  it('gate 2 is done with the last of its parts, and the short deposit is not one', () => {
    const part = (obligation: string): Told => ({
      step: 'gate_2',
      obligation,
      receivedOn: '2026-12-08',
    })
    const three = [...juniperToGateTwo, part('agreement'), part('data'), part('land')]
    const short = posted('2026-12-09', 'gate_2', 'deposit', 205_999)
    expect(itemOf(pro, ave, told(...three, short), 'gate_2').status).toBe('open')
    const rest = posted('2026-12-10', 'gate_2', 'deposit', 1)
    const gate = itemOf(pro, ave, told(...three, short, rest), 'gate_2')
    expect([gate.status, gate.doneOn, gate.outcome]).toEqual(['done', '2026-12-10', 'within_20'])
  })

  const onward: Told[] = [
    ...juniperToGateTwo,
    on('2026-12-10', 'gate_2', 'within_20'),
    on('2027-03-10', 'facilities_draft', 'given'),
    on('2027-04-09', 'draft_comments', 'comments'),
    on('2027-04-30', 'final_report', 'given'),
    on('2027-05-09', 'lgia_draft', 'sent'),
  ]
  it('from gate 2 to the signature each clock ends on the date counted by hand', () => {
    expectDue(pro, ave, onward, [
      ['facilities_draft', '2027-03-10'],
      ['draft_meeting', '2027-03-24'],
      ['draft_comments', '2027-04-09'],
      ['final_report', '2027-04-30'],
      ['lgia_draft', '2027-05-09'],
      // Counted from receipt: by this utility's rule a Sunday is received on Monday.
      ['appendices', '2027-06-08'],
      ['negotiation', '2027-06-29'],
      ['gate_3', '2027-07-08'],
    ])
  })

  it('the time to sign counts from the tender, sent on a Friday and received on Monday', () => {
    const tendered = on('2027-05-10', 'lgia_draft', 'sent', { sentOn: '2027-05-07' })
    expectDue(
      pro,
      ave,
      [...onward.slice(0, -1), tendered],
      [
        ['appendices', '2027-06-09'],
        ['gate_3', '2027-07-06'],
      ],
    )
  })

  it('a window that opens on a Saturday is no receipt: 45 days end on Tuesday 17 February', () => {
    expectDue(
      pro,
      ave,
      [on('2026-01-03', 'window_open', 'opened')],
      [['window_close', '2026-02-17']],
    )
  })

  it('silence on the draft is taken as no comment, and what follows is provisional', () => {
    const facts = told(...onward.slice(0, -3))
    const final = itemOf(pro, ave, facts, 'final_report')
    expect([final.dueOn, final.provisional]).toEqual(['2027-04-30', true])
  })
})
