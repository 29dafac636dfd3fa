import { DateTime } from 'luxon'
import type { CivilDate } from '@/lib/domain/clocks/civil-date'

/** The civil date and local `HH:MM:SS` of an instant in a zone. */
export function localOf(at: string, zone: string): { on: CivilDate; time: string } {
  const local = DateTime.fromISO(at, { zone })
  if (!local.isValid) throw new RangeError(`"${at}" in zone "${zone}" is no instant.`)
  return { on: local.toFormat('yyyy-MM-dd'), time: local.toFormat('HH:mm:ss') }
}

/**
 * The last instant of a due date: the closing hour, or the end of the day without one, which is
 * the next midnight.
 *
 * A closing hour that a daylight-saving change skips moves forward with the clock; one that
 * occurs twice is the first.
 */
export function closingInstant(on: CivilDate, closesAt: string | null, zone: string): string {
  const key = `${on} ${closesAt} ${zone}`
  const known = closings.get(key)
  if (known) return known
  const day = DateTime.fromISO(on, { zone })
  const end = closesAt
    ? DateTime.fromISO(`${on}T${closesAt}:00`, { zone })
    : day.plus({ days: 1 }).startOf('day')
  if (!end.isValid)
    throw new RangeError(`"${on}" at "${closesAt}" in zone "${zone}" is no instant.`)
  const made = end.toUTC().toISO()
  if (closings.size >= mostClosings) closings.clear()
  closings.set(key, made)
  return made
}

// Asking a zone for its offset is most of the time of a schedule, and requests share their days.
const closings = new Map<string, string>()
const mostClosings = 20_000

/** The instant of a local date and `HH:MM` in a zone. */
export function instantOf(on: CivilDate, time: string, zone: string): string {
  return closingInstant(on, time, zone)
}
