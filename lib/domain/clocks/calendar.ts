import {
  addDays,
  civilDate,
  daysInMonth,
  fromDayNumber,
  dayNumber,
  weekdayOf,
  type CivilDate,
} from '@/lib/domain/clocks/civil-date'

/** A holiday as a rule; years bound it where it began or ended. */
export type HolidayRule = { name: string; fromYear?: number; toYear?: number } & (
  | {
      kind: 'fixed'
      month: number
      day: number
      /** nearest_weekday: Saturday is observed on Friday, Sunday on Monday. */
      shift: 'none' | 'nearest_weekday'
    }
  | { kind: 'nth_weekday'; month: number; weekday: number; nth: number; plusDays?: number }
  | { kind: 'last_weekday'; month: number; weekday: number }
  | { kind: 'easter'; plusDays: number }
)

export interface CalendarRules {
  /** Weekdays that are no business days, 0 Sunday … 6 Saturday. */
  weekend: number[]
  holidays: HolidayRule[]
  /** One-off closures. */
  closures: { on: CivilDate; name: string }[]
  /** Days on which the organization works although a rule says holiday. */
  removals?: CivilDate[]
  source: string
}

export interface BusinessCalendar {
  name: string
  rules: CalendarRules
  /** Why the organization does not count this day; null on a business day. */
  closedBecause(on: CivilDate): string | null
  /** The same by day number, remembered: counting asks for the same days again and again. */
  closedOnDay(day: number): string | null
}

const weekdayNames = ['Sunday', 'Monday', 'Tuesday', 'Wednesday', 'Thursday', 'Friday', 'Saturday']

/** The rules made ready to ask about single days. @throws RangeError if no day would be open. */
export function businessCalendar(name: string, rules: CalendarRules): BusinessCalendar {
  if (new Set(rules.weekend).size > 6)
    throw new RangeError(`The calendar ${name} has no working weekday.`)
  const years = new Map<number, Map<CivilDate, string>>()
  const closures = new Map(rules.closures.map((closure) => [closure.on, closure.name]))
  const removals = new Set(rules.removals ?? [])
  const weekend = new Set(rules.weekend)
  const holidaysOf = (year: number) => {
    const known = years.get(year)
    if (known) return known
    const made = holidaysIn(rules.holidays, year)
    years.set(year, made)
    return made
  }
  const closedBecause = (on: CivilDate) => {
    const closure = closures.get(on)
    if (closure !== undefined) return closure
    const weekday = weekdayOf(on)
    if (weekend.has(weekday)) return weekdayNames[weekday]!
    if (removals.has(on)) return null
    return holidaysOf(Number(on.slice(0, 4))).get(on) ?? null
  }
  const known = new Map<number, string | null>()
  const closedOnDay = (day: number) => {
    const before = known.get(day)
    if (before !== undefined) return before
    const reason = closedBecause(fromDayNumber(day))
    known.set(day, reason)
    return reason
  }
  return { name, rules, closedBecause, closedOnDay }
}

/**
 * The days of a year that rules close, observed days of neighboring years included: New Year's
 * Day on a Saturday is observed on 31 December of the year before.
 */
export function holidaysIn(rules: readonly HolidayRule[], year: number): Map<CivilDate, string> {
  const days = new Map<CivilDate, string>()
  for (const y of [year - 1, year, year + 1])
    for (const rule of rules) {
      const on = holidayOn(rule, y)
      if (on && on.startsWith(String(year).padStart(4, '0'))) days.set(on, labelOf(rule, y, on))
    }
  return days
}

/** The day a rule closes in a year, or null where the rule did not hold. */
export function holidayOn(rule: HolidayRule, year: number): CivilDate | null {
  if (rule.fromYear !== undefined && year < rule.fromYear) return null
  if (rule.toYear !== undefined && year > rule.toYear) return null
  switch (rule.kind) {
    case 'fixed': {
      if (rule.day > daysInMonth(year, rule.month)) return null
      const on = civilDate(year, rule.month, rule.day)
      return rule.shift === 'none' ? on : observedOn(on)
    }
    case 'nth_weekday': {
      const on = nthWeekday(year, rule.month, rule.weekday, rule.nth)
      return on && addDays(on, rule.plusDays ?? 0)
    }
    case 'last_weekday':
      return lastWeekday(year, rule.month, rule.weekday)
    case 'easter':
      return addDays(easterSunday(year), rule.plusDays)
  }
}

/** Saturday is observed on Friday, Sunday on Monday. Source: 5 U.S.C. 6103(b)(1); E.O. 11582. */
export function observedOn(on: CivilDate): CivilDate {
  const weekday = weekdayOf(on)
  if (weekday === 6) return addDays(on, -1)
  return weekday === 0 ? addDays(on, 1) : on
}

function labelOf(rule: HolidayRule, year: number, on: CivilDate): string {
  if (rule.kind !== 'fixed' || rule.shift === 'none') return rule.name
  return on === civilDate(year, rule.month, rule.day) ? rule.name : `${rule.name}, observed`
}

/** Null where the month has no fifth such weekday. */
function nthWeekday(year: number, month: number, weekday: number, nth: number): CivilDate | null {
  const first = civilDate(year, month, 1)
  const day = 1 + ((weekday - weekdayOf(first) + 7) % 7) + (nth - 1) * 7
  return day > daysInMonth(year, month) ? null : civilDate(year, month, day)
}

function lastWeekday(year: number, month: number, weekday: number): CivilDate {
  const last = civilDate(year, month, daysInMonth(year, month))
  return addDays(last, -((weekdayOf(last) - weekday + 7) % 7))
}

/** Easter Sunday, Gregorian. Source: anonymous algorithm in Meeus, Astronomical Algorithms, ch. 8. */
export function easterSunday(year: number): CivilDate {
  const a = year % 19
  const b = Math.floor(year / 100)
  const c = year % 100
  const d = Math.floor(b / 4)
  const e = b % 4
  const f = Math.floor((b + 8) / 25)
  const g = Math.floor((b - f + 1) / 3)
  const h = (19 * a + b - d - g + 15) % 30
  const i = Math.floor(c / 4)
  const k = c % 4
  const l = (32 + 2 * e + 2 * i - h - k) % 7
  const m = Math.floor((a + 11 * h + 22 * l) / 451)
  const n = h + l - 7 * m + 114
  return civilDate(year, Math.floor(n / 31), (n % 31) + 1)
}

/** The first business day on or after the day. @throws RangeError when none lies within a year. */
export function businessDayFrom(
  calendar: BusinessCalendar,
  on: CivilDate,
  step: 1 | -1,
): CivilDate {
  let day = dayNumber(on)
  for (let tried = 0; tried <= 366; tried += 1, day += step) {
    if (calendar.closedOnDay(day) === null) return fromDayNumber(day)
  }
  throw new RangeError(`The calendar ${calendar.name} has no business day within a year of ${on}.`)
}
