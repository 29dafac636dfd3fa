import { asc, eq, inArray } from 'drizzle-orm'
import { facts } from '@/db/schema/applications'
import type { Db, Tx } from '@/db/client'
import type { Fact } from '@/lib/domain/clocks/facts'

export type FactRow = typeof facts.$inferSelect

/** A stored fact as the pure rules see it. */
export function factOf(row: FactRow): Fact {
  return {
    id: row.id,
    seq: row.seq,
    kind: row.kind,
    instance: row.instance,
    body: row.body,
    recordedAt: row.recordedAt.toISOString(),
    ...known({
      step: row.step,
      obligation: row.obligation,
      sentOn: row.sentOn,
      sentAt: row.sentAt?.toISOString(),
      receivedOn: row.receivedOn,
      receivedAt: row.receivedAt?.toISOString(),
      dueOn: row.dueOn,
      dueAt: row.dueAt?.toISOString(),
      channel: row.channel,
      outcome: row.outcome,
      amountMinor: row.amountMinor,
      replacesId: row.replacesId,
      reason: row.reason,
    }),
  }
}

type Known<T> = { [K in keyof T]?: NonNullable<T[K]> }

function known<T extends object>(fields: T): Known<T> {
  const entries = Object.entries(fields).filter(
    ([, value]) => value !== null && value !== undefined,
  )
  return Object.fromEntries(entries) as Known<T>
}

/** All facts of an application, in order. */
export async function factRowsOf(db: Db | Tx, applicationId: string): Promise<FactRow[]> {
  return db
    .select()
    .from(facts)
    .where(eq(facts.applicationId, applicationId))
    .orderBy(asc(facts.seq))
}

/** All facts of several applications, in order, by application. */
export async function factsByApplication(
  db: Db | Tx,
  applicationIds: string[],
): Promise<Map<string, Fact[]>> {
  const result = new Map<string, Fact[]>(applicationIds.map((id) => [id, []]))
  if (applicationIds.length === 0) return result
  const rows = await db
    .select()
    .from(facts)
    .where(inArray(facts.applicationId, applicationIds))
    .orderBy(asc(facts.seq))
  for (const row of rows) result.get(row.applicationId!)?.push(factOf(row))
  return result
}
