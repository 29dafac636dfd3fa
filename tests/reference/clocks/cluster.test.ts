import { describe, expect, it } from 'vitest'
import { federalCluster } from '@/lib/domain/clocks/library/cluster'
import { federalCalendar } from '@/lib/domain/clocks/library-calendars'
import type { ProcedureBody } from '@/lib/domain/clocks/procedure'
import { schedule } from '@/lib/domain/clocks/schedule'
import type { OrganizationRules, Parties } from '@/lib/domain/clocks/schedule-types'
import { businessDaysTo } from '@/lib/domain/clocks/standing'
import { calendarOf, itemOf, on, partiesOf, rulesOf, told, type Told } from '../../unit/clocks/told'

/*
 * Source of the rules: pro forma LGIP after Orders 2023 and 2023-A, most numbers from memory as
 * each step is marked. The requests are invented; every date was counted by hand.
 */

const ave = partiesOf('ave')
const pro = federalCluster()
const cbto = partiesOf('cbto')
const rolling = federalCluster({
  calendarRoll: 'next_business_day',
  applicationFeeMinor: 1_000_000,
})

type Due = [step: string, dueOn: string | null, instance?: number]

function expectDue(body: ProcedureBody, parties: Parties, facts: Told[], rows: Due[]) {
  const { items, stranded } = schedule(body, parties, told(...facts))
  expect(stranded).toEqual([])
  const found = rows.map(([step, , instance = 1]) => {
    const item = items.find(
      (one) => one.step === step && one.instance === instance && one.obligation === '',
    )
    return [step, item?.dueOn, instance]
  })
  expect(found).toEqual(rows.map(([step, dueOn, instance = 1]) => [step, dueOn, instance]))
}

const dollars = (amount: number) => amount * 100
const posted = (receivedOn: string, step: string, obligation: string, amount: number): Told => ({
  step,
  obligation,
  receivedOn,
  amountMinor: dollars(amount),
})
const assigned = (
  receivedOn: string,
  amount: number,
  assignedBy: 'cluster_study' | 'cluster_restudy',
): Told => ({
  kind: 'changed',
  receivedOn,
  body: { terms: { assignedCostMinor: dollars(amount), assignedBy } },
})
const requested = (requestedMw: number): Told => ({
  kind: 'changed',
  body: { terms: { requestedMw } },
})

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
      ['appendices', '2027-06-09'],
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
