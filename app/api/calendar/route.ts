import { route } from '@/lib/http/route'
import { calendarFilter } from '@/lib/schemas/calendar-event'
import { listCalendarEvents } from '@/lib/services/calendar-events'

export const GET = route({ input: calendarFilter, run: listCalendarEvents })
