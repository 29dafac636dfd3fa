import { queryOptions } from '@tanstack/react-query'
import { z } from 'zod'
import { call } from '@/lib/client/fetcher'
import { addDays, civilDate, partsOf, type CivilDate } from '@/lib/domain/clocks/civil-date'
import { api } from '@/lib/routes'
import {
  calendarAddressSchema,
  calendarSchema,
  newCalendarAddressSchema,
  type CalendarAnswer,
  type CalendarFilter,
} from '@/lib/schemas/calendar-event'

/** Days the agenda shows from its first day. */
export const agendaDays = 60

/** The days a page of the calendar needs: the month's weeks, and the agenda from the same day. */
export function calendarRange(on: CivilDate): { from: CivilDate; to: CivilDate } {
  const { year, month } = partsOf(on)
  return { from: addDays(civilDate(year, month, 1), -7), to: addDays(on, agendaDays + 8) }
}

export const calendarKeys = { events: (filter: CalendarFilter) => ['calendar', filter] as const }

/** What is owed in a range; `initial` is what the page was drawn with. */
export function calendarEvents(filter: CalendarFilter, initial?: CalendarAnswer) {
  return queryOptions({
    queryKey: calendarKeys.events(filter),
    queryFn: ({ signal }) => call(api.calendarEvents({ ...filter }), calendarSchema, { signal }),
    initialData: initial,
  })
}

export const calendarAddress = () =>
  queryOptions({
    queryKey: ['calendar-address'],
    queryFn: () => call(api.calendarAddress(), calendarAddressSchema),
  })

/** Makes the private address anew; the answer is the only time it is shown. */
export function makeCalendarAddress() {
  return call(api.calendarAddress(), newCalendarAddressSchema, { method: 'POST' })
}

/** Ends the private address. */
export function endCalendarAddress() {
  return call(api.calendarAddress(), z.unknown(), { method: 'DELETE' })
}
