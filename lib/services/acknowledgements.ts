import { and, eq } from 'drizzle-orm'
import type { Db, Tx } from '@/db/client'
import { acknowledgements, obligations } from '@/db/schema/applications'
import { formatDate } from '@/lib/domain/format-date'
import { nextDateRange, workingDue } from '@/lib/domain/obligations'
import { localOf } from '@/lib/domain/clocks/zoned'
import type { Acknowledgement, AcknowledgementInput } from '@/lib/schemas/notice'
import { recordAudit } from '@/lib/services/audit'
import { authorize, personOf, type Context } from '@/lib/services/context'
import { invalid, notFound, ServiceError } from '@/lib/services/errors'

type ObligationRow = typeof obligations.$inferSelect
export type ObligationRef = Pick<
  AcknowledgementInput,
  'applicationId' | 'step' | 'instance' | 'obligation'
>

/**
 * Records that a person has a clock in hand: no notice about it goes out before the next date. It
 * holds for this due date only; an extension notifies again.
 * @throws ServiceError `not_found`; `conflict` when the clock is closed or its due date has moved;
 * `invalid` for a next date outside the allowed days
 */
export async function acknowledge(
  ctx: Context,
  input: AcknowledgementInput,
): Promise<Acknowledgement> {
  authorize(ctx, 'obligation.acknowledge')
  personOf(ctx)
  return ctx.db.transaction((tx) => recordAcknowledgement(ctx, tx, input))
}

/** The same inside the caller's transaction, for a caller who has authorized it in another way. */
export async function recordAcknowledgement(
  ctx: Context,
  tx: Tx,
  input: AcknowledgementInput,
): Promise<Acknowledgement> {
  const obligation = await findObligation(tx, input)
  if (!obligation) throw notFound('clock')
  const dueOn = dueOfRunning(obligation, input.dueOn)
  checkNextDate(ctx, obligation.zone, dueOn, input.untilOn)
  const { id, applicationId, step, instance, reason, untilOn } = input
  const key = { applicationId, step, instance, obligation: input.obligation }
  const row = { id, ...key, dueOn, reason, untilOn, personId: personOf(ctx).id }
  const added = await tx
    .insert(acknowledgements)
    .values({ ...row, recordedAt: ctx.now })
    .onConflictDoNothing()
    .returning()
  if (added[0]) await note(ctx, tx, row)
  return answerOf(added[0] ?? (await sameBefore(tx, row)))
}

/** The obligation as it stands, or null. */
export async function findObligation(
  db: Db | Tx,
  { applicationId, step, instance, obligation }: ObligationRef,
): Promise<ObligationRow | null> {
  const [row] = await db
    .select()
    .from(obligations)
    .where(
      and(
        eq(obligations.subjectKind, 'application'),
        eq(obligations.subjectId, applicationId),
        eq(obligations.step, step),
        eq(obligations.instance, instance),
        eq(obligations.obligation, obligation),
      ),
    )
  return row ?? null
}

/** The due date it is worked to. @throws ServiceError `conflict` where the person saw another. */
function dueOfRunning(obligation: ObligationRow, seenDueOn: string): string {
  const { title, dueOn } = obligation
  const due = runningDue(obligation)
  if (!due)
    throw new ServiceError(
      'conflict',
      `"${title}" is not running any more: nothing to acknowledge.`,
    )
  if (seenDueOn === due.dueOn || seenDueOn === dueOn) return due.dueOn
  throw new ServiceError(
    'conflict',
    `The due date of "${title}" is now ${formatDate(due.dueOn)}. Look at it again before you acknowledge.`,
  )
}

/** The date an open obligation is worked to; null where it is not running. */
export function runningDue(
  obligation: ObligationRow,
): { dueOn: string; dueAt: string | null } | null {
  if (obligation.status !== 'open') return null
  return workingDue({ ...obligation, dueAt: obligation.dueAt?.toISOString() ?? null })
}

function checkNextDate(ctx: Context, zone: string, dueOn: string, untilOn: string): void {
  const range = nextDateRange(dueOn, localOf(ctx.now.toISOString(), zone).on)
  if (untilOn >= range.from && untilOn <= range.to) return
  const message = `The next date is ${formatDate(untilOn)}; allowed is ${formatDate(range.from)} to ${formatDate(range.to)}.`
  throw invalid([{ path: 'untilOn', message }])
}

type NewRow = Omit<typeof acknowledgements.$inferSelect, 'recordedAt'>

async function note(ctx: Context, tx: Tx, row: NewRow): Promise<void> {
  await recordAudit(ctx, tx, {
    action: 'obligation.acknowledge',
    subjectKind: 'application',
    subjectId: row.applicationId,
    after: row,
  })
}

async function sameBefore(tx: Tx, row: NewRow) {
  const [before] = await tx.select().from(acknowledgements).where(eq(acknowledgements.id, row.id))
  const same = (['applicationId', 'step', 'dueOn', 'personId', 'reason', 'untilOn'] as const).every(
    (field) => before?.[field] === row[field],
  )
  if (before && same) return before
  throw new ServiceError('conflict', 'This acknowledgment was recorded with other contents.')
}

function answerOf({
  recordedAt,
  untilOn,
  ...row
}: typeof acknowledgements.$inferSelect): Acknowledgement {
  return { ...row, untilOn: untilOn!, recordedAt: recordedAt.toISOString() }
}
