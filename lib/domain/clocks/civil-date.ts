/**
 * Civil dates as `YYYY-MM-DD` strings and day numbers (days since 1970-01-01).
 *
 * Algorithm of the day number: proleptic Gregorian calendar, era arithmetic as published by
 * Howard Hinnant, "chrono-Compatible Low-Level Date Algorithms" (from memory).
 */
export type CivilDate = string

const pattern = /^\d{4}-\d{2}-\d{2}$/

export interface DateParts {
  year: number
  month: number
  day: number
}

/** Year, month and day of a civil date. @throws RangeError for anything that is no real date. */
export function partsOf(on: CivilDate): DateParts {
  const year = Number(on.slice(0, 4))
  const month = Number(on.slice(5, 7))
  const day = Number(on.slice(8))
  const fits = pattern.test(on) && month >= 1 && month <= 12 && day >= 1
  if (!fits || day > daysInMonth(year, month))
    throw new RangeError(`"${on}" is no date of the form YYYY-MM-DD.`)
  return { year, month, day }
}

/** Whether the text is a real civil date. */
export function isCivilDate(text: string): boolean {
  try {
    partsOf(text)
    return true
  } catch {
    return false
  }
}

export function civilDate(year: number, month: number, day: number): CivilDate {
  return `${String(year).padStart(4, '0')}-${String(month).padStart(2, '0')}-${String(day).padStart(2, '0')}`
}

export function daysInMonth(year: number, month: number): number {
  if (month === 2) return isLeapYear(year) ? 29 : 28
  return [4, 6, 9, 11].includes(month) ? 30 : 31
}

export function isLeapYear(year: number): boolean {
  return (year % 4 === 0 && year % 100 !== 0) || year % 400 === 0
}

/** Days since 1970-01-01. */
export function dayNumber(on: CivilDate): number {
  const { year, month, day } = partsOf(on)
  const y = month <= 2 ? year - 1 : year
  const era = Math.floor(y / 400)
  const yearOfEra = y - era * 400
  const dayOfYear = Math.floor((153 * (month + (month > 2 ? -3 : 9)) + 2) / 5) + day - 1
  const dayOfEra =
    yearOfEra * 365 + Math.floor(yearOfEra / 4) - Math.floor(yearOfEra / 100) + dayOfYear
  return era * 146097 + dayOfEra - 719468
}

/** The civil date of a day number. */
export function fromDayNumber(days: number): CivilDate {
  const z = days + 719468
  const era = Math.floor(z / 146097)
  const dayOfEra = z - era * 146097
  const yearOfEra = Math.floor(
    (dayOfEra -
      Math.floor(dayOfEra / 1460) +
      Math.floor(dayOfEra / 36524) -
      Math.floor(dayOfEra / 146096)) /
      365,
  )
  const dayOfYear =
    dayOfEra - (365 * yearOfEra + Math.floor(yearOfEra / 4) - Math.floor(yearOfEra / 100))
  const mp = Math.floor((5 * dayOfYear + 2) / 153)
  const month = mp < 10 ? mp + 3 : mp - 9
  const year = yearOfEra + era * 400 + (month <= 2 ? 1 : 0)
  return civilDate(year, month, dayOfYear - Math.floor((153 * mp + 2) / 5) + 1)
}

export function addDays(on: CivilDate, days: number): CivilDate {
  return fromDayNumber(dayNumber(on) + days)
}

/** Whole days from the first to the second. */
export function daysBetween(from: CivilDate, to: CivilDate): number {
  return dayNumber(to) - dayNumber(from)
}

/** Adds months; past the end of a shorter month it is the last day of that month. */
export function addMonths(on: CivilDate, months: number): CivilDate {
  const { year, month, day } = partsOf(on)
  const index = year * 12 + (month - 1) + months
  const y = Math.floor(index / 12)
  const m = index - y * 12 + 1
  return civilDate(y, m, Math.min(day, daysInMonth(y, m)))
}

/** 0 Sunday … 6 Saturday. */
export function weekdayOf(on: CivilDate): number {
  return (((dayNumber(on) + 4) % 7) + 7) % 7
}

/** The earlier of two dates. */
export function earlier(a: CivilDate, b: CivilDate): CivilDate {
  return a <= b ? a : b
}

/** The later of two dates. */
export function later(a: CivilDate, b: CivilDate): CivilDate {
  return a >= b ? a : b
}
