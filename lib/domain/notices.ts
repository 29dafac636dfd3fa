import type { BusinessCalendar } from '@/lib/domain/clocks/calendar'
import { addDays, type CivilDate } from '@/lib/domain/clocks/civil-date'
import { count } from '@/lib/domain/clocks/count'
import type { MissEffect, OwnerRole, StepParty } from '@/lib/domain/clocks/procedure'
import { businessDaysTo } from '@/lib/domain/clocks/standing'
import { instantOf, localOf } from '@/lib/domain/clocks/zoned'

/** Notices about clocks: which rung of the ladder is due, and who hears it. Common practice, no source. */

/** What the ladder reads of an open obligation. */
export interface NoticedObligation {
  party: StepParty
  effect: MissEffect
  ownerRole: OwnerRole | null
  startOn: CivilDate | null
  /** The day by which work has to begin, where the step has a lead time. */
  startBy: CivilDate | null
  dueOn: CivilDate
  /** ISO instant at which the due date closes; null where no hour is known. */
  dueAt: string | null
}

export interface NoticedPerson {
  id: string
  roles: readonly OwnerRole[]
}

/** One step of a ladder. */
export interface Rung {
  /** Stable name; part of the key under which a notice is sent once. */
  key: string
  /** ISO instant from which it is due. */
  at: string
  says: RungSays
  /** Developers and executives hear it too. */
  escalates: boolean
}

export type RungSays =
  'start' | 'ahead' | 'today' | 'closing' | 'missed' | 'theirs_late' | 'until_over'

interface LadderInput {
  obligation: NoticedObligation
  zone: string
  /** Whose business days space the rungs. */
  calendar: BusinessCalendar
  /** Silent before this day; a reminder on it. */
  acknowledgedUntil?: CivilDate | null
}

export interface RungsDueInput extends LadderInput {
  now: Date
  /** The person the obligation is assigned to. */
  assignedId?: string | null
  /** Everybody active. */
  people: readonly NoticedPerson[]
}

export interface DueRung extends Rung {
  personIds: string[]
}

/** Local hour at which a rung of a day is due. */
const morning = '08:00'
const closingHours = 2
const chaseEveryBusinessDays = 5

interface LadderRule {
  /** Business days ahead of the due date; further rungs only for clocks that long, in days. */
  ahead: { businessDays: number; clockDays?: number }[]
  closing: boolean
  /** From this many business days before on, developers and executives hear it too. */
  escalatesFrom: number | null
}

const losesTheRequest: LadderRule = {
  ahead: [
    { businessDays: 60, clockDays: 365 },
    { businessDays: 30, clockDays: 120 },
    { businessDays: 10 },
    { businessDays: 5 },
    { businessDays: 2 },
    { businessDays: 1 },
  ],
  closing: true,
  escalatesFrom: 1,
}
const costs: LadderRule = {
  ahead: [{ businessDays: 20, clockDays: 120 }, { businessDays: 5 }, { businessDays: 2 }],
  closing: false,
  escalatesFrom: null,
}
const onlyTracked: LadderRule = {
  ahead: [{ businessDays: 2 }],
  closing: false,
  escalatesFrom: null,
}

const ladders: Record<MissEffect, LadderRule> = {
  withdrawn: losesTheRequest,
  withdrawn_on_notice: losesTheRequest,
  cure: costs,
  extension: costs,
  penalty: costs,
  duty: costs,
  presumed: costs,
  track: onlyTracked,
}

/** Whether the applicant owes it; what others owe is chased once it is late. */
export function isOurs(party: StepParty): boolean {
  return party === 'applicant' || party === 'both'
}

/**
 * The rung that is due now with the people who hear it; none or one. A rung whose time passed
 * while nothing ran gives way to the latest one.
 */
export function rungsDue(input: RungsDueInput): DueRung[] {
  const { now, zone, acknowledgedUntil } = input
  const today = localOf(now.toISOString(), zone).on
  if (acknowledgedUntil && today < acknowledgedUntil) return []
  const passed = ladderOf(input, today).filter((rung) => Date.parse(rung.at) <= now.getTime())
  const rung = passed.reduce<Rung | null>((latest, one) => laterRung(latest, one), null)
  if (!rung) return []
  const personIds = recipientsOf(input, rung)
  return personIds.length > 0 ? [{ ...rung, personIds }] : []
}

function laterRung(a: Rung | null, b: Rung): Rung {
  return a && Date.parse(a.at) > Date.parse(b.at) ? a : b
}

/** The rungs that lie inside the clock's life. `today` bounds how far a late step is chased. */
export function ladderOf(input: LadderInput, today: CivilDate): Rung[] {
  const { obligation, zone, acknowledgedUntil } = input
  const ladder = isOurs(obligation.party) ? ourLadder(input) : theirLadder(input, today)
  if (!acknowledgedUntil) return ladder
  const at = instantOf(acknowledgedUntil, morning, zone)
  const escalates = ladder.some((rung) => rung.escalates && Date.parse(rung.at) <= Date.parse(at))
  return [{ key: `until-${acknowledgedUntil}`, at, says: 'until_over', escalates }, ...ladder]
}

function ourLadder({ obligation, zone, calendar }: LadderInput): Rung[] {
  const { startOn, startBy, dueOn, dueAt, effect } = obligation
  const rule = ladders[effect]
  const morningOf = (on: CivilDate) => instantOf(on, morning, zone)
  const isInside = (on: CivilDate) => startOn === null || on > startOn
  const rungs: Rung[] = []
  if (startBy && startBy < dueOn && isInside(startBy))
    rungs.push({ key: 'start', at: morningOf(startBy), says: 'start', escalates: false })
  for (const { businessDays, clockDays } of rule.ahead) {
    const on = count(
      { start: dueOn, length: businessDays, unit: 'business_day', direction: 'before' },
      calendar,
    ).dueOn
    const isLongEnough = !clockDays || (startOn !== null && addDays(startOn, clockDays) <= dueOn)
    if (!isInside(on) || !isLongEnough) continue
    const escalates = rule.escalatesFrom !== null && businessDays <= rule.escalatesFrom
    rungs.push({ key: `ahead-${businessDays}`, at: morningOf(on), says: 'ahead', escalates })
  }
  return [
    ...rungs,
    ...lastDay(rule, isInside(dueOn), morningOf(dueOn), dueAt ?? endOf(dueOn, zone)),
  ]
}

function lastDay(
  rule: LadderRule,
  hasMorning: boolean,
  morningAt: string,
  closesAt: string,
): Rung[] {
  const escalates = rule.escalatesFrom !== null
  const closes = Date.parse(closesAt)
  const rungs: Rung[] = []
  if (hasMorning) rungs.push({ key: 'today', at: morningAt, says: 'today', escalates })
  if (rule.closing)
    rungs.push({
      key: 'closing',
      at: new Date(closes - closingHours * 3_600_000).toISOString(),
      says: 'closing',
      escalates,
    })
  // The closing instant itself is still in time.
  const missedAt = new Date(closes + 60_000).toISOString()
  rungs.push({ key: 'missed', at: missedAt, says: 'missed', escalates })
  return rungs
}

function endOf(on: CivilDate, zone: string): string {
  return instantOf(addDays(on, 1), '00:00', zone)
}

function theirLadder({ obligation, zone, calendar }: LadderInput, today: CivilDate): Rung[] {
  const rungs: Rung[] = []
  const chaseOn = (businessDays: number) =>
    count({ start: obligation.dueOn, length: businessDays, unit: 'business_day' }, calendar).dueOn
  const last = chaseNumber(obligation.dueOn, today, calendar)
  // The two latest are enough: an earlier one gives way in any case.
  for (let no = Math.max(1, last - 1); no <= last + 1; no += 1) {
    const on = chaseOn(1 + (no - 1) * chaseEveryBusinessDays)
    const at = instantOf(on, morning, zone)
    rungs.push({ key: `theirs-late-${no}`, at, says: 'theirs_late', escalates: false })
  }
  return rungs
}

/** How many chases lie at or before today: one the business day after, then every five. */
function chaseNumber(dueOn: CivilDate, today: CivilDate, calendar: BusinessCalendar): number {
  const late = -businessDaysTo(calendar, today, dueOn)
  return late <= 0 ? 0 : 1 + Math.floor((late - 1) / chaseEveryBusinessDays)
}

/** Everybody who hears a rung: those who hold the clock, and those above where it escalates. */
function recipientsOf({ obligation, people, assignedId }: RungsDueInput, rung: Rung): string[] {
  const holders = holdersOf(obligation, people, assignedId)
  const above = rung.escalates
    ? [...having(people, 'developer'), ...having(people, 'executive')]
    : []
  return [...new Set([...holders, ...above.map((person) => person.id)])]
}

/**
 * Who holds a clock: the assigned person, else those of the owner's role, else developers, else
 * administrators, so that it is never without somebody. One who is no longer active holds nothing.
 */
export function holdersOf(
  obligation: Pick<NoticedObligation, 'ownerRole' | 'party'>,
  people: readonly NoticedPerson[],
  assignedId?: string | null,
): string[] {
  const owner = obligation.ownerRole ?? (isOurs(obligation.party) ? 'developer' : 'liaison')
  const choices = [
    people.filter((person) => person.id === assignedId),
    having(people, owner),
    having(people, 'developer'),
    having(people, 'administrator'),
  ]
  return (choices.find((choice) => choice.length > 0) ?? []).map((person) => person.id)
}

function having(people: readonly NoticedPerson[], role: OwnerRole): NoticedPerson[] {
  return people.filter((person) => person.roles.includes(role))
}
