import { randomUUID } from 'node:crypto'
import { contextOfCalendarSecret } from '@/lib/auth/calendar-context'
import { calendarText } from '@/lib/http/calendar-text'
import { problemResponse } from '@/lib/http/problem'
import { routes } from '@/lib/routes'
import { readCalendarFeed } from '@/lib/services/calendar-feed'

/** The private calendar: the secret in the address says whose it is, no session is asked for. */
export async function GET(
  _request: Request,
  { params }: { params: Promise<{ feed: string }> },
): Promise<Response> {
  const requestId = randomUUID()
  try {
    const ctx = await contextOfCalendarSecret((await params).feed, requestId)
    const base = process.env.NEXTAUTH_URL ?? ''
    const addressOf = (id: string) => `${base}${routes.application(id, 'clocks')}`
    return new Response(calendarText(await readCalendarFeed(ctx), ctx.now, addressOf), {
      headers: {
        'content-type': 'text/calendar; charset=utf-8',
        'cache-control': 'private, no-store',
        'x-content-type-options': 'nosniff',
      },
    })
  } catch (error) {
    return problemResponse(error, requestId)
  }
}
