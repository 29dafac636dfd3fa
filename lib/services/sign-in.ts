import { eq } from 'drizzle-orm'
import type { Db } from '@/db/client'
import { audit, people } from '@/db/schema/people'
import { passwordFits } from '@/lib/services/passwords'

export interface SignedIn {
  id: string
  version: number
}

/**
 * The person whom this pair opens for; null for a wrong pair, an unknown address, a disabled person
 * and one who has not accepted the invitation, all at the same cost in time.
 */
export async function signIn(
  visit: { db: Db; now: Date; requestId: string },
  pair: { email: string; password: string },
): Promise<SignedIn | null> {
  const [person] = await visit.db.select().from(people).where(eq(people.email, pair.email))
  const fits = await passwordFits(person?.passwordHash, pair.password)
  if (!person || !fits || !person.active) return null
  await visit.db.insert(audit).values({
    at: visit.now,
    requestId: visit.requestId,
    actorId: person.id,
    actorName: person.name,
    action: 'session.start',
    subjectKind: 'person',
    subjectId: person.id,
  })
  return { id: person.id, version: person.sessionVersion }
}
