import { randomUUID } from 'node:crypto'
import { sessionCookieName } from '@/lib/auth/session-token'
import { visitOf } from '@/lib/auth/visit-of'
import { problemResponse } from '@/lib/http/problem'
import { ServiceError } from '@/lib/services/errors'
import { forgiveTry, signInLimits, takeTry } from '@/lib/services/limiter'

const bodyLimitBytes = 10_000

/**
 * Counts a try of sign-in before the library sees it, which would answer 401 to whatever stops it
 * inside; a success gives the try back.
 */
export async function limitSignIn(
  request: Request,
  proceed: () => Promise<Response>,
): Promise<Response> {
  const requestId = randomUUID()
  try {
    const { db, now, network } = visitOf(request, requestId)
    const email = emailIn(request.headers.get('content-type') ?? '', await bodyOf(request))
    const limits = signInLimits(email, network)
    await takeTry(db, limits, now)
    const response = await proceed()
    if (startsSession(response)) await forgiveTry(db, limits)
    return response
  } catch (error) {
    return problemResponse(error, requestId)
  }
}

async function bodyOf(request: Request): Promise<string> {
  const declared = Number(request.headers.get('content-length') ?? 0)
  const text = declared > bodyLimitBytes ? undefined : await request.clone().text()
  if (text !== undefined && text.length <= bodyLimitBytes) return text
  throw new ServiceError('too_large', `A sign-in has at most ${bodyLimitBytes} bytes.`)
}

function emailIn(contentType: string, body: string): string {
  const sent = contentType.includes('json')
    ? emailOfJson(body)
    : new URLSearchParams(body).get('email')
  return (sent ?? '').trim().toLowerCase().slice(0, 254)
}

function emailOfJson(body: string): string | null {
  try {
    const { email } = JSON.parse(body) as { email?: unknown }
    return typeof email === 'string' ? email : null
  } catch {
    return null
  }
}

function startsSession(response: Response): boolean {
  return response.headers
    .getSetCookie()
    .some((cookie) => cookie.startsWith(`${sessionCookieName()}=`) && !/=;/.test(cookie))
}
