import { describe, expect, it } from 'vitest'
import { federalCluster } from '@/lib/domain/clocks/library/cluster'
import { federalCalendar } from '@/lib/domain/clocks/library-calendars'
import type { OrganizationRules, Parties } from '@/lib/domain/clocks/schedule-types'
import { businessDaysTo } from '@/lib/domain/clocks/standing'
import { calendarOf, itemOf, on, rulesOf, told, type Told } from '../../unit/clocks/told'
import { assigned, cbto, dollars, expectDue, posted, requested, rolling } from './cluster-told'

// Source: as said in cluster-told.ts; each date was counted by hand.

const quarry: Told[] = [
  requested(96),
  on('2024-11-01', 'window_open', 'opened'),
  posted('2024-12-10', 'file', 'fee', 10_000),
  posted('2024-12-10', 'file', 'study_deposit', 150_000),
  posted('2024-12-10', 'file', 'readiness', 300_000),
  on('2024-12-10', 'file', 'filed'),
  on('2024-12-13', 'validity', 'valid'),
  on('2024-12-16', 'window_close', 'closed'),
  on('2024-12-20', 'cluster_tender', 'sent'),
  on('2025-02-10', 'cluster_agreement', 'signed'),
  on('2025-02-14', 'engagement_close', 'closed'),
  on('2025-07-14', 'cluster_report', 'issued'),
  assigned('2025-07-14', 9_600_000, 'cluster_study'),
  on('2025-07-28', 'report_meeting', 'held'),
  on('2025-08-18', 'gate_1', 'proceed'),
  on('2025-08-26', 'restudy_decision', 'none'),
  on('2025-09-03', 'facilities_tender', 'sent'),
  on('2025-09-30', 'gate_2', 'within_10'),
  on('2026-03-30', 'facilities_draft', 'given'),
  on('2026-04-29', 'draft_comments', 'comments'),
  on('2026-05-20', 'final_report', 'given'),
  on('2026-06-30', 'lgia_draft', 'sent'),
  on('2026-08-25', 'gate_3', 'signed'),
  on('2026-09-03', 'agreement_filed', 'filed'),
  { kind: 'scheduled', step: 'work_start', dueOn: '2027-01-22' },
]

describe('Quarry Nine, an operator whose calendar days roll to the next business day', () => {
  it('each clock ends on the date counted by hand', () => {
    expectDue(rolling, cbto, quarry, [
      ['window_close', '2024-12-16'],
      ['engagement_close', '2025-02-14'],
      ['cluster_report', '2025-07-14'],
      ['report_meeting', '2025-07-28'],
      ['gate_1', '2025-08-18'],
      ['restudy_decision', '2025-08-27'],
      ['facilities_tender', '2025-09-03'],
      ['gate_2', '2025-10-03'],
      ['facilities_draft', '2026-03-30'],
      ['draft_comments', '2026-04-29'],
      ['final_report', '2026-05-20'],
      ['lgia_draft', '2026-05-29'],
      ['gate_3', '2026-08-31'],
      ['agreement_filed', '2026-09-09'],
      ['security', '2026-12-23'],
    ])
  })

  it('the draft agreement was tendered 21 business days late', () => {
    const draft = itemOf(rolling, cbto, told(...quarry), 'lgia_draft')
    expect(businessDaysTo(calendarOf('cbto'), draft.dueOn!, draft.doneOn!)).toBe(21)
  })

  it('the letter of credit for the security is begun 20 business days before: 24 November', () => {
    const security = itemOf(rolling, cbto, told(...quarry), 'security', 1, 'security')
    expect(security.startBy).toBe('2026-11-24')
  })

  it('asks 150,000 and twice that with the request, and 1,920,000 in all at gate 3', () => {
    const target = (step: string, part: string) =>
      itemOf(rolling, cbto, told(...quarry), step, 1, part).moneyTargetMinor
    expect([target('file', 'study_deposit'), target('file', 'readiness')]).toEqual([
      dollars(150_000),
      dollars(300_000),
    ])
    expect(target('gate_3', 'deposit')).toBe(dollars(1_920_000))
  })

  it('a study within 20 % would have been due after 90 days, on Monday 29 December', () => {
    const chosen = quarry
      .slice(0, 18)
      .map((fact) => (fact.step === 'gate_2' ? { ...fact, outcome: 'within_20' } : fact))
    expectDue(rolling, cbto, chosen, [['facilities_draft', '2025-12-29']])
  })

  it('signing from the final agreement instead has 15 business days', () => {
    const late = federalCluster({ calendarRoll: 'next_business_day', signFrom: 'final' })
    const facts = [
      ...quarry.slice(0, 22),
      on('2026-07-06', 'negotiation', 'agreed'),
      on('2026-07-27', 'final_agreement', 'sent'),
    ]
    expectDue(late, cbto, facts, [
      ['final_agreement', '2026-07-27'],
      ['gate_3', '2026-08-17'],
    ])
  })
})

const plainbank = (): OrganizationRules => ({
  ...rulesOf('ave'),
  name: 'Plainbank Generation and Transmission',
  zone: 'America/Chicago',
  receiptRule: 'as_is',
  calendar: federalCalendar,
})
const goshawkParties: Parties = { ...cbto, affected_system: plainbank() }
const goshawk: Told[] = [
  on('2025-05-02', 'window_open', 'opened'),
  on('2025-06-10', 'file', 'filed'),
  on('2025-06-13', 'validity', 'valid'),
  on('2025-08-15', 'engagement_close', 'closed'),
  on('2026-05-04', 'cluster_report', 'issued'),
  on('2026-05-11', 'affected_notice', 'told'),
  on('2026-05-18', 'report_meeting', 'held'),
  on('2026-06-05', 'gate_1', 'proceed'),
  on('2026-06-16', 'restudy_decision', 'none'),
  on('2026-08-17', 'facilities_tender', 'sent'),
  on('2026-09-14', 'gate_2', 'within_20'),
  on('2026-10-14', 'affected_answer', 'will_study'),
  on('2026-11-05', 'affected_schedule', 'shared'),
  on('2026-11-20', 'affected_tender', 'sent'),
]

describe('Goshawk Prairie, with an affected system', () => {
  it('host and affected system count side by side, each by its own calendar', () => {
    expectDue(rolling, goshawkParties, goshawk, [
      ['facilities_tender', '2026-06-24'],
      ['gate_2', '2026-09-16'],
      ['facilities_draft', '2026-12-14'],
      ['affected_answer', '2026-06-09'],
      ['affected_agreement', '2026-12-07'],
    ])
    expect(businessDaysTo(calendarOf('cbto'), '2026-06-24', '2026-08-17')).toBe(37)
  })

  it('its agreement closes at the hour of the affected system, 17:00 Central', () => {
    const agreement = itemOf(rolling, goshawkParties, told(...goshawk), 'affected_agreement')
    expect(agreement.dueAt).toBe('2026-12-07T23:00:00.000Z')
  })

  it('signed on the last day, its study is due 6 May 2027', () => {
    const facts = [...goshawk, on('2026-12-07', 'affected_agreement', 'signed')]
    expectDue(rolling, goshawkParties, facts, [['affected_study', '2027-05-06']])
  })

  it('without one named, none of its steps is needed', () => {
    const facts = goshawk
      .filter((fact) => !fact.step?.startsWith('affected'))
      .concat(on('2026-05-11', 'affected_notice', 'none'))
    const item = itemOf(rolling, goshawkParties, told(...facts), 'affected_agreement')
    expect(item.status).toBe('not_needed')
  })
})

describe('Larkspur Basin, deficient while the window is open', () => {
  const facts: Told[] = [
    on('2026-11-02', 'window_open', 'opened'),
    on('2026-11-24', 'file', 'filed'),
    on('2026-11-30', 'validity', 'deficient'),
  ]
  it('the 10 business days end on 14 December, before the window closes on the 17th', () => {
    expectDue(rolling, cbto, facts, [
      ['window_close', '2026-12-17'],
      ['cure', '2026-12-14'],
    ])
    const { consequence } = itemOf(rolling, cbto, told(...facts), 'cure')
    expect(consequence).toMatchObject({
      effect: 'withdrawn',
      say: expect.stringContaining('without a further cure'),
    })
  })

  it('a window stated to stay open longer by an extension moves the cap with it', () => {
    const late = [...facts.slice(0, 2), on('2026-12-08', 'validity', 'deficient')]
    expectDue(rolling, cbto, late, [['cure', '2026-12-17']])
    const extended: Told = {
      kind: 'extension',
      step: 'window_close',
      dueOn: '2026-12-21',
      body: { decision: 'granted' },
    }
    expectDue(rolling, cbto, [...late, extended], [['cure', '2026-12-21']])
  })
})
