import { getDb } from '@/db/client'
import { actorOfCalendarSecret } from '@/lib/auth/actor'
import { requestNow } from '@/lib/auth/now'
import type { Context } from '@/lib/services/context'
import { notFound } from '@/lib/services/errors'

const ending = '.ics'

/** Who a private calendar address speaks for. @throws ServiceError `not_found` for any other. */
export async function contextOfCalendarSecret(feed: string, requestId: string): Promise<Context> {
  const db = getDb()
  const secret = feed.endsWith(ending) ? feed.slice(0, -ending.length) : ''
  const actor = secret ? await actorOfCalendarSecret(db, secret) : null
  if (!actor) throw notFound('calendar')
  return { actor, db, now: requestNow(), requestId }
}
