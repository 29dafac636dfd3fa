import { formatHour } from '@/lib/domain/format-date'
import type { CalendarEvent } from '@/lib/schemas/calendar-event'

/** An entry in words: `Cold Spring Road: Cure the deficiency, round 2, 4:30 pm ET`. */
export function entryWords(event: CalendarEvent): string {
  const round = event.instance > 1 ? `, round ${event.instance}` : ''
  if (event.entry === 'open') return `still open: ${event.project}`
  if (event.entry === 'start_by') return `${event.project}: start, ${lower(event.title)}`
  const hour = event.hasHour && event.dueAt ? `, ${formatHour(event.dueAt, event.zone)}` : ''
  const state =
    event.standing.state === 'missed'
      ? ', missed'
      : event.standing.state === 'theirs_late'
        ? ', late'
        : ''
  const provisional = event.provisional ? ' (provisional)' : ''
  return `${event.project}: ${lower(event.title)}${round}${state}${hour}${provisional}`
}

function lower(title: string): string {
  return title.charAt(0).toLowerCase() + title.slice(1)
}
