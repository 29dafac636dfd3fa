import { randomUUID } from 'node:crypto'
import type { Tx } from '@/db/client'
import { notices } from '@/db/schema/applications'
import { enqueue } from '@/lib/queue/enqueue'
import type { Context } from '@/lib/services/context'

export interface NoticeBody {
  subject: string
  html: string
  text: string
}

export interface QueuedNotice {
  subjectKind: 'obligation' | 'person' | 'exhibit'
  /** What it is about: an obligation's key, a person's id, an exhibit revision's id. */
  subjectKey: string
  applicationId?: string | null
  /** Civil date; left out where nothing is due. */
  dueOn?: string | null
  /**
   * Which of several notices about the subject. The same (subject, due date, rung, person) is
   * queued once and for all: what may go out again (a second reset) needs a rung of its own.
   */
  rung: string
  personId: string
  to: string
  body: NoticeBody
  /** SHA-256, hex, of the secret in the acknowledge link. */
  ackSecretHash?: string
}

/**
 * An address of ours as it stands in an e-mail. From the configuration, never from a request: a
 * forged Host header must not write our e-mail.
 */
export function siteUrl(path: string): string {
  return new URL(path, process.env.NEXTAUTH_URL ?? 'http://127.0.0.1:3000').href
}

/** Ends the Message-ID of every notice. */
const messageIdDomain = 'notices.lineside'

/**
 * Puts notices into the outbox inside the caller's transaction and nudges the sender; one that is
 * there already stays as it is. The caller has authorized what the notices follow from.
 * @returns how many were new
 */
export async function queueNotices(
  ctx: Context,
  tx: Tx,
  queued: readonly QueuedNotice[],
): Promise<number> {
  if (queued.length === 0) return 0
  const rows = queued.map((notice) => rowOf(ctx, notice))
  const added = await tx
    .insert(notices)
    .values(rows)
    .onConflictDoNothing()
    .returning({ id: notices.id })
  if (added.length > 0) await enqueue(tx, 'sendNotices', {}, { jobKey: 'sendNotices' })
  return added.length
}

/** Puts one notice into the outbox. @returns whether it was new */
export async function queueNotice(ctx: Context, tx: Tx, queued: QueuedNotice): Promise<boolean> {
  return (await queueNotices(ctx, tx, [queued])) === 1
}

function rowOf(ctx: Context, notice: QueuedNotice): typeof notices.$inferInsert {
  const id = randomUUID()
  return {
    ...notice,
    id,
    applicationId: notice.applicationId ?? null,
    dueOn: notice.dueOn ?? '',
    nextAttemptAt: ctx.now,
    createdAt: ctx.now,
    // Fixed with the row, so that a repeat after a kill is known as the same message.
    messageId: `<${id}@${messageIdDomain}>`,
  }
}
