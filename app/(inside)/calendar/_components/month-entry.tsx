import Link from 'next/link'
import type { ReactNode } from 'react'
import type { EventProps, EventWrapperProps } from 'react-big-calendar'
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

interface MonthCellProps extends Partial<EventWrapperProps<WidgetEntry>> {
  children?: ReactNode
}

/** The cell that a row of the month has to hold: the widget names its rows, but not their cells. */
export function MonthCell({ children }: MonthCellProps) {
  return <div role="cell">{children}</div>
}
