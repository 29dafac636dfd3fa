import { randomUUID } from 'node:crypto'
import { getDb } from '@/db/client'
import { networkAddressOf } from '@/lib/auth/network-address'
import { requestNow } from '@/lib/auth/now'
import { sessionCookieName } from '@/lib/auth/session-token'
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
  const db = getDb()
  try {
    const email = emailIn(request.headers.get('content-type') ?? '', await bodyOf(request))
    const limits = signInLimits(email, networkAddressOf(request))
    await takeTry(db, limits, requestNow())
    const response = await proceed()
    if (startsSession(response)) await forgiveTry(db, limits)
    return response
  } catch (error) {
    return problemResponse(error, randomUUID())
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
