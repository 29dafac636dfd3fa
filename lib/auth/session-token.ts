import { decode } from 'next-auth/jwt'

/** Seconds a sign-in lasts; it is not prolonged by use. */
export const sessionSeconds = 12 * 60 * 60

/** What a session token says: who, and at which version of that person's sessions. */
export interface SessionToken {
  personId: string
  version: number
}

/** Whether this deployment is reached by https, so that its cookies are secure ones. */
export function isSecureSite(): boolean {
  return (process.env.NEXTAUTH_URL ?? '').startsWith('https://')
}

export function sessionCookieName(): string {
  return `${isSecureSite() ? '__Secure-' : ''}next-auth.session-token`
}

/** The secret that seals session tokens. @throws Error where NEXTAUTH_SECRET is not set. */
export function sessionSecret(): string {
  const secret = process.env.NEXTAUTH_SECRET
  if (!secret) throw new Error('NEXTAUTH_SECRET is not set: no session can be read or made.')
  return secret
}

/** Reads a sealed token; null for anything expired, foreign or torn. */
export async function readSessionToken(sealed: string, now: Date): Promise<SessionToken | null> {
  const token = await decode({ token: sealed, secret: sessionSecret() }).catch(() => null)
  if (!token || typeof token.sub !== 'string') return null
  const { sub, version, signedInAt } = token
  if (typeof version !== 'number' || typeof signedInAt !== 'number') return null
  // The library renews a token whenever its session door is asked; our limit stays.
  if (now.getTime() / 1000 - signedInAt > sessionSeconds) return null
  return { personId: sub, version }
}

/** The session cookie's value in a Cookie header. */
export function sessionCookieOf(cookieHeader: string | null): string | undefined {
  const start = `${sessionCookieName()}=`
  const part = (cookieHeader ?? '').split(/;\s*/).find((cookie) => cookie.startsWith(start))
  return part ? decodeURIComponent(part.slice(start.length)) : undefined
}
