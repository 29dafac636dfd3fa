import { and, desc, eq, isNotNull, isNull, ne, or, sql, type SQL } from 'drizzle-orm'
import { applications, notices, projects } from '@/db/schema/applications'
import { people } from '@/db/schema/people'
import type { Notice, NoticeFilter, NoticePage } from '@/lib/schemas/notice'
import { authorize, type Context } from '@/lib/services/context'

const pageSize = 100

const columns = {
  id: notices.id,
  subject: sql<string>`${notices.body} ->> 'subject'`,
  personName: people.name,
  to: notices.to,
  applicationId: notices.applicationId,
  projectName: projects.name,
  failed: notices.failed,
  attempts: notices.attempts,
  queuedAt: notices.createdAt,
  acceptedAt: notices.acceptedAt,
  refusedAt: notices.refusedAt,
  nextAttemptAt: notices.nextAttemptAt,
}

const inState: Record<Notice['state'], SQL> = {
  sent: isNotNull(notices.acceptedAt),
  waiting: and(isNull(notices.acceptedAt), isNull(notices.failed))!,
  failed: and(isNull(notices.acceptedAt), isNotNull(notices.failed))!,
}

/**
 * What went out, what waits and what failed, newest first. Invitations and resets are shown to
 * administrators and to their addressee only. Never the text: it holds links of one person.
 */
export async function listNotices(ctx: Context, filter: NoticeFilter): Promise<NoticePage> {
  authorize(ctx, 'notice.read')
  const { state, applicationId, before } = filter
  const seen = and(
    visibleTo(ctx),
    applicationId ? eq(notices.applicationId, applicationId) : undefined,
  )
  const rows = await ctx.db
    .select(columns)
    .from(notices)
    .innerJoin(people, eq(people.id, notices.personId))
    .leftJoin(applications, eq(applications.id, notices.applicationId))
    .leftJoin(projects, eq(projects.id, applications.projectId))
    .where(and(seen, state && inState[state], before ? olderThan(before) : undefined))
    .orderBy(desc(notices.createdAt), desc(notices.id))
    .limit(pageSize + 1)
  const items = rows.slice(0, pageSize).map(noticeOf)
  const next = rows.length > pageSize ? items.at(-1)?.id : undefined
  return { items, counts: await countsOf(ctx, seen), next }
}

function visibleTo({ actor }: Context): SQL | undefined {
  if (actor.kind === 'job' || actor.roles.includes('administrator')) return undefined
  return or(ne(notices.subjectKind, 'person'), eq(notices.personId, actor.id))
}

function olderThan(id: string): SQL {
  return sql`(${notices.createdAt}, ${notices.id}) < (
    select edge.created_at, edge.id from notices edge where edge.id = ${id}
  )`
}

async function countsOf(ctx: Context, seen: SQL | undefined): Promise<NoticePage['counts']> {
  const counted = (state: Notice['state']) =>
    sql<number>`(count(*) filter (where ${inState[state]}))::int`
  const [counts] = await ctx.db
    .select({ sent: counted('sent'), waiting: counted('waiting'), failed: counted('failed') })
    .from(notices)
    .where(seen)
  return counts ?? { sent: 0, waiting: 0, failed: 0 }
}

type Row = Omit<Notice, 'state' | 'reason' | 'queuedAt' | 'acceptedAt' | 'nextAttemptAt'> & {
  failed: string | null
  queuedAt: Date
  acceptedAt: Date | null
  refusedAt: Date | null
  nextAttemptAt: Date
}

function noticeOf({ failed, queuedAt, acceptedAt, refusedAt, nextAttemptAt, ...row }: Row): Notice {
  const isOver = acceptedAt !== null || refusedAt !== null
  return {
    ...row,
    state: acceptedAt ? 'sent' : failed ? 'failed' : 'waiting',
    reason: failed,
    queuedAt: queuedAt.toISOString(),
    acceptedAt: acceptedAt?.toISOString() ?? null,
    nextAttemptAt: isOver ? null : nextAttemptAt.toISOString(),
  }
}
