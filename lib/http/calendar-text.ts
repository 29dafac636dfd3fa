import ical, { ICalCalendarMethod } from 'ical-generator'
import type { FeedEvent } from '@/lib/services/calendar-feed'

/**
 * iCalendar (RFC 5545) of the entries: whole days, because a civil date has no zone. `addressOf`
 * gives the page of an application.
 */
export function calendarText(
  events: readonly FeedEvent[],
  now: Date,
  addressOf: (applicationId: string) => string,
): string {
  const calendar = ical({
    name: 'Lineside clocks',
    method: ICalCalendarMethod.PUBLISH,
    prodId: { company: 'Lineside', product: 'Clocks', language: 'EN' },
    ttl: 60 * 60,
  })
  for (const event of events)
    calendar.createEvent({
      id: event.uid,
      start: event.on,
      end: event.untilOn,
      allDay: true,
      floating: true,
      stamp: now,
      summary: event.summary,
      description: event.description,
      url: addressOf(event.applicationId),
    })
  return calendar.toString()
}
