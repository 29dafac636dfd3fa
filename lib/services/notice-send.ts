import { and, asc, eq, inArray, isNull, lte, or, sql } from 'drizzle-orm'
import { notices } from '@/db/schema/applications'
import { pauseAfterAttempt, type Delivery, type Mailer } from '@/lib/domain/delivery'
import { authorize, type Context } from '@/lib/services/context'

/** How long a row belongs to the worker that took it; longer than a delivery may take. */
export const leaseSeconds = 60

export interface SendResult {
  taken: number
  accepted: number
  /** No server answered: going on at once would be in vain. */
  unreachable: boolean
}

type NoticeRow = typeof notices.$inferSelect

/**
 * Takes as many due notices as the mailer has connections and hands them over side by side. Each
 * row is leased, so that two workers never send the same one; a worker that dies leaves its rows
 * to the next once the lease is over. Call again while `taken` is above 0.
 */
export async function sendNotices(
  ctx: Context,
  { mailer }: { mailer: Mailer },
): Promise<SendResult> {
  authorize(ctx, 'notice.send')
  const rows = await takeDue(ctx, mailer.connections)
  const outcomes = await Promise.all(rows.map((row) => sendOne(ctx, mailer, row)))
  return {
    taken: rows.length,
    accepted: outcomes.filter((one) => one.outcome === 'accepted').length,
    unreachable: outcomes.some((one) => one.outcome === 'unreachable'),
  }
}

function takeDue(ctx: Context, limit: number): Promise<NoticeRow[]> {
  return ctx.db.transaction(async (tx) => {
    const due = await tx
      .select({ id: notices.id })
      .from(notices)
      .where(
        and(
          isNull(notices.acceptedAt),
          isNull(notices.refusedAt),
          lte(notices.nextAttemptAt, ctx.now),
          or(isNull(notices.leaseUntil), lte(notices.leaseUntil, ctx.now)),
        ),
      )
      .orderBy(asc(notices.nextAttemptAt), asc(notices.createdAt))
      .limit(limit)
      .for('update', { skipLocked: true })
    if (due.length === 0) return []
    const ids = due.map((row) => row.id)
    return tx
      .update(notices)
      .set({ leaseUntil: secondsAfter(ctx.now, leaseSeconds) })
      .where(inArray(notices.id, ids))
      .returning()
  })
}

async function sendOne(ctx: Context, mailer: Mailer, row: NoticeRow): Promise<Delivery> {
  const message = { to: row.to, messageId: row.messageId, ...row.body }
  const delivery = await mailer.deliver(message, () => markAccepted(ctx, row))
  if (delivery.outcome !== 'accepted') await markFailed(ctx, row, delivery)
  return delivery
}

/** Links of one person (acknowledge, invitation, reset) leave our copy once they are delivered. */
const withoutSecrets = sql`regexp_replace(
  ${notices.body}::text, '/(acknowledge|welcome|reset)/[A-Za-z0-9_%-]+', '/\\1/…', 'g'
)::jsonb`

async function markAccepted(ctx: Context, row: NoticeRow): Promise<void> {
  await ctx.db
    .update(notices)
    .set({
      acceptedAt: ctx.now,
      attempts: row.attempts + 1,
      leaseUntil: null,
      failed: null,
      body: withoutSecrets,
    })
    .where(and(eq(notices.id, row.id), isNull(notices.acceptedAt)))
}

async function markFailed(
  ctx: Context,
  row: NoticeRow,
  { outcome, reason }: Exclude<Delivery, { outcome: 'accepted' }>,
): Promise<void> {
  const attempts = row.attempts + 1
  await ctx.db
    .update(notices)
    .set({
      attempts,
      leaseUntil: null,
      failed: reason,
      nextAttemptAt: secondsAfter(ctx.now, pauseAfterAttempt(attempts)),
      ...(outcome === 'refused' && { refusedAt: ctx.now, body: withoutSecrets }),
    })
    .where(and(eq(notices.id, row.id), isNull(notices.acceptedAt)))
}

function secondsAfter(at: Date, seconds: number): Date {
  return new Date(at.getTime() + seconds * 1000)
}
