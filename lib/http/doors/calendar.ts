import type { Door } from '@/lib/http/door'
import {
  calendarAddressSchema,
  calendarFilter,
  calendarSchema,
  newCalendarAddressSchema,
} from '@/lib/schemas/calendar-event'

export const calendarDoors: Door[] = [
  {
    method: 'get',
    path: '/api/calendar',
    summary: 'What is owed between two days, and the days organizations do not count',
    action: 'calendar.read',
    input: calendarFilter,
    output: calendarSchema,
  },
  {
    method: 'get',
    path: '/api/calendar/{secret}.ics',
    summary: 'The private calendar behind a secret address',
    action: null,
    outputType: 'text/calendar',
  },
  {
    method: 'get',
    path: '/api/me/calendar-address',
    summary: 'Whether you have a private calendar address',
    action: 'calendar.feed',
    output: calendarAddressSchema,
  },
  {
    method: 'post',
    path: '/api/me/calendar-address',
    summary: 'Make a new private calendar address; an earlier one stops working',
    action: 'calendar.feed',
    output: newCalendarAddressSchema,
    status: 201,
  },
  {
    method: 'delete',
    path: '/api/me/calendar-address',
    summary: 'End the private calendar address',
    action: 'calendar.feed',
  },
]
