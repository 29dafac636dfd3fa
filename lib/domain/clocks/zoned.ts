import { DateTime, IANAZone } from 'luxon'
import { addDays, type CivilDate } from '@/lib/domain/clocks/civil-date'

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
  const made = closesAt
    ? localInstant(on, closesAt, zone)
    : localInstant(addDays(on, 1), '00:00', zone)
  if (closings.size >= mostClosings) closings.clear()
  closings.set(key, made)
  return made
}

// Asking a zone for its offset is most of the time of a schedule, and requests share their days.
const closings = new Map<string, string>()
const mostClosings = 20_000

/**
 * The first instant that reads so on the clocks of the zone, by the offsets of the day before and
 * the day after. The library's own reading of a local hour that comes twice goes by today's
 * offset, and would change with the season in which it is asked.
 */
function localInstant(on: CivilDate, time: string, zone: string): string {
  const iana = IANAZone.create(zone)
  const wall = Date.parse(`${on}T${time}:00Z`)
  if (!iana.isValid || Number.isNaN(wall))
    throw new RangeError(`"${on}" at "${time}" in zone "${zone}" is no instant.`)
  const readings = [-dayMs, dayMs]
    .map((away) => iana.offset(wall + away) * 60_000)
    .map((offsetMs) => ({ at: wall - offsetMs, offsetMs }))
  const real = readings.filter(({ at, offsetMs }) => iana.offset(at) * 60_000 === offsetMs)
  const at = real.length > 0 ? Math.min(...real.map((one) => one.at)) : readings[0]!.at
  return new Date(at).toISOString()
}

const dayMs = 86_400_000

/** The instant of a local date and `HH:MM` in a zone. */
export function instantOf(on: CivilDate, time: string, zone: string): string {
  return closingInstant(on, time, zone)
}
