import { and, desc, eq, ilike, inArray, isNull, or, sql, type SQL } from 'drizzle-orm'
import { alias } from 'drizzle-orm/pg-core'
import type { Db } from '@/db/client'
import { applications, facts, obligations, projects } from '@/db/schema/applications'
import { entries, entryApplications, factEvidence } from '@/db/schema/correspondence'
import { organizations } from '@/db/schema/organizations'
import { people } from '@/db/schema/people'
import { entryIsVisible } from '@/lib/domain/access'
import { localOf } from '@/lib/domain/clocks/zoned'
import type { Entry } from '@/lib/schemas/entry'
import type { Context } from '@/lib/services/context'
import { listFileLinks } from '@/lib/services/files'

type EntryRow = typeof entries.$inferSelect

interface Chain {
  /** The entry's revisions, itself first. */
  ids: string[]
  root: string
}

/** The condition that no later revision took the entry's place. */
export function isLatest(): SQL {
  return sql`not exists (select 1 from entries later where later.revises_id = ${entries.id})`
}

/** The entry concerns this application. */
export function concerns(applicationId: string): SQL {
  return sql`exists (select 1 from entry_applications concerned
    where concerned.entry_id = ${entries.id} and concerned.application_id = ${applicationId})`
}

/** The words stand in subject, text or parties, whatever their case. */
export function holdsWords(words: string): SQL | undefined {
  const pattern = `%${words.replace(/[\\%_]/g, '\\$&')}%`
  return or(
    ilike(entries.subject, pattern),
    ilike(entries.text, pattern),
    ilike(entries.parties, pattern),
  )
}

/** First revision of an entry. */
export async function rootOf(db: Pick<Db, 'execute'>, id: string): Promise<string | undefined> {
  return (await chainsOf(db, [id])).get(id)?.root
}

/** Rows as answers, newest first by when they happened; what the actor may not see is left out. */
export async function readEntries(ctx: Context, where: SQL, limit: number): Promise<Entry[]> {
  const rows = await ctx.db
    .select({ entry: entries, organization: organizations.name, by: people.name })
    .from(entries)
    .leftJoin(organizations, eq(organizations.id, entries.organizationId))
    .leftJoin(people, eq(people.id, entries.recordedBy))
    .where(where)
    .orderBy(desc(entries.at), desc(entries.id))
    .limit(limit)
  const visible = rows.filter((row) => isVisibleTo(ctx, row.entry))
  const ids = visible.map((row) => row.entry.id)
  if (ids.length === 0) return []
  const chains = await chainsOf(ctx.db, ids)
  const [concerned, files, evidence, answers] = await Promise.all([
    applicationsOf(ctx.db, ids),
    listFileLinks(ctx, 'entry', ids),
    evidenceOf(ctx.db, chains),
    answersTo(
      ctx.db,
      [...chains.values()].map((chain) => chain.root),
    ),
  ])
  return visible.map(({ entry, organization, by }) => {
    const chain = chains.get(entry.id) ?? { ids: [entry.id], root: entry.id }
    const held = files.get(entry.id) ?? { links: [], closed: 0 }
    const settledBy = entry.replyOwedBy === 'us' ? 'out' : 'in'
    return {
      ...fieldsOf(entry),
      organization:
        entry.organizationId && organization
          ? { id: entry.organizationId, name: organization }
          : null,
      recordedBy: by,
      revisions: chain.ids.length - 1,
      applications: concerned.get(entry.id) ?? [],
      attachments: held.links,
      closedAttachments: held.closed,
      evidenceOf: evidence.get(entry.id) ?? [],
      replySettled: answers.some((a) => a.answersId === chain.root && a.direction === settledBy),
    }
  })
}

function isVisibleTo(ctx: Context, entry: EntryRow): boolean {
  return ctx.actor.kind === 'job' || entryIsVisible(ctx.actor.roles, entry)
}

function fieldsOf(entry: EntryRow) {
  const local = localOf(entry.at.toISOString(), entry.zone)
  return {
    id: entry.id,
    revisesId: entry.revisesId,
    at: entry.at.toISOString(),
    zone: entry.zone,
    on: local.on,
    time: local.time.slice(0, 5),
    channel: entry.channel,
    direction: entry.direction,
    visibility: entry.visibility,
    parties: entry.parties,
    subject: entry.subject,
    text: entry.text,
    messageId: entry.messageId,
    replyOwedBy: entry.replyOwedBy,
    replyOwedOn: entry.replyOwedOn,
    answersId: entry.answersId,
    recordedAt: entry.recordedAt.toISOString(),
  }
}

async function chainsOf(
  db: Pick<Db, 'execute'>,
  ids: readonly string[],
): Promise<Map<string, Chain>> {
  const { rows } = await db.execute<{ latest: string; id: string }>(sql`
    with recursive chain(latest, id, revises_id, depth) as (
      select id, id, revises_id, 0 from entries where id in ${[...ids]}
      union all
      select chain.latest, entries.id, entries.revises_id, chain.depth + 1
      from chain join entries on entries.id = chain.revises_id
    )
    select latest, id from chain order by depth`)
  const chains = new Map<string, Chain>()
  for (const { latest, id } of rows) {
    const chain = chains.get(latest) ?? { ids: [], root: id }
    chains.set(latest, { ids: [...chain.ids, id], root: id })
  }
  return chains
}

async function applicationsOf(db: Db, ids: string[]): Promise<Map<string, Entry['applications']>> {
  const rows = await db
    .select({
      entryId: entryApplications.entryId,
      applicationId: entryApplications.applicationId,
      projectName: projects.name,
      step: entryApplications.step,
      instance: entryApplications.instance,
    })
    .from(entryApplications)
    .innerJoin(applications, eq(applications.id, entryApplications.applicationId))
    .innerJoin(projects, eq(projects.id, applications.projectId))
    .where(inArray(entryApplications.entryId, ids))
    .orderBy(projects.name)
  return grouped(rows, ({ entryId, ...rest }) => [entryId, rest])
}

async function evidenceOf(
  db: Db,
  chains: ReadonlyMap<string, Chain>,
): Promise<Map<string, Entry['evidenceOf']>> {
  const latestOf = new Map<string, string>()
  for (const [latest, chain] of chains) for (const id of chain.ids) latestOf.set(id, latest)
  const rows = await db
    .select({
      entryId: factEvidence.entryId,
      factId: facts.id,
      applicationId: facts.applicationId,
      kind: facts.kind,
      title: sql<string | null>`coalesce(${obligations.title}, ${facts.step})`,
      instance: facts.instance,
      outcome: facts.outcome,
    })
    .from(factEvidence)
    .innerJoin(facts, eq(facts.id, factEvidence.factId))
    .leftJoin(
      obligations,
      and(
        eq(obligations.subjectKind, 'application'),
        eq(obligations.applicationId, facts.applicationId),
        eq(obligations.step, facts.step),
        eq(obligations.instance, facts.instance),
        sql`${obligations.obligation} = coalesce(${facts.obligation}, '')`,
      ),
    )
    .where(inArray(factEvidence.entryId, [...latestOf.keys()]))
    .orderBy(facts.recordedAt, facts.seq)
  return grouped(rows, ({ entryId, ...rest }) => [latestOf.get(entryId ?? '') ?? '', rest])
}

async function answersTo(db: Db, roots: string[]) {
  const later = alias(entries, 'later_answer')
  return db
    .select({ answersId: entries.answersId, direction: entries.direction })
    .from(entries)
    .leftJoin(later, eq(later.revisesId, entries.id))
    .where(and(inArray(entries.answersId, roots), isNull(later.id)))
}

function grouped<Row, Value>(
  rows: readonly Row[],
  split: (row: Row) => [string, Value],
): Map<string, Value[]> {
  const result = new Map<string, Value[]>()
  for (const row of rows) {
    const [key, value] = split(row)
    result.set(key, [...(result.get(key) ?? []), value])
  }
  return result
}
