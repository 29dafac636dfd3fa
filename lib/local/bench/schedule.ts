import { demoCalendars } from '@/db/demo/calendars'
import { businessCalendar } from '@/lib/domain/clocks/calendar'
import { addDays } from '@/lib/domain/clocks/civil-date'
import type { Fact } from '@/lib/domain/clocks/facts'
import { federalStudyProcess } from '@/lib/domain/clocks/library/study-process'
import { schedule } from '@/lib/domain/clocks/schedule'
import type { Parties } from '@/lib/domain/clocks/schedule-types'

const WARM_UP = 200
const RUNS = 400

const { name, rules } = demoCalendars.ave
const parties: Parties = {
  operator: {
    name,
    zone: 'America/Denver',
    closesAt: '17:00',
    receiptRule: 'next_business_day',
    deemedReceivedDays: null,
    calendar: businessCalendar(name, rules),
  },
}
const body = federalStudyProcess()

type Told = [step: string, instance: number, outcome: string, days: number]

const deficiencies: Told[] = [1, 2, 3].flatMap((round): Told[] => [
  ['completeness', round, 'deficient', round * 20],
  ['cure', round, 'supplied', round * 20 + 12],
])
const studies: Told[] = [
  ['completeness', 4, 'complete', 75],
  ['scoping', 1, 'held', 85],
  ['study_tender', 1, 'feasibility', 92],
  ['feasibility_agreement', 1, 'returned', 110],
  ['feasibility_study', 1, 'impact_both', 150],
  ['distribution_tender', 1, 'tendered', 160],
  ['transmission_tender', 1, 'tendered', 165],
  ['distribution_agreement', 1, 'returned', 195],
  ['transmission_agreement', 1, 'returned', 196],
  ['distribution_study', 1, 'upgrades', 240],
  ['transmission_study', 1, 'no_upgrades', 260],
  ['facilities_tender', 1, 'sent', 266],
  ['facilities_agreement', 1, 'returned', 300],
  ['facilities_study', 1, 'draft', 360],
  ['draft_comments', 1, 'comments', 380],
  ['final_report', 1, 'given', 400],
  ['agree_to_pay', 1, 'agreed', 405],
  ['agreement_study', 1, 'sent', 412],
  ['sign', 1, 'signed', 440],
]
const bills: Told[] = Array.from({ length: 14 }, (_, at): Told[] => [
  ['bill', at + 1, 'billed', 470 + at * 30],
  ['bill_paid', at + 1, 'paid', 490 + at * 30],
]).flat()

const happened = [['file', 1, 'filed', 0] as Told, ...deficiencies, ...studies, ...bills].map(
  ([step, instance, outcome, days], at): Fact => ({
    id: `fact-${at + 1}`,
    seq: at + 1,
    kind: 'happened',
    step,
    instance,
    outcome,
    receivedOn: addDays('2025-01-06', days),
    body: {},
    recordedAt: '2026-12-01T00:00:00Z',
  }),
)
const other = (kind: Fact['kind'], at: number, more: Partial<Fact>): Fact => ({
  id: `other-${at}`,
  seq: 100 + at,
  kind,
  instance: 1,
  body: {},
  recordedAt: '2026-12-01T00:00:00Z',
  ...more,
})
const facts: Fact[] = [
  ...happened,
  other('stop', 1, { receivedOn: '2025-09-01' }),
  other('resume', 2, { receivedOn: '2025-09-15' }),
  other('scheduled', 3, { step: 'work_start', dueOn: '2027-06-01' }),
  other('scheduled', 4, { step: 'operation', dueOn: '2027-12-01' }),
  other('extension', 5, { step: 'sign', body: { decision: 'granted', lengthDays: 10 } }),
  other('correction', 6, {
    ...happened[3],
    id: 'other-6',
    seq: 106,
    kind: 'correction',
    replacesId: 'fact-4',
  }),
]

function times(work: () => unknown): number[] {
  for (let k = 0; k < WARM_UP; k++) work()
  return Array.from({ length: RUNS }, () => {
    const start = performance.now()
    work()
    return performance.now() - start
  }).sort((a, b) => a - b)
}

const taken = times(() => schedule(body, parties, facts))
const { items, stranded } = schedule(body, parties, facts)
console.log(
  `schedule(): ${body.steps.length} steps, ${facts.length} facts, ${items.length} items, ${stranded.length} stranded`,
)
console.log(
  `best ${taken[0]!.toFixed(2)} ms, median ${taken[RUNS / 2]!.toFixed(2)} ms, 95 of 100 under ${taken[RUNS * 0.95]!.toFixed(2)} ms`,
)
