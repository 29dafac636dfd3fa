import { addDays, daysBetween, later, type CivilDate } from '@/lib/domain/clocks/civil-date'
import { effectiveFacts, type Fact } from '@/lib/domain/clocks/facts'
import {
  loopOf,
  stepOf,
  type ClockRule,
  type ProcedureBody,
  type Step,
  type StepRef,
} from '@/lib/domain/clocks/procedure'
import type { Schedule, ScheduledItem } from '@/lib/domain/clocks/schedule-types'
import { workingDue } from '@/lib/domain/clocks/working-due'

export const paces = ['shortest', 'likely', 'longest'] as const
export type Pace = (typeof paces)[number]

export interface StepForecast {
  step: string
  instance: number
  title: string
  stage: string
  /** Always provisional: the day on which the step is expected to be done. */
  shortestOn: CivilDate
  likelyOn: CivilDate
  longestOn: CivilDate
  /** What the length of the step was taken from. */
  basis: 'booked' | 'typical' | 'due' | 'clock'
}

export interface Forecast {
  asOfOn: CivilDate
  /** The open steps on the usual way ahead, in the order of the procedure. */
  steps: StepForecast[]
  /** The step that puts the facility in operation; null where the chain breaks before it. */
  operation: StepForecast | null
  /** Steps whose length nobody gave: from them on nothing can be foreseen. */
  gaps: { step: string; title: string }[]
}

/**
 * When the open steps may be done, chained from what is done: shortest, likely and longest.
 *
 * A booked day is used as it is booked. Else a step takes its `typical` calendar days; without
 * them one of ours takes until it is due, and any other the length of its clock. Nothing is
 * foreseen before `asOfOn`. Further rounds of a loop are not foreseen. Pure; no clock inside.
 */
export function forecast(
  body: ProcedureBody,
  schedule: Schedule,
  facts: readonly Fact[],
  asOfOn: CivilDate,
): Forecast {
  const none = { asOfOn, steps: [], operation: null, gaps: [] }
  if (schedule.standing === 'withdrawn') return none
  const chain = chainOf(body, schedule, facts, asOfOn)
  const open = schedule.items.filter((item) => isAhead(item))
  const steps = open.flatMap((item) => chain.forecastOf(item) ?? [])
  const operation = steps.find((one) => one.step === body.operationStep) ?? null
  const gaps = open
    .filter((item) => chain.lengthOf(item) === null)
    .map(({ step, title }) => ({ step, title }))
  return { asOfOn, steps, operation, gaps }
}

/** A step on the usual way that is still to be done. */
function isAhead(item: ScheduledItem): boolean {
  if (item.obligation !== '' || !item.onLine) return false
  if (item.kind === 'anytime' || item.kind === 'recurring') return false
  return item.status === 'waiting' || item.status === 'open' || item.status === 'stopped'
}

type Length = Pick<StepForecast, 'basis'> & { days: Record<Pace, number> | null }

interface Chain {
  forecastOf(item: ScheduledItem): StepForecast | null
  lengthOf(item: ScheduledItem): Length | null
}

function chainOf(
  body: ProcedureBody,
  schedule: Schedule,
  facts: readonly Fact[],
  asOfOn: CivilDate,
): Chain {
  const latest = latestRounds(schedule.items)
  const booked = bookedDays(facts)
  const ends = new Map<string, CivilDate | null>()

  const lengthOf = (item: ScheduledItem): Length | null => {
    if (booked.has(keyOf(item))) return { basis: 'booked', days: null }
    return lengthOfStep(stepOf(body, item.step), item)
  }

  const endOf = (item: ScheduledItem, pace: Pace): CivilDate | null => {
    if (!isAhead(item)) return item.doneOn
    const key = `${keyOf(item)} ${pace}`
    const known = ends.get(key)
    if (known !== undefined) return known
    // A circle among open steps foresees nothing; validation refuses it beforehand.
    ends.set(key, null)
    const made = madeEnd(item, pace)
    ends.set(key, made)
    return made
  }

  const madeEnd = (item: ScheduledItem, pace: Pace): CivilDate | null => {
    const day = booked.get(keyOf(item))
    if (day) return later(day, asOfOn)
    const length = lengthOf(item)
    const startOn = item.startOn ?? startOf(item, pace)
    if (!length?.days || !startOn) return null
    return later(addDays(startOn, length.days[pace]), asOfOn)
  }

  const startOf = (item: ScheduledItem, pace: Pace): CivilDate | null => {
    const { start } = stepOf(body, item.step)
    if (!start) return asOfOn
    const dates = before(start.of, item).flatMap((one) =>
      isUsual(one) ? [endOf(one, pace) ?? (isAhead(one) ? null : asOfOn)] : [],
    )
    if (dates.length === 0) return null
    const known = dates.filter((on) => on !== null)
    if (start.mode === 'any')
      return known.length > 0 ? known.reduce((a, b) => (a < b ? a : b)) : null
    return known.length === dates.length ? known.reduce(later) : null
  }

  const before = (refs: readonly StepRef[], item: ScheduledItem): ScheduledItem[] =>
    refs
      .filter((ref) => ref.instance !== 'previous')
      .flatMap((ref) => {
        const loop = loopOf(body, ref.step)
        const same = loop !== undefined && loop === loopOf(body, item.step)
        return (same && latest.get(`${ref.step}#${item.instance}`)) || latest.get(ref.step) || []
      })

  return {
    lengthOf,
    forecastOf(item) {
      const [shortestOn, likelyOn, longestOn] = paces.map((pace) => endOf(item, pace))
      if (!shortestOn || !likelyOn || !longestOn) return null
      const { step, instance, title, stage } = item
      const { basis } = lengthOf(item)!
      return { step, instance, title, stage, shortestOn, likelyOn, longestOn, basis }
    },
  }
}

/** Steps that are not needed, or were overtaken or left, hold nothing up. */
function isUsual(item: ScheduledItem): boolean {
  return isAhead(item) || item.status === 'done' || item.status === 'waived'
}

const keyOf = (item: Pick<ScheduledItem, 'step' | 'instance'>) => `${item.step}#${item.instance}`

/** Each round of a step by its key, and the latest by the key of the step alone. */
function latestRounds(items: readonly ScheduledItem[]): Map<string, ScheduledItem> {
  const found = new Map<string, ScheduledItem>()
  for (const item of items) {
    if (item.obligation !== '') continue
    found.set(keyOf(item), item)
    const known = found.get(item.step)
    if (!known || known.instance < item.instance) found.set(item.step, item)
  }
  return found
}

function bookedDays(facts: readonly Fact[]): Map<string, CivilDate> {
  const days = new Map<string, CivilDate>()
  for (const fact of effectiveFacts(facts))
    if (fact.kind === 'scheduled' && fact.step && fact.dueOn)
      days.set(`${fact.step}#${fact.instance}`, fact.dueOn)
  return days
}

function lengthOfStep(step: Step, item: ScheduledItem): Length | null {
  if (step.typical) return { basis: 'typical', days: step.typical }
  const dueOn = workingDue(item)
  if (dueOn && item.startOn) return { basis: 'due', days: even(daysBetween(item.startOn, dueOn)) }
  const clock =
    step.clocks.find((one) => !one.when && !one.from) ?? step.clocks.find((one) => !one.from)
  if (clock) return { basis: 'clock', days: even(calendarDaysOf(clock)) }
  const bound = step.clocks.some((one) => one.from?.date === 'due')
  return bound ? { basis: 'clock', days: even(0) } : null
}

const even = (days: number): Record<Pace, number> => ({
  shortest: days,
  likely: days,
  longest: days,
})

/** A clock's length in calendar days, holidays left out: good enough to foresee with. */
function calendarDaysOf({ length, unit }: ClockRule): number {
  if (unit === 'business_day') return Math.ceil((length * 7) / 5)
  if (unit === 'month') return Math.round(length * 30.44)
  return unit === 'year' ? Math.round(length * 365.25) : length
}
