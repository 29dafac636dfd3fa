import { route } from '@/lib/http/route'
import { api } from '@/lib/routes'
import {
  endCalendarAddress,
  getCalendarAddress,
  makeCalendarAddress,
} from '@/lib/services/calendar-feed'

export const GET = route({ run: (ctx) => getCalendarAddress(ctx) })
export const DELETE = route({ run: (ctx) => endCalendarAddress(ctx) })
export const POST = route({
  status: 201,
  run: async (ctx) => {
    const { secret } = await makeCalendarAddress(ctx)
    return { made: true, address: `${process.env.NEXTAUTH_URL ?? ''}${api.calendarFeed(secret)}` }
  },
})
