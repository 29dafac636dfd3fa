import { describe, expect, it } from 'vitest'
import { federalCluster } from '@/lib/domain/clocks/library/cluster'
import { itemOf, on, partiesOf, told } from '../../unit/clocks/told'
import { ave, cbto, dollars, expectDue, pro, requested, rolling } from './cluster-told'

// Source: as said in cluster-told.ts; each date was counted by hand.

describe('Tansy Ridge, before its window opens', () => {
  it('a booked opening gives a provisional closing and day to file by', () => {
    const facts = [
      requested(79.9),
      { kind: 'scheduled' as const, step: 'window_open', dueOn: '2027-01-04' },
    ]
    expectDue(pro, ave, facts, [
      ['window_close', '2027-02-18'],
      ['file', '2027-02-18'],
    ])
    expect(itemOf(pro, ave, told(...facts), 'file').provisional).toBe(true)
  })

  it.each([
    [79.9, 349_700],
    [80, 455_000],
  ])('%s MW owe %s dollars with the request', (mw, total) => {
    const parts = ['fee', 'study_deposit', 'readiness'].map(
      (part) => itemOf(pro, ave, told(requested(mw)), 'file', 1, part).moneyTargetMinor!,
    )
    expect(parts.reduce((sum, one) => sum + one)).toBe(dollars(total))
  })
})

describe('a window that closes on a closed day', () => {
  // Opened 2 November 2026: closes 17 December; engagement ends on Washington's Birthday.
  const facts = [
    on('2026-11-02', 'window_open', 'opened'),
    on('2026-11-10', 'file', 'filed'),
    on('2026-11-16', 'validity', 'valid'),
    on('2026-12-17', 'window_close', 'closed'),
    on('2026-12-22', 'cluster_tender', 'sent'),
  ]
  it('what is due by its closing is not due a day after it', () => {
    expectDue(pro, ave, facts, [
      ['engagement_close', '2027-02-15'],
      ['group_scoping', '2027-02-15'],
      ['cluster_agreement', '2027-02-15'],
    ])
  })

  it('where calendar days roll, both roll to the same day', () => {
    expectDue(rolling, cbto, facts, [
      ['engagement_close', '2027-02-16'],
      ['cluster_agreement', '2027-02-16'],
    ])
  })
})

// Christmas 2027 and New Year 2028 are Saturdays: 24 and 31 December are closed. 29 February 2028.
describe('over a Saturday Christmas and the leap day of 2028', () => {
  it('a window that opens on 18 January closes on 3 March, and engagement on 2 May', () => {
    expectDue(
      pro,
      ave,
      [on('2028-01-18', 'window_open', 'opened')],
      [
        ['window_close', '2028-03-03'],
        ['engagement_close', '2028-05-02'],
      ],
    )
  })

  it('15 business days from a notice of withdrawal on 10 December end on 4 January', () => {
    const notice = on('2027-12-10', 'withdrawal_notice', 'given')
    expectDue(pro, ave, [notice], [['withdrawal_cure', '2028-01-04']])
  })

  it('10 business days from a deficiency on 20 December end on 5 January, as federal', () => {
    const facts = [
      on('2027-12-01', 'window_open', 'opened'),
      on('2027-12-15', 'file', 'filed'),
      on('2027-12-20', 'validity', 'deficient'),
    ]
    expectDue(pro, ave, facts, [['cure', '2028-01-05']])
  })

  it('3 days of a 5 day tender lie after the leap day', () => {
    const facts = [
      on('2028-01-10', 'window_open', 'opened'),
      on('2028-02-01', 'file', 'filed'),
      on('2028-02-04', 'validity', 'valid'),
      on('2028-02-25', 'window_close', 'closed'),
    ]
    expectDue(pro, ave, facts, [['cluster_tender', '2028-03-03']])
  })

  it('gate 1 after a meeting on 4 December 2027 ends on Christmas Eve, or rolls to Monday', () => {
    const facts = [
      on('2027-06-01', 'cluster_report', 'issued', { reason: 'Entered from the report' }),
      on('2027-12-04', 'report_meeting', 'held', { reason: 'Entered from the report' }),
    ]
    expectDue(pro, partiesOf('cbto'), facts, [['gate_1', '2027-12-24']])
    expectDue(rolling, cbto, facts, [['gate_1', '2027-12-27']])
  })
})

describe('the closing hour in another zone', () => {
  const cured = (receivedAt: string) =>
    itemOf(
      rolling,
      cbto,
      told(
        on('2026-11-02', 'window_open', 'opened'),
        on('2026-11-24', 'file', 'filed'),
        on('2026-11-30', 'validity', 'deficient'),
        on('2026-12-14', 'cure', 'supplied', { receivedAt }),
      ),
      'cure',
    )
  it('the hour is Eastern for a project in Central', () => {
    expect(cured('2026-12-14T20:00:00Z').dueAt).toBe('2026-12-14T22:00:00.000Z')
  })

  it.each([
    ['15:00 Central is an hour before it: in time', '2026-12-14T21:00:00Z', false],
    ['16:00 Central is the hour itself: in time', '2026-12-14T22:00:00Z', false],
    ['a second after it: late', '2026-12-14T22:00:01Z', true],
    ['17:00 Central is an hour after it: late', '2026-12-14T23:00:00Z', true],
  ])('%s', (_, at, late) => {
    expect(cured(at).doneLate).toBe(late)
  })
})

describe('the cluster process quotes its rules', () => {
  it('each rule of the federal list stands at a step, by its number', () => {
    const quoted = JSON.stringify(pro.steps.map((one) => one.source))
    const wanted = [...range(1, 39), ...range(50, 58)].filter((id) => !quoted.includes(id))
    expect(wanted).toEqual([])
  })

  it('each step of ours says what follows and what to do first', () => {
    const ours = pro.steps.filter((step) => step.party === 'applicant' && step.clocks.length > 0)
    const silent = ours.filter(
      (step) =>
        !step.onMiss.first && !step.clocks.every((clock) => clock.from?.date === 'scheduled'),
    )
    expect(silent.map((step) => step.key)).toEqual([])
  })

  it('without the switch a late study is only a duty of notice', () => {
    const off = federalCluster({ delayPenalties: false })
    const effects = off.steps.flatMap((step) => [
      step.onMiss.effect,
      ...step.clocks.map((clock) => clock.onMiss?.effect),
    ])
    expect(effects).not.toContain('penalty')
  })
})

function range(from: number, to: number): string[] {
  return Array.from(
    { length: to - from + 1 },
    (_, at) => `LG-${String(from + at).padStart(2, '0')}`,
  )
}
