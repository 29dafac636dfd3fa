import { and, eq, isNull, lt, or, sql } from 'drizzle-orm'
import type { Db } from '@/db/client'
import { apiTokens, people } from '@/db/schema/people'
import { readSessionToken } from '@/lib/auth/session-token'
import type { Role } from '@/lib/domain/access'
import type { PersonActor } from '@/lib/services/context'
import { hashOfSecret } from '@/lib/services/secrets'

// Raw "people.id": the builder leaves the table out, and a subquery may have an id of its own.
const actorColumns = {
  id: people.id,
  name: people.name,
  zone: people.zone,
  version: people.sessionVersion,
  roles: sql<Role[]>`array(
    select held.role from person_roles held where held.person_id = people.id order by held.role
  )`,
}

const lastUseGrainMs = 60_000

/** The active person a session cookie speaks for; null where it speaks for nobody any more. */
export async function actorOfSession(
  db: Db,
  sealed: string,
  now: Date,
): Promise<PersonActor | null> {
  const token = await readSessionToken(sealed, now)
  if (!token) return null
  const [row] = await db
    .select(actorColumns)
    .from(people)
    .where(and(eq(people.id, token.personId), eq(people.active, true)))
  return row && row.version === token.version ? actorOf(row) : null
}

/** The active person an API token speaks for; notes when it was last used, to the minute. */
export async function actorOfApiToken(
  db: Db,
  secret: string,
  now: Date,
): Promise<PersonActor | null> {
  const hash = hashOfSecret(secret)
  const [row] = await db
    .select(actorColumns)
    .from(apiTokens)
    .innerJoin(people, eq(people.id, apiTokens.personId))
    .where(and(eq(apiTokens.hash, hash), isNull(apiTokens.revokedAt), eq(people.active, true)))
  if (!row) return null
  await noteUse(db, hash, now)
  return actorOf(row)
}

/** The active person whose private calendar address this is; null where it is nobody's. */
export async function actorOfCalendarSecret(db: Db, secret: string): Promise<PersonActor | null> {
  const [row] = await db
    .select(actorColumns)
    .from(people)
    .where(and(eq(people.calendarSecretHash, hashOfSecret(secret)), eq(people.active, true)))
  return row ? actorOf(row) : null
}

async function noteUse(db: Db, hash: string, now: Date): Promise<void> {
  const before = new Date(now.getTime() - lastUseGrainMs)
  await db
    .update(apiTokens)
    .set({ lastUsedAt: now })
    .where(
      and(
        eq(apiTokens.hash, hash),
        or(isNull(apiTokens.lastUsedAt), lt(apiTokens.lastUsedAt, before)),
      ),
    )
}

function actorOf(row: Omit<PersonActor, 'kind'>): PersonActor {
  return { kind: 'person', id: row.id, name: row.name, roles: row.roles, zone: row.zone }
}
