import { federalCalendar } from '@/lib/domain/clocks/library-calendars'
import type { CivilDate } from '@/lib/domain/clocks/civil-date'
import { localOf } from '@/lib/domain/clocks/zoned'
import { isOurs } from '@/lib/domain/notices'
import type { StepParty } from '@/lib/domain/clocks/procedure'

/** The morning digest: one e-mail a business day of what a person holds. Common practice, no source. */

const fromHour = '07:00:00'
/** A worker that was away all morning does not send yesterday's news in the evening. */
const toHour = '12:00:00'
const nearBusinessDays = 10

export type DigestGroup = 'missed' | 'near' | 'theirs_late'

/** The day whose digest is due now for a person of this zone, or null. */
export function digestDay(now: Date, zone: string): CivilDate | null {
  const { on, time } = localOf(now.toISOString(), zone)
  if (time < fromHour || time >= toHour) return null
  return federalCalendar.closedBecause(on) === null ? on : null
}

interface DigestedClock {
  party: StepParty
  isPast: boolean
  /** To the working due date; negative once it has passed. */
  businessDays: number
}

/** Under which heading a clock stands; null where it is far, or theirs and in time. */
export function digestGroup({ party, isPast, businessDays }: DigestedClock): DigestGroup | null {
  if (!isOurs(party)) return isPast ? 'theirs_late' : null
  if (isPast) return 'missed'
  return businessDays <= nearBusinessDays ? 'near' : null
}
