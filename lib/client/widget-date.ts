import { civilDate, partsOf, type CivilDate } from '@/lib/domain/clocks/civil-date'

/**
 * The one place where a civil date becomes a `Date`: the calendar widget knows nothing else. Noon
 * local time, so that no daylight-saving change moves it to a neighboring day.
 */
export function dateOfCivil(on: CivilDate): Date {
  const { year, month, day } = partsOf(on)
  return new Date(year, month - 1, day, 12)
}

/** The civil date that the widget's local `Date` shows. */
export function civilOfDate(date: Date): CivilDate {
  return civilDate(date.getFullYear(), date.getMonth() + 1, date.getDate())
}
