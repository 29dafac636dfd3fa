import { civilOfDate } from '@/lib/client/widget-date'
import { partsOf, type CivilDate } from '@/lib/domain/clocks/civil-date'
import { formatShortDate } from '@/lib/domain/format-date'
import type { ClosedDay } from '@/lib/schemas/calendar-event'

interface Props {
  date: Date
  /** A day of the month shown. */
  month: CivilDate
  closed?: ClosedDay
}

/** The number of a day, and in words who does not count it; a corner where only some do not. */
export function DayHead({ date, month, closed }: Props) {
  const on = civilOfDate(date)
  const outside = on.slice(0, 7) !== month.slice(0, 7)
  const number = outside ? formatShortDate(on, on) : String(partsOf(on).day)
  const words =
    closed &&
    (closed.name ??
      (closed.closed.length > 0 ? `${closed.closed.map(firstWords).join(', ')} closed` : null))
  return (
    <span className="day-head">
      <span className="mono">{number}</span>
      {words && (
        <span className="day-words">
          {closed.all || !closed.name
            ? words
            : `${closed.closed.map(firstWords).join(', ')} closed`}
        </span>
      )}
      {closed && !closed.all && (
        <svg width="14" height="14" viewBox="0 0 14 14" aria-hidden="true" className="day-corner">
          <path d="M0 0H14V14Z" fill="none" stroke="currentColor" />
        </svg>
      )}
    </span>
  )
}

/** `Ambrel Valley Electric` → `Ambrel Valley`: enough to know who, in a narrow cell. */
function firstWords(name: string): string {
  return name.split(' ').slice(0, 2).join(' ')
}
