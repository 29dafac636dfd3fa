/** Days from 1970-01-01 to a Gregorian civil date (days-from-civil counting in March-based years). */
export function dayNumber(year: number, month: number, day: number): number {
  const y = month <= 2 ? year - 1 : year
  const era = Math.floor(y / 400)
  const yearOfEra = y - era * 400
  const dayOfYear = Math.floor((153 * (month + (month > 2 ? -3 : 9)) + 2) / 5) + day - 1
  const dayOfEra =
    yearOfEra * 365 + Math.floor(yearOfEra / 4) - Math.floor(yearOfEra / 100) + dayOfYear
  return era * 146097 + dayOfEra - 719468
}

/** Julian day of a civil date at an hour of Universal Time. */
export function julianDay(year: number, month: number, day: number, hourUt: number): number {
  return dayNumber(year, month, day) + 2440587.5 + hourUt / 24
}

/** Day of the year, 1 to 366, in the year given. */
export function dayOfYear(year: number, month: number, day: number): number {
  return dayNumber(year, month, day) - dayNumber(year, 1, 1) + 1
}

const DAYS_IN_MONTH = [31, 28, 31, 30, 31, 30, 31, 31, 30, 31, 30, 31] as const

/** Days of a month in a weather year, which has no 29 February. */
export function daysInMonth(month: number): number {
  return DAYS_IN_MONTH[month - 1]!
}

/** Month, day and hour-ending hour (1 to 24) that row `index` of a weather year must carry. */
export function expectedStamp(index: number): { month: number; day: number; hour: number } {
  let day = Math.floor(index / 24)
  let month = 1
  while (day >= daysInMonth(month)) {
    day -= daysInMonth(month)
    month += 1
  }
  return { month, day: day + 1, hour: (index % 24) + 1 }
}
