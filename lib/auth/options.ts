import { randomUUID } from 'node:crypto'
import type { NextAuthOptions } from 'next-auth'
import Credentials from 'next-auth/providers/credentials'
import { getDb } from '@/db/client'
import { requestNow } from '@/lib/auth/now'
import { isSecureSite, sessionSeconds, sessionSecret } from '@/lib/auth/session-token'
import { routes } from '@/lib/routes'
import { credentialsInput } from '@/lib/schemas/person'
import { log } from '@/lib/services/log'
import { signIn } from '@/lib/services/sign-in'

const credentials = Credentials({
  credentials: { email: { type: 'email' }, password: { type: 'password' } },
  async authorize(sent) {
    const pair = credentialsInput.safeParse(sent)
    if (!pair.success) return null
    const visit = { db: getDb(), now: requestNow(), requestId: randomUUID() }
    return signIn(visit, pair.data)
  },
})

/**
 * How a person signs in: an address with a password, then a sealed cookie that holds only who and
 * at which session version. What that person may do is read from the database at each request.
 */
export function authOptions(): NextAuthOptions {
  return {
    secret: sessionSecret(),
    session: { strategy: 'jwt', maxAge: sessionSeconds },
    useSecureCookies: isSecureSite(),
    pages: { signIn: routes.signIn(), error: routes.signIn() },
    providers: [credentials],
    callbacks: { jwt: keepOnlyWho, session: tellOnlyWho },
    logger: {
      error: (code) => log.warn({ code }, 'sign-in library'),
      warn: () => undefined,
      debug: () => undefined,
    },
  }
}

type Callbacks = Required<NonNullable<NextAuthOptions['callbacks']>>

const keepOnlyWho: Callbacks['jwt'] = ({ token, user }) => {
  if (!user) return token
  const version = 'version' in user ? user.version : undefined
  return { sub: user.id, version, signedInAt: Math.floor(requestNow().getTime() / 1000) }
}

// The library's session door names nobody: names and roles come from /api/me, checked anew.
const tellOnlyWho: Callbacks['session'] = ({ session }) => ({ expires: session.expires })
