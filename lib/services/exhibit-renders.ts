import { and, eq, ne } from 'drizzle-orm'
import type { Tx } from '@/db/client'
import { people, personRoles } from '@/db/schema/people'
import { exhibitRevisions } from '@/db/schema/plant'
import { exhibitTitles, type ExhibitLetter, type ExhibitSource } from '@/lib/domain/exhibits'
import { routes } from '@/lib/routes'
import type { ExhibitRevision } from '@/lib/schemas/exhibit'
import { recordAudit } from '@/lib/services/audit'
import { authorize, type Context } from '@/lib/services/context'
import { ServiceError } from '@/lib/services/errors'
import {
  dataOf,
  lockedRevision,
  revisionRowOf,
  revisionRows,
  sourceOf,
  type RevisionRow,
} from '@/lib/services/exhibit-reading'
import { askForDocument, getExhibitRevision } from '@/lib/services/exhibits'
import { keepFile } from '@/lib/services/files'
import { hashOfInput } from '@/lib/services/input-hash'
import { queueNotices, siteUrl } from '@/lib/services/notices'
import { exhibitToCheck } from '@/templates/notices/exhibit-to-check'

export interface RenderInput {
  source: ExhibitSource
  /** The issued revision that the marks of change compare with. */
  previous: ExhibitSource | null
  /** Given back with the document: one made of what has changed meanwhile is dropped. */
  ticket: string
}

/** What a revision's document is made of; null where none is waited for. */
export async function findRenderInput(ctx: Context, id: string): Promise<RenderInput | null> {
  authorize(ctx, 'job.run')
  const [row] = await revisionRows(ctx.db).where(eq(exhibitRevisions.id, id))
  if (!row || !isAwaited(row)) return null
  const { comparedWithId } = dataOf(row)
  const previous = comparedWithId ? await revisionRowOf(ctx.db, comparedWithId) : null
  return { source: sourceOf(row), previous: previous && sourceOf(previous), ticket: ticketOf(row) }
}

/** One that was set aside needs no document any more. */
const isAwaited = ({ revision }: RevisionRow) =>
  revision.render !== 'done' && revision.state !== 'superseded'

const ticketOf = (row: RevisionRow) => hashOfInput(row.revision.data)

/**
 * Keeps a document and asks the other engineers to check a draft. Twice is once: the same revision
 * gives the same bytes.
 * @returns false where the revision has changed since, or has its document already
 */
export async function settleRender(
  ctx: Context,
  id: string,
  { ticket, bytes }: { ticket: string; bytes: Uint8Array },
): Promise<boolean> {
  authorize(ctx, 'job.run')
  const { exhibit, revision } = await revisionRowOf(ctx.db, id)
  const name = `exhibit-${exhibit.letter}-${revision.no}.docx`
  const kept = await keepFile(ctx, bytes, name, { action: 'job.run' })
  return ctx.db.transaction(async (tx) => {
    const row = await lockedRevision(tx, id)
    if (!isAwaited(row) || ticketOf(row) !== ticket) return false
    await tx
      .update(exhibitRevisions)
      .set({ fileSha256: kept.sha256, render: 'done', renderError: null })
      .where(eq(exhibitRevisions.id, id))
    if (row.revision.state === 'draft') await askForCheck(ctx, tx, row)
    return true
  })
}

/** Says in words why no document could be made; it can be asked for again. */
export async function failRender(
  ctx: Context,
  id: string,
  { ticket, reason }: { ticket: string; reason: string },
): Promise<void> {
  authorize(ctx, 'job.run')
  await ctx.db.transaction(async (tx) => {
    const row = await lockedRevision(tx, id)
    if (!isAwaited(row) || ticketOf(row) !== ticket) return
    await tx
      .update(exhibitRevisions)
      .set({ render: 'failed', renderError: reason.slice(0, 500) })
      .where(eq(exhibitRevisions.id, id))
  })
}

/**
 * Asks the worker once more for a document that failed or never came.
 * @throws ServiceError `not_found`, `conflict` where the document is there.
 */
export async function makeDocumentAgain(ctx: Context, id: string): Promise<ExhibitRevision> {
  authorize(ctx, 'exhibit.prepare')
  await ctx.db.transaction(async (tx) => {
    const row = await lockedRevision(tx, id)
    if (row.revision.state === 'superseded')
      throw new ServiceError('conflict', `Revision ${row.revision.no} gave way to a later one.`)
    if (!isAwaited(row))
      throw new ServiceError('conflict', 'The document is there; making it again gives the same.')
    await tx
      .update(exhibitRevisions)
      .set({ render: 'waiting', renderError: null })
      .where(eq(exhibitRevisions.id, id))
    await askForDocument(tx, id)
    await recordAudit(ctx, tx, {
      action: 'exhibit.make_again',
      subjectKind: 'exhibit_revision',
      subjectId: id,
    })
  })
  return getExhibitRevision(ctx, id)
}

/**
 * Asks for every document that is waited for; called when a worker starts. A job whose worker was
 * killed stays locked for hours: its key frees it.
 * @returns how many
 */
export async function requeueRenders(ctx: Context): Promise<number> {
  authorize(ctx, 'job.run')
  return ctx.db.transaction(async (tx) => {
    const waiting = await tx
      .select({ id: exhibitRevisions.id })
      .from(exhibitRevisions)
      .where(and(eq(exhibitRevisions.render, 'waiting'), ne(exhibitRevisions.state, 'superseded')))
    for (const { id } of waiting) await askForDocument(tx, id)
    return waiting.length
  })
}

async function askForCheck(ctx: Context, tx: Tx, row: RevisionRow): Promise<void> {
  const { exhibit, revision, preparedBy } = row
  const engineers = await tx
    .select({ id: people.id, name: people.name, email: people.email })
    .from(people)
    .innerJoin(personRoles, eq(personRoles.personId, people.id))
    .where(
      and(
        eq(personRoles.role, 'engineer'),
        eq(people.active, true),
        ne(people.id, revision.preparedBy),
      ),
    )
  const { project, requestNo, what } = dataOf(row)
  const about = {
    letter: exhibit.letter,
    title: exhibitTitles[exhibit.letter as ExhibitLetter],
    revisionNo: revision.no,
    projectName: project.name,
    requestNo,
    preparedBy: preparedBy.name,
    what,
    url: siteUrl(routes.application(exhibit.applicationId, 'exhibits')),
  }
  await queueNotices(
    ctx,
    tx,
    engineers.map((person) => ({
      subjectKind: 'exhibit' as const,
      subjectKey: revision.id,
      applicationId: exhibit.applicationId,
      rung: 'to_check',
      personId: person.id,
      to: person.email,
      body: exhibitToCheck({ ...about, personName: person.name }),
    })),
  )
}
