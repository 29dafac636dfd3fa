import Link from 'next/link'
import type { EventProps } from 'react-big-calendar'
import type { WidgetEntry } from '@/app/(inside)/calendar/_components/calendar-view'
import { Contact } from '@/app/(inside)/calendar/_components/contact'
import { entryWords } from '@/components/calendar/entry-words'
import { civilOfDate } from '@/lib/client/widget-date'
import type { CivilDate } from '@/lib/domain/clocks/civil-date'
import { formatDate } from '@/lib/domain/format-date'
import { routes } from '@/lib/routes'

/** A line of the agenda: what, for which request, and how it stands. */
export function AgendaEntry({ event: { event } }: EventProps<WidgetEntry>) {
  return (
    <Link
      href={routes.clock(event.applicationId, event.step, event.instance)}
      className="flex gap-2"
      onClick={(click) => click.stopPropagation()}
    >
      <Contact event={event} />
      <span>
        <span className="block font-medium">{entryWords(event)}</span>
        <span className="text-ink-2 text-th block">
          {event.organization} · {event.requestNo ?? 'not filed'} · {event.standing.left}
        </span>
      </span>
    </Link>
  )
}

/** The day of an agenda line; the year only where it is not this one. */
export function AgendaDate({ day, todayOn }: { day: Date; todayOn: CivilDate }) {
  return <span className="mono">{formatDate(civilOfDate(day), todayOn)}</span>
}
