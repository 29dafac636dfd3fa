import { businessDayFrom, type BusinessCalendar } from '@/lib/domain/clocks/calendar'
import {
  addMonths,
  dayNumber,
  fromDayNumber,
  partsOf,
  type CivilDate,
} from '@/lib/domain/clocks/civil-date'
import type { Direction, Roll, Unit } from '@/lib/domain/clocks/procedure'
import { sayDate, sayLength } from '@/lib/domain/clocks/say'

export interface CountInput {
  start: CivilDate
  length: number
  unit: Unit
  direction?: Direction
  roll?: Roll
  /** next_business_day: an event on a closed day is received the next business day, day 0. */
  receipt?: 'as_is' | 'next_business_day'
  /** The start itself is day 1. */
  includeStart?: boolean
  /** Why a day stands still (a stopped clock); null where it runs. */
  stopped?: (day: number) => string | null
}

export interface CountedDay {
  on: CivilDate
  counted: boolean
  reason: string
}

export interface CountResult {
  dueOn: CivilDate
  /** The day from which the count ran, after the receipt convention. */
  dayZeroOn: CivilDate
  derivation: CountedDay[]
  account: string
}

/** The longest count that is still a clock and not a slip of the keyboard. */
export const longestCount: Record<Unit, number> = {
  business_day: 2600,
  calendar_day: 3660,
  month: 240,
  year: 40,
}

/**
 * The due date of a clock. The day of the event does not count; the last day does.
 *
 * Convention: 18 CFR 385.2007(a)(1) pattern (from memory); a business day is a day that the
 * calendar does not close. A month past the end of a shorter month ends on its last day. A
 * backward count never rolls toward the date it counts from.
 *
 * @throws RangeError for a date that is none or a length outside 0 to `longestCount`.
 */
export function count(input: CountInput, calendar: BusinessCalendar): CountResult {
  const counted = countedDays(input, calendar)
  return { ...counted, account: accountOf(input, calendar, counted) }
}

/** The same without the account in words. */
export function countedDays(
  input: CountInput,
  calendar: BusinessCalendar,
): Omit<CountResult, 'account'> {
  const { length, unit } = input
  if (!Number.isInteger(length) || length < 0 || length > longestCount[unit])
    throw new RangeError(
      `length: found ${length}; allowed are whole numbers from 0 to ${longestCount[unit]} for ${unit}.`,
    )
  const days: CountedDay[] = []
  const zero = dayZero(input, calendar, days)
  const raw =
    unit === 'business_day' || unit === 'calendar_day'
      ? countDays(input, calendar, zero, days)
      : countMonths(input, zero, days)
  return { dueOn: rolled(input, calendar, raw, days), dayZeroOn: zero, derivation: days }
}

function dayZero(input: CountInput, calendar: BusinessCalendar, days: CountedDay[]): CivilDate {
  partsOf(input.start)
  if (input.receipt !== 'next_business_day' || input.direction === 'before') return input.start
  const open = businessDayFrom(calendar, input.start, 1)
  for (let day = dayNumber(input.start); day < dayNumber(open); day += 1)
    days.push({
      on: fromDayNumber(day),
      counted: false,
      reason: `${calendar.closedOnDay(day)}: received the next business day`,
    })
  return open
}

function countDays(
  input: CountInput,
  calendar: BusinessCalendar,
  zero: CivilDate,
  days: CountedDay[],
): CivilDate {
  const step = input.direction === 'before' ? -1 : 1
  const closed = (day: number) =>
    input.stopped?.(day) ?? (input.unit === 'business_day' ? calendar.closedOnDay(day) : null)
  let day = dayNumber(zero)
  let counted = 0
  if (input.includeStart && input.length > 0) {
    const reason = closed(day)
    if (reason === null) counted = 1
    days.push({ on: zero, counted: reason === null, reason: reason ?? 'day 1, the start counts' })
  } else days.push({ on: zero, counted: false, reason: 'day 0, the event itself' })
  while (counted < input.length) {
    day += step
    const reason = closed(day)
    if (reason === null) counted += 1
    days.push({
      on: fromDayNumber(day),
      counted: reason === null,
      reason: reason ?? `day ${counted}`,
    })
  }
  return fromDayNumber(day)
}

function countMonths(input: CountInput, zero: CivilDate, days: CountedDay[]): CivilDate {
  const months = (input.unit === 'year' ? 12 : 1) * input.length
  const target = addMonths(zero, input.direction === 'before' ? -months : months)
  let day = dayNumber(target)
  const step = input.direction === 'before' ? -1 : 1
  if (input.includeStart && input.length > 0) day -= step
  days.push({ on: zero, counted: false, reason: 'day 0, the event itself' })
  let owed = 0
  if (input.stopped)
    for (let d = dayNumber(zero) + step; d !== day + step; d += step) {
      const reason = input.stopped(d)
      if (reason !== null) days.push({ on: fromDayNumber(d), counted: false, reason })
      if (reason !== null) owed += 1
    }
  while (owed > 0) {
    day += step
    const reason = input.stopped?.(day) ?? null
    if (reason === null) owed -= 1
    days.push({
      on: fromDayNumber(day),
      counted: reason === null,
      reason: reason ?? 'added for a stopped day',
    })
  }
  const on = fromDayNumber(day)
  const short = partsOf(target).day < partsOf(zero).day
  days.push({
    on,
    counted: true,
    reason: `${sayLength(input.length, input.unit)}${short ? ', the last day of the shorter month' : ''}`,
  })
  return on
}

function rolled(
  input: CountInput,
  calendar: BusinessCalendar,
  raw: CivilDate,
  days: CountedDay[],
): CivilDate {
  const roll = input.roll ?? 'none'
  if (roll === 'none') return raw
  const step = roll === 'previous_business_day' || input.direction === 'before' ? -1 : 1
  const due = businessDayFrom(calendar, raw, step)
  for (let day = dayNumber(raw); day !== dayNumber(due); day += step)
    days.push({
      on: fromDayNumber(day),
      counted: false,
      reason: `${calendar.closedOnDay(day)}: the end rolls`,
    })
  if (due !== raw)
    days.push({
      on: due,
      counted: true,
      reason: `rolled to the ${step < 0 ? 'previous' : 'next'} business day`,
    })
  return due
}

const weekendNames = new Set(['Saturday', 'Sunday'])

/** The days that did not count, weekends apart from named days. */
export function skippedDays(days: readonly CountedDay[]): {
  weekendDays: number
  named: CountedDay[]
} {
  const skipped = days.filter((day) => !day.counted && !day.reason.startsWith('day 0'))
  return {
    weekendDays: skipped.filter((day) => weekendNames.has(day.reason)).length,
    named: skipped.filter((day) => !weekendNames.has(day.reason)),
  }
}

function accountOf(
  input: CountInput,
  calendar: BusinessCalendar,
  { dayZeroOn: zero, dueOn, derivation }: Omit<CountResult, 'account'>,
): string {
  const { weekendDays, named } = skippedDays(derivation)
  const back = input.direction === 'before'
  const lines = [
    `${sayLength(input.length, input.unit)} ${back ? 'before' : 'from'} ${sayDate(zero)}` +
      `${zero === input.start ? '' : ` (received ${sayDate(input.start)}, a closed day)`}, ` +
      `${input.includeStart ? 'that day counted as day 1' : 'that day not counted'}, by the calendar ${calendar.name}: ${sayDate(dueOn)}.`,
  ]
  const skips = [
    ...named.map((day) => `${sayDate(day.on)} (${day.reason})`),
    ...(weekendDays > 0 ? [`${weekendDays} weekend day${weekendDays === 1 ? '' : 's'}`] : []),
  ]
  if (skips.length > 0) lines.push(`Not counted: ${skips.join(', ')}.`)
  return lines.join(' ')
}
