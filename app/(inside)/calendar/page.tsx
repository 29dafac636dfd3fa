import type { Metadata } from 'next'
import { CalendarLoader } from '@/app/(inside)/calendar/_components/calendar-loader'
import { pageContext } from '@/lib/auth/page-person'
import { isCivilDate } from '@/lib/domain/clocks/civil-date'
import { localOf } from '@/lib/domain/clocks/zoned'
import { calendarRange } from '@/lib/client/calendar'
import { calendarSides, type CalendarFilter } from '@/lib/schemas/calendar-event'
import { listCalendarEvents } from '@/lib/services/calendar-events'

export const metadata: Metadata = { title: 'Calendar' }

interface Props {
  searchParams: Promise<Record<string, string | string[] | undefined>>
}

/** Clocks, bookings and start-by days of every application; the filter stands in the address. */
export default async function CalendarPage({ searchParams }: Props) {
  const ctx = await pageContext()
  const query = await searchParams
  const todayOn = localOf(ctx.now.toISOString(), ctx.actor.zone).on
  const on = typeof query.on === 'string' && isCivilDate(query.on) ? query.on : todayOn
  const side = calendarSides.find((one) => one === query.side)
  const organizations = typeof query.organizations === 'string' ? query.organizations : undefined
  const filter: CalendarFilter = { ...calendarRange(on), organizations, side }
  const answer = await listCalendarEvents(ctx, filter)
  const view = query.view === 'agenda' || query.view === 'month' ? query.view : null
  return <CalendarLoader on={on} view={view} filter={filter} answer={answer} />
}
