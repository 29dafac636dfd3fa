import { DateTime } from 'luxon'

/** Dates and hours as people read them here: US English, the zone named beside every hour. */

const genericZones: Record<string, string> = {
  'America/New_York': 'ET',
  'America/Detroit': 'ET',
  'America/Indiana/Indianapolis': 'ET',
  'America/Kentucky/Louisville': 'ET',
  'America/Chicago': 'CT',
  'America/Menominee': 'CT',
  'America/North_Dakota/Center': 'CT',
  'America/Denver': 'MT',
  'America/Boise': 'MT',
  'America/Los_Angeles': 'PT',
  'America/Anchorage': 'AKT',
  'America/Phoenix': 'MST',
  'Pacific/Honolulu': 'HST',
  UTC: 'UTC',
}

function civil(on: string): DateTime {
  const date = DateTime.fromISO(on, { zone: 'utc', locale: 'en-US' })
  if (!/^\d{4}-\d{2}-\d{2}$/.test(on) || !date.isValid) {
    throw new RangeError(`Found "${on}"; a civil date YYYY-MM-DD is needed.`)
  }
  return date
}

function moment(at: string | Date, zone: string): DateTime {
  const options = { zone, locale: 'en-US' }
  const date =
    typeof at === 'string' ? DateTime.fromISO(at, options) : DateTime.fromJSDate(at, options)
  if (!date.isValid) {
    throw new RangeError(
      `Found "${String(at)}" in "${zone}"; an instant and an IANA zone are needed.`,
    )
  }
  return date
}

/**
 * A civil date with its weekday: "Thu 10 Dec 2026"; without the year when it is that of `today`
 * (also a civil date). Throws RangeError on anything but a real `YYYY-MM-DD`.
 */
export function formatDate(on: string, today?: string): string {
  const sameYear = today !== undefined && today.slice(0, 4) === on.slice(0, 4)
  return civil(on).toFormat(sameYear ? 'ccc d LLL' : 'ccc d LLL yyyy')
}

/** A civil date without weekday: "10 Dec", or "10 Dec 2027" in another year than `today`. */
export function formatShortDate(on: string, today?: string): string {
  const sameYear = today !== undefined && today.slice(0, 4) === on.slice(0, 4)
  return civil(on).toFormat(sameYear ? 'd LLL' : 'd LLL yyyy')
}

/** A month: "Sep 2029" from any civil date in it. */
export function formatMonth(on: string): string {
  return civil(on).toFormat('LLL yyyy')
}

/**
 * The zone as the trade says it: "MT" for Denver summer and winter alike, "MST" for Phoenix, which
 * keeps no summer time. A zone outside the table gets its own short name at that instant.
 */
export function zoneName(zone: string, at: string | Date): string {
  return genericZones[zone] ?? moment(at, zone).offsetNameShort ?? zone
}

/** The hour of an instant in a zone: "5 pm MT", "4:30 pm ET", "noon CT". */
export function formatHour(at: string | Date, zone: string): string {
  return `${clockWords(moment(at, zone))} ${zoneName(zone, at)}`
}

/** A closing hour `HH:MM` on its own: "5 pm", "4:30 pm". Throws RangeError on anything else. */
export function formatClosingHour(hour: string): string {
  const time = DateTime.fromFormat(hour.slice(0, 5), 'HH:mm', { zone: 'utc', locale: 'en-US' })
  if (!time.isValid) throw new RangeError(`Found "${hour}"; an hour HH:MM is needed.`)
  return clockWords(time)
}

function clockWords(time: DateTime): string {
  if (time.hour === 12 && time.minute === 0) return 'noon'
  return time.toFormat(time.minute === 0 ? 'h a' : 'h:mm a').toLowerCase()
}

/** Date and hour of an instant in a zone: "Thu 10 Dec, 5 pm MT". */
export function formatInstant(at: string | Date, zone: string, today?: string): string {
  const on = moment(at, zone).toISODate()
  return `${formatDate(on ?? '', today)}, ${formatHour(at, zone)}`
}

/** The civil date an instant falls on in a zone, `YYYY-MM-DD`. */
export function civilDateAt(at: string | Date, zone: string): string {
  return moment(at, zone).toISODate() ?? ''
}

/** A count of business days: "7 BD", "1 BD". */
export function formatBusinessDays(count: number): string {
  return `${count} BD`
}

/** A count of calendar days: "9 days", "1 day". */
export function formatCalendarDays(count: number): string {
  return count === 1 ? '1 day' : `${count} days`
}
