import { and, eq, getTableColumns, notInArray, sql } from 'drizzle-orm'
import { applicationStates, obligations } from '@/db/schema/applications'
import { procedureRevisions } from '@/db/schema/organizations'
import type { Tx } from '@/db/client'
import { effectiveFacts, type Fact } from '@/lib/domain/clocks/facts'
import type { ProcedureBody } from '@/lib/domain/clocks/procedure'
import { schedule } from '@/lib/domain/clocks/schedule'
import type { Schedule, ScheduledItem } from '@/lib/domain/clocks/schedule-types'
import { factOf, factRowsOf } from '@/lib/services/fact-rows'
import { partiesOfOne } from '@/lib/services/parties'

type ObligationRow = typeof obligations.$inferInsert

export interface Computed {
  schedule: Schedule
  body: ProcedureBody
  procedureRevisionId: string
  facts: Fact[]
}

/** The revision that the facts pin: the last one named wins. */
export function pinnedRevision(facts: readonly Fact[]): string | null {
  const pins = effectiveFacts(facts).flatMap((fact) => fact.body.procedureRevisionId ?? [])
  return pins.at(-1) ?? null
}

/** What the facts of an application say, computed afresh. */
export async function computeSchedule(tx: Tx, applicationId: string): Promise<Computed> {
  const facts = (await factRowsOf(tx, applicationId)).map(factOf)
  const procedureRevisionId = pinnedRevision(facts)
  if (!procedureRevisionId) throw new Error(`Application ${applicationId} pins no procedure.`)
  const [revision] = await tx
    .select({ body: procedureRevisions.body })
    .from(procedureRevisions)
    .where(eq(procedureRevisions.id, procedureRevisionId))
  if (!revision) throw new Error(`Procedure revision ${procedureRevisionId} is missing.`)
  const parties = await partiesOfOne(tx, applicationId)
  return {
    schedule: schedule(revision.body, parties, facts),
    body: revision.body,
    procedureRevisionId,
    facts,
  }
}

/**
 * Rewrites the projection of an application from its facts, in the caller's transaction.
 * Obligations keep their row by natural key, so that what hangs on them stays.
 */
export async function rewriteProjection(
  tx: Tx,
  applicationId: string,
  seq: number,
): Promise<Computed> {
  const computed = await computeSchedule(tx, applicationId)
  const rows = obligationRows(applicationId, seq, computed.schedule.items)
  const kept = rows.length > 0 ? await upsertObligations(tx, rows) : []
  await tx
    .delete(obligations)
    .where(
      and(
        eq(obligations.subjectKind, 'application'),
        eq(obligations.subjectId, applicationId),
        kept.length > 0 ? notInArray(obligations.id, kept) : undefined,
      ),
    )
  const state = {
    applicationId,
    terms: computed.schedule.terms,
    procedureRevisionId: computed.procedureRevisionId,
    standing: computed.schedule.standing,
    stage: computed.schedule.stage,
    stranded: computed.schedule.stranded,
    atSeq: seq,
  }
  await tx
    .insert(applicationStates)
    .values(state)
    .onConflictDoUpdate({ target: applicationStates.applicationId, set: state })
  return computed
}

/** The rows that a schedule becomes; exported so that a test can compare them with the table. */
export function obligationRows(
  applicationId: string,
  seq: number,
  items: readonly ScheduledItem[],
): ObligationRow[] {
  return items.map((item) => ({
    ...item,
    subjectKind: 'application' as const,
    subjectId: applicationId,
    applicationId,
    dueAt: item.dueAt ? new Date(item.dueAt) : null,
    atSeq: seq,
  }))
}

async function upsertObligations(tx: Tx, rows: ObligationRow[]): Promise<string[]> {
  const { id: _id, ...columns } = getTableColumns(obligations)
  const excluded = Object.fromEntries(
    Object.keys(columns).map((name) => [name, sql.raw(`excluded.${snake(name)}`)]),
  )
  const saved = await tx
    .insert(obligations)
    .values(rows)
    .onConflictDoUpdate({
      target: [
        obligations.subjectKind,
        obligations.subjectId,
        obligations.step,
        obligations.instance,
        obligations.obligation,
      ],
      set: excluded,
    })
    .returning({ id: obligations.id })
  return saved.map((row) => row.id)
}

function snake(name: string): string {
  return name.replace(/[A-Z]/g, (letter) => `_${letter.toLowerCase()}`)
}
