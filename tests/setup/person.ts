import { randomUUID } from 'node:crypto'
import { getDb } from '@/db/client'
import { apiTokens, people, personRoles } from '@/db/schema/people'
import type { Role } from '@/lib/domain/access'
import type { Context, PersonActor } from '@/lib/services/context'
import { hashOfSecret, newSecret } from '@/lib/services/secrets'

export interface SignedPerson {
  actor: PersonActor
  /** Headers of a request of this person, by an API token. */
  headers: Record<string, string>
  /** A context of this person; `now` is the present unless given. */
  ctx: (now?: Date) => Context
}

/** An active person of an invented company with these roles, and an API token. */
export async function createSignedPerson(roles: Role[]): Promise<SignedPerson> {
  const db = getDb()
  const id = randomUUID()
  const name = `Test ${roles.join(' and ')}`
  const zone = 'America/Denver'
  await db.insert(people).values({ id, name, zone, email: `${id}@demo.test` })
  await db.insert(personRoles).values(roles.map((role) => ({ personId: id, role })))
  const secret = newSecret('test_')
  await db.insert(apiTokens).values({ hash: hashOfSecret(secret), personId: id, name: 'test' })
  const actor: PersonActor = { kind: 'person', id, name, roles, zone }
  return {
    actor,
    headers: { authorization: `Bearer ${secret}` },
    ctx: (now = new Date()) => ({ actor, db: getDb(), now, requestId: randomUUID() }),
  }
}
