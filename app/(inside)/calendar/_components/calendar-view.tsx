'use client'

import { useQuery } from '@tanstack/react-query'
import { DateTime } from 'luxon'
import { useRouter } from 'next/navigation'
import { useMemo, useSyncExternalStore } from 'react'
import { Calendar, luxonLocalizer, type CalendarProps, type View } from 'react-big-calendar'
import { AgendaDate, AgendaEntry } from '@/app/(inside)/calendar/_components/agenda-entry'
import { CalendarTools } from '@/app/(inside)/calendar/_components/calendar-tools'
import { DayHead } from '@/app/(inside)/calendar/_components/day-head'
import { MonthCell, MonthEntry } from '@/app/(inside)/calendar/_components/month-entry'
import { agendaDays, calendarEvents } from '@/lib/client/calendar'
import { dateOfCivil, civilOfDate } from '@/lib/client/widget-date'
import type { CivilDate } from '@/lib/domain/clocks/civil-date'
import { routes } from '@/lib/routes'
import type { CalendarAnswer, CalendarEvent, CalendarFilter } from '@/lib/schemas/calendar-event'
import 'react-big-calendar/lib/css/react-big-calendar.css'
import '@/app/(inside)/calendar/calendar.css'

export interface CalendarViewProps {
  on: CivilDate
  /** Null: month on a wide screen, agenda on a phone. */
  view: 'month' | 'agenda' | null
  filter: CalendarFilter
  answer: CalendarAnswer
}

export interface WidgetEntry {
  event: CalendarEvent
  start: Date
  end: Date
  title: string
}

const localizer = luxonLocalizer(DateTime, { firstDayOfWeek: 7 })
const phone = '(max-width: 640px)'

function usePhone(): boolean {
  return useSyncExternalStore(
    (changed) => {
      const media = window.matchMedia(phone)
      media.addEventListener('change', changed)
      return () => media.removeEventListener('change', changed)
    },
    () => window.matchMedia(phone).matches,
    () => false,
  )
}

/** Month and agenda of clocks; days that organizations do not count are hatched or ticked. */
export function CalendarView({ on, view, filter, answer }: CalendarViewProps) {
  const router = useRouter()
  const isPhone = usePhone()
  const { data } = useQuery(calendarEvents(filter, answer))
  const shown: View = view ?? (isPhone ? 'agenda' : 'month')
  const entries = useMemo(() => (data ?? answer).events.map(widgetEntry), [data, answer])
  const closed = useMemo(
    () => new Map((data ?? answer).closedDays.map((day) => [day.on, day])),
    [data, answer],
  )
  const go = (change: { on?: CivilDate; view?: string }) =>
    router.push(
      routes.calendar({
        on: change.on ?? on,
        view: change.view ?? view,
        organizations: filter.organizations,
        side: filter.side,
      }),
      { scroll: false },
    )
  const components = useMemo<CalendarProps<WidgetEntry>['components']>(
    () => ({
      month: {
        event: MonthEntry,
        dateHeader: ({ date }) => (
          <DayHead date={date} month={on} closed={closed.get(civilOfDate(date))} />
        ),
      },
      eventWrapper: MonthCell,
      agenda: {
        event: AgendaEntry,
        date: ({ day }: { day: Date }) => <AgendaDate day={day} todayOn={answer.todayOn} />,
      },
    }),
    [closed, on, answer.todayOn],
  )
  return (
    <>
      <CalendarTools
        on={on}
        todayOn={answer.todayOn}
        shown={shown === 'agenda' ? 'agenda' : 'month'}
        filter={filter}
        organizations={answer.organizations}
      />
      <div className="lineside-calendar" data-view={shown}>
        <Calendar<WidgetEntry>
          localizer={localizer}
          events={entries}
          date={dateOfCivil(on)}
          view={shown}
          views={['month', 'agenda']}
          onNavigate={(date) => go({ on: civilOfDate(date) })}
          onView={(next) => go({ view: next })}
          onSelectEvent={({ event }) =>
            router.push(routes.clock(event.applicationId, event.step, event.instance))
          }
          toolbar={false}
          showAllEvents
          length={agendaDays}
          getNow={() => dateOfCivil(answer.todayOn)}
          dayPropGetter={(date) => ({ className: dayClass(closed.get(civilOfDate(date))) })}
          eventPropGetter={({ event }) => ({ className: `entry-${event.standing.tone}` })}
          components={components}
          messages={{
            noEventsInRange:
              'Nothing is dated in these days. Choose another month or show all organizations.',
          }}
        />
      </div>
      <p className="text-ink-2 text-th mt-3">
        Hatched: no shown organization counts the day. Corner: some do not. Round: ours. Square:
        theirs. Bar: a gate.
      </p>
    </>
  )
}

function dayClass(day: CalendarAnswer['closedDays'][number] | undefined): string | undefined {
  if (!day) return undefined
  return day.all ? 'day-closed' : 'day-partly-closed'
}

function widgetEntry(event: CalendarEvent): WidgetEntry {
  const start = dateOfCivil(event.on)
  return { event, start, end: start, title: `${event.project}: ${event.title}` }
}
