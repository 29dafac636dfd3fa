import Link from 'next/link'
import type { EventProps } from 'react-big-calendar'
import type { WidgetEntry } from '@/app/(inside)/calendar/_components/calendar-view'
import { Contact } from '@/app/(inside)/calendar/_components/contact'
import { entryWords } from '@/components/calendar/entry-words'
import { routes } from '@/lib/routes'

/** An entry is ink text with its contact; a real link, so that the keyboard reaches it. */
export function MonthEntry({ event: { event } }: EventProps<WidgetEntry>) {
  return (
    <Link
      href={routes.clock(event.applicationId, event.step, event.instance)}
      className="flex gap-1.5"
      onClick={(click) => click.stopPropagation()}
    >
      {event.entry !== 'open' && <Contact event={event} />}
      <span>{entryWords(event)}</span>
    </Link>
  )
}
