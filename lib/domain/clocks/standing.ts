import type { BusinessCalendar } from '@/lib/domain/clocks/calendar'
import { dayNumber, daysBetween, type CivilDate } from '@/lib/domain/clocks/civil-date'
import type { StepParty } from '@/lib/domain/clocks/procedure'
import type { Status } from '@/lib/domain/clocks/schedule-types'
import { workingDue } from '@/lib/domain/clocks/working-due'
import { localOf } from '@/lib/domain/clocks/zoned'

export type Tone = 'missed' | 'soon' | 'far' | 'theirs' | 'done' | 'none'

export interface Standing {
  state:
    | 'missed'
    | 'theirs_late'
    /** Its clock ran out and the rule presumes an outcome until a person confirms it. */
    | 'presumed'
    | 'running'
    | 'theirs_running'
    | 'undated'
    | 'not_begun'
    | 'stopped'
    | 'done'
    | 'done_late'
    | 'waived'
    | 'closed'
    | 'waiting'
    | 'not_needed'
  tone: Tone
  /** For a table: `2 BD`, `today`, `missed yesterday`, `theirs, 11 BD over`. */
  left: string
  /** Business days to the working due date, negative once it has passed; null without a date. */
  businessDays: number | null
  /** Minutes to the closing hour on the last day, else null. */
  closesInMinutes: number | null
}

export interface Standable {
  status: Status
  party: StepParty
  startOn: CivilDate | null
  dueOn: CivilDate | null
  statedDueOn: CivilDate | null
  dueAt: string | null
  doneLate: boolean | null
  zone: string
  consequence?: { effect: string }
}

/** Within this many business days a clock counts as near. */
const nearBusinessDays = 10

/**
 * How late or near an obligation stands at an instant. Never stored: lateness is decided in the
 * organization's zone at its closing hour, when it is read.
 */
export function standing(item: Standable, nowAt: string, calendar: BusinessCalendar): Standing {
  const settled = settledStanding(item)
  if (settled) return settled
  const today = localOf(nowAt, item.zone).on
  const theirs = item.party !== 'applicant' && item.party !== 'both'
  const dueOn = workingDue(item)
  if (item.startOn && item.startOn > today && !dueOn) return plain('not_begun', 'none', 'not begun')
  if (!dueOn || !item.dueAt) return plain('undated', theirs ? 'theirs' : 'none', 'no date')
  const businessDays = businessDaysTo(calendar, today, dueOn)
  const past = Date.parse(nowAt) > Date.parse(item.dueAt)
  if (past && item.consequence?.effect === 'presumed')
    return {
      state: 'presumed',
      tone: 'theirs',
      left: 'presumed',
      businessDays,
      closesInMinutes: null,
    }
  if (past)
    return {
      state: theirs ? 'theirs_late' : 'missed',
      tone: theirs ? 'theirs' : 'missed',
      left: theirs
        ? `theirs, ${-businessDays} BD over`
        : `missed ${ago(dueOn, today, businessDays)}`,
      businessDays,
      closesInMinutes: null,
    }
  const left = dueOn === today ? 'today' : `${businessDays} BD`
  return {
    state: theirs ? 'theirs_running' : 'running',
    tone: theirs ? 'theirs' : businessDays <= nearBusinessDays ? 'soon' : 'far',
    left: theirs ? `theirs, ${left}` : left,
    businessDays,
    closesInMinutes:
      dueOn === today ? Math.floor((Date.parse(item.dueAt) - Date.parse(nowAt)) / 60_000) : null,
  }
}

/**
 * How near the day stands by which a preparation must begin. A late start is near, never missed:
 * the clock itself still runs.
 */
export function startStanding(
  startBy: CivilDate,
  zone: string,
  nowAt: string,
  calendar: BusinessCalendar,
): Standing {
  const today = localOf(nowAt, zone).on
  const businessDays = businessDaysTo(calendar, today, startBy)
  const late = startBy < today
  const left = late
    ? `${Math.max(1, -businessDays)} BD late`
    : startBy === today
      ? 'today'
      : `${businessDays} BD`
  const tone = businessDays <= nearBusinessDays ? 'soon' : 'far'
  return { state: 'running', tone, left, businessDays, closesInMinutes: null }
}

function settledStanding(item: Standable): Standing | null {
  switch (item.status) {
    case 'done':
      return item.doneLate ? plain('done_late', 'done', 'done late') : plain('done', 'done', 'done')
    case 'waived':
      return plain('waived', 'done', 'waived')
    case 'closed':
      return plain('closed', 'none', 'closed')
    case 'not_needed':
      return plain('not_needed', 'none', 'not needed')
    case 'waiting':
      return plain('waiting', 'none', 'waits')
    case 'stopped':
      return plain('stopped', 'none', 'clock stopped')
    case 'open':
      return null
  }
}

function plain(state: Standing['state'], tone: Tone, left: string): Standing {
  return { state, tone, left, businessDays: null, closesInMinutes: null }
}

function ago(dueOn: CivilDate, today: CivilDate, businessDays: number): string {
  const days = daysBetween(dueOn, today)
  if (days === 0) return 'today'
  return days === 1 ? 'yesterday' : `${Math.max(1, -businessDays)} BD ago`
}

/** Business days after today up to and including the date; negative for a date that has passed. */
export function businessDaysTo(
  calendar: BusinessCalendar,
  today: CivilDate,
  on: CivilDate,
): number {
  const from = dayNumber(today)
  const to = dayNumber(on)
  const step = to >= from ? 1 : -1
  let days = 0
  for (let day = step > 0 ? from + 1 : to + 1; step > 0 ? day <= to : day <= from; day += 1)
    if (calendar.closedOnDay(day) === null) days += 1
  return step > 0 ? days : -days
}
