import { getDb } from '@/db/client'
import { actorOfApiToken, actorOfSession } from '@/lib/auth/actor'
import { requestNow } from '@/lib/auth/now'
import { refuseForeignOrigin } from '@/lib/auth/same-origin'
import { sessionCookieOf } from '@/lib/auth/session-token'
import type { Context } from '@/lib/services/context'
import { ServiceError } from '@/lib/services/errors'

const bearer = /^Bearer\s+(\S+)$/i

/**
 * Who acts in this request: the person of its Bearer token or of its session cookie, read from the
 * database anew. A cookie changes nothing when another site sent the request.
 * @throws ServiceError `unsigned`, `forbidden`
 */
export async function contextOf(request: Request, requestId: string): Promise<Context> {
  const db = getDb()
  const now = requestNow()
  const authorization = request.headers.get('authorization')
  if (authorization) {
    const secret = bearer.exec(authorization)?.[1]
    const actor = secret ? await actorOfApiToken(db, secret, now) : null
    if (!actor) throw new ServiceError('unsigned', 'This API token is not valid, or was revoked.')
    return { actor, db, now, requestId }
  }
  const sealed = sessionCookieOf(request.headers.get('cookie'))
  const actor = sealed ? await actorOfSession(db, sealed, now) : null
  if (!actor) {
    const message = sealed ? 'Your session has ended.' : 'Nobody is signed in.'
    throw new ServiceError('unsigned', message)
  }
  refuseForeignOrigin(request)
  return { actor, db, now, requestId }
}
