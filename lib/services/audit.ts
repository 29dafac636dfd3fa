import { audit } from '@/db/schema/people'
import type { Tx } from '@/db/client'
import { actorId, type Context } from '@/lib/services/context'

interface AuditRow {
  action: string
  subjectKind: string
  subjectId: string
  before?: unknown
  after?: unknown
}

/** Writes who did what, inside the caller's transaction. */
export async function recordAudit(ctx: Context, tx: Tx, row: AuditRow): Promise<void> {
  await tx.insert(audit).values({
    at: ctx.now,
    requestId: ctx.requestId,
    actorId: actorId(ctx),
    actorName: ctx.actor.name,
    ...row,
  })
}
