import { randomUUID } from 'node:crypto'
import { encode } from 'next-auth/jwt'
import type { Db } from '@/db/client'
import { apiTokens } from '@/db/schema/people'
import { sessionCookieName, sessionSecret } from '@/lib/auth/session-token'
import type { Role } from '@/lib/domain/access'
import type { Context } from '@/lib/services/context'
import { createPersonWithPassword } from '@/lib/services/people'
import { hashOfSecret, newSecret } from '@/lib/services/secrets'

process.env.NEXTAUTH_SECRET ??= 'a secret of the tests alone, of no use elsewhere'

export const testPassword = 'seven switches in a row'

/** A context that may do everything, as the demo's seed has it. */
export function seedContext(db: Db, now = new Date()): Context {
  return { actor: { kind: 'job', name: 'demo' }, db, now, requestId: randomUUID() }
}

/** Makes a person who holds the roles; each call another one. */
export async function addPerson(db: Db, roles: Role[], email = `${randomUUID()}@people.test`) {
  const name = `Test ${roles.join(' ')}`
  const input = { email, name, zone: 'America/Denver', roles, password: testPassword }
  const { id } = await createPersonWithPassword(seedContext(db), input)
  return { id, email, name }
}

/** Makes a person with that role and gives a Bearer token of theirs. */
export async function signedInAs(db: Db, role: Role): Promise<string> {
  const { id } = await addPerson(db, [role])
  return tokenFor(db, id)
}

/** A Bearer token of a person. */
export async function tokenFor(db: Db, personId: string): Promise<string> {
  const secret = newSecret('ls_')
  await db.insert(apiTokens).values({ hash: hashOfSecret(secret), personId, name: 'test' })
  return secret
}

/** A session cookie as sign-in makes it, sealed with the secret of the tests. */
export async function sessionCookie(personId: string, version = 1, signedInAt = new Date()) {
  const token = {
    sub: personId,
    version,
    signedInAt: Math.floor(signedInAt.getTime() / 1000),
  }
  return `${sessionCookieName()}=${await encode({ token, secret: sessionSecret() })}`
}

/** Makes a person with that role and gives a Cookie header of theirs. */
export async function sessionCookieFor(db: Db, role: Role): Promise<string> {
  const { id } = await addPerson(db, [role])
  return sessionCookie(id)
}
