import { createHash } from 'node:crypto'
import { and, asc, desc, eq, inArray, ne } from 'drizzle-orm'
import type { Tx } from '@/db/client'
import { applications } from '@/db/schema/applications'
import { exhibitRevisions, exhibits } from '@/db/schema/plant'
import { localOf } from '@/lib/domain/clocks/zoned'
import type { ExhibitData } from '@/lib/domain/exhibits'
import { downloadHeaders } from '@/lib/files/file-name'
import { getFileStore, type OpenedFile } from '@/lib/files/store'
import { enqueue } from '@/lib/queue/enqueue'
import type { CheckExhibitInput, ExhibitRevision, PrepareExhibitInput } from '@/lib/schemas/exhibit'
import { recordAudit } from '@/lib/services/audit'
import { authorize, personOf, type Context } from '@/lib/services/context'
import { notFound, ServiceError } from '@/lib/services/errors'
import { calculationOf, newExhibitData } from '@/lib/services/exhibit-data'
import {
  dataOf,
  groundOf,
  lockedRevision,
  outOfStepOf,
  revisionRowOf,
  revisionRows,
  revisionView,
  type RevisionRow,
} from '@/lib/services/exhibit-reading'
import { isUuid } from '@/lib/services/uuid'

/** How often the worker tries before the failure is shown. */
const renderAttempts = 4

const docxType = 'application/vnd.openxmlformats-officedocument.wordprocessingml.document'

/** Every revision of an application's exhibits, the latest first. @throws ServiceError `not_found`. */
export async function listExhibits(
  ctx: Context,
  applicationId: string,
): Promise<ExhibitRevision[]> {
  authorize(ctx, 'exhibit.read')
  if (!isUuid(applicationId)) throw notFound('application')
  const ground = await groundOf(ctx, ctx.db, applicationId)
  const rows = await revisionRows(ctx.db)
    .where(eq(exhibits.applicationId, applicationId))
    .orderBy(asc(exhibits.letter), desc(exhibitRevisions.no))
  return rows.map((row) => revisionView(ctx, row, ground))
}

/**
 * Prepares the next revision of Exhibit C from a frozen calculation; the worker makes its document.
 * One that was not issued yet is set aside. The same id is the same revision.
 * @throws ServiceError `not_found`, `invalid` for an unknown calculation or a synthetic year
 * without its reason, `conflict` where the id holds another revision.
 */
export async function prepareExhibit(
  ctx: Context,
  applicationId: string,
  input: PrepareExhibitInput,
): Promise<ExhibitRevision> {
  authorize(ctx, 'exhibit.prepare')
  const preparer = personOf(ctx)
  if (!isUuid(applicationId)) throw notFound('application')
  await ctx.db.transaction(async (tx) => {
    const exhibit = await lockedExhibit(tx, applicationId)
    const found = await calculationOf(tx, applicationId, input.calculationNo)
    if (await isPrepared(tx, input, found.calculation.id)) return
    const place = { applicationId, exhibitId: exhibit.id, input, preparer, now: ctx.now }
    const data = await newExhibitData(tx, found, place)
    await setAside(tx, exhibit.id)
    const no = exhibit.lastNo + 1
    await tx.insert(exhibitRevisions).values({
      id: input.id,
      exhibitId: exhibit.id,
      no,
      state: 'draft',
      calculationId: found.calculation.id,
      designRevisionId: found.calculation.designRevisionId,
      data,
      preparedBy: preparer.id,
      preparedAt: ctx.now,
    })
    await tx.update(exhibits).set({ lastNo: no }).where(eq(exhibits.id, exhibit.id))
    await askForDocument(tx, input.id)
    await audited(ctx, tx, 'prepare', input.id, { letter: exhibit.letter, no, ...input })
  })
  return viewOf(ctx, input.id)
}

/** The application's exhibit C, made where there is none, held until the transaction ends. */
async function lockedExhibit(tx: Tx, applicationId: string) {
  const [application] = await tx
    .select({ id: applications.id })
    .from(applications)
    .where(eq(applications.id, applicationId))
  if (!application) throw notFound('application')
  await tx.insert(exhibits).values({ applicationId, letter: 'C' }).onConflictDoNothing()
  const [row] = await tx
    .select()
    .from(exhibits)
    .where(and(eq(exhibits.applicationId, applicationId), eq(exhibits.letter, 'C')))
    .for('update')
  return row!
}

async function isPrepared(
  tx: Tx,
  input: PrepareExhibitInput,
  calculationId: string,
): Promise<boolean> {
  const [known] = await tx.select().from(exhibitRevisions).where(eq(exhibitRevisions.id, input.id))
  if (!known) return false
  const isSame =
    known.calculationId === calculationId && (known.data as ExhibitData).what === input.what
  if (isSame) return true
  throw new ServiceError('conflict', 'This form was sent before for another revision.')
}

/** Revisions that were prepared or checked and never issued give way to the next. */
async function setAside(tx: Tx, exhibitId: string): Promise<void> {
  await tx
    .update(exhibitRevisions)
    .set({ state: 'superseded' })
    .where(
      and(
        eq(exhibitRevisions.exhibitId, exhibitId),
        inArray(exhibitRevisions.state, ['draft', 'checked']),
      ),
    )
}

/** Enqueues the making of a revision's document, inside the caller's transaction. */
export async function askForDocument(tx: Tx, exhibitRevisionId: string): Promise<void> {
  await enqueue(
    tx,
    'renderExhibit',
    { exhibitRevisionId },
    { jobKey: `renderExhibit:${exhibitRevisionId}`, maxAttempts: renderAttempts },
  )
}

/**
 * Signs a draft as checked, by another engineer than its preparer; the document is made once more
 * with that signature, and those bytes are what may be issued.
 * @throws ServiceError `not_found`, `forbidden` for the preparer, `conflict` where it is no draft
 * or its document is not there.
 */
export async function checkExhibit(
  ctx: Context,
  id: string,
  { notes }: CheckExhibitInput,
): Promise<ExhibitRevision> {
  authorize(ctx, 'exhibit.check')
  const checker = personOf(ctx)
  await ctx.db.transaction(async (tx) => {
    const row = await lockedRevision(tx, id)
    assertMayCheck(row, checker.id)
    const data = dataOf(row)
    const on = localOf(ctx.now.toISOString(), data.operator.zone).on
    await tx
      .update(exhibitRevisions)
      .set({
        state: 'checked',
        checkedBy: checker.id,
        checkedAt: ctx.now,
        data: { ...data, checked: { name: checker.name, on }, checkNotes: notes },
        fileSha256: null,
        render: 'waiting',
      })
      .where(eq(exhibitRevisions.id, id))
    await askForDocument(tx, id)
    const draftSha256 = row.revision.fileSha256
    await audited(ctx, tx, 'check', id, { no: row.revision.no, notes, draftSha256 })
  })
  return viewOf(ctx, id)
}

function assertMayCheck({ revision, preparedBy, checkedBy }: RevisionRow, checkerId: string): void {
  const { no, state, render } = revision
  if (preparedBy.id === checkerId)
    throw new ServiceError(
      'forbidden',
      `You prepared revision ${no} yourself; another engineer has to check it.`,
    )
  if (state === 'checked' || state === 'issued')
    throw new ServiceError('conflict', `Revision ${no} was checked already, by ${checkedBy?.name}.`)
  if (state === 'superseded')
    throw new ServiceError('conflict', `Revision ${no} was set aside for a later one.`)
  if (render !== 'done')
    throw new ServiceError(
      'conflict',
      `The document of revision ${no} is not there yet; read it before you sign.`,
    )
}

/**
 * Issues a checked revision: its bytes are frozen under their SHA-256, the one issued before is
 * superseded.
 * @throws ServiceError `not_found`, `conflict` where it is not checked, out of step, or its document
 * is not there, `unavailable` where the store does not hold the bytes.
 */
export async function issueExhibit(ctx: Context, id: string): Promise<ExhibitRevision> {
  authorize(ctx, 'exhibit.issue')
  const issuer = personOf(ctx)
  await ctx.db.transaction(async (tx) => {
    const row = await lockedRevision(tx, id)
    const { exhibit, revision } = row
    assertChecked(row)
    const outOfStep = outOfStepOf(ctx, row, await groundOf(ctx, tx, exhibit.applicationId))
    if (outOfStep)
      throw new ServiceError(
        'conflict',
        `Revision ${revision.no} is out of step: ${outOfStep}. Nothing was issued; prepare the next revision from a calculation of the present design.`,
      )
    await assertIntact(row)
    await tx
      .update(exhibitRevisions)
      .set({ state: 'issued', issuedBy: issuer.id, issuedAt: ctx.now })
      .where(eq(exhibitRevisions.id, id))
    await supersedeOthers(tx, exhibit.id, id)
    const { no, fileSha256 } = revision
    await audited(ctx, tx, 'issue', id, { letter: exhibit.letter, no, fileSha256 })
  })
  return viewOf(ctx, id)
}

function assertChecked({ revision, issuedBy }: RevisionRow): void {
  const { no, state, render } = revision
  const refuse = (words: string) => {
    throw new ServiceError('conflict', `${words} Nothing was issued.`)
  }
  if (state === 'issued') refuse(`Revision ${no} was issued already, by ${issuedBy?.name}.`)
  if (state === 'superseded') refuse(`Revision ${no} gave way to a later one.`)
  if (state === 'draft') refuse(`Revision ${no} is a draft; another engineer checks it first.`)
  if (render !== 'done')
    refuse(`The document of revision ${no} with the checker’s name is not made yet.`)
}

async function supersedeOthers(tx: Tx, exhibitId: string, issuedId: string): Promise<void> {
  await tx
    .update(exhibitRevisions)
    .set({ state: 'superseded' })
    .where(
      and(
        eq(exhibitRevisions.exhibitId, exhibitId),
        eq(exhibitRevisions.state, 'issued'),
        ne(exhibitRevisions.id, issuedId),
      ),
    )
}

/**
 * The DOCX of a revision as a download.
 * @throws ServiceError `not_found`, `conflict` while it is not made, `unavailable` where the store
 * does not hold the bytes.
 */
export async function downloadExhibit(ctx: Context, id: string): Promise<Response> {
  authorize(ctx, 'exhibit.read')
  const row = await revisionRowOf(ctx.db, id)
  const { stream, size } = await openDocument(row)
  const { project } = dataOf(row)
  const draft = row.revision.state === 'draft' ? ', draft' : ''
  const name = `${project.name}, exhibit ${row.exhibit.letter}, revision ${row.revision.no}${draft}.docx`
  return new Response(stream, { headers: downloadHeaders({ name, type: docxType, size }) })
}

/** Reads the bytes that are about to be frozen against their hash. */
async function assertIntact(row: RevisionRow): Promise<void> {
  const { stream } = await openDocument(row)
  const hash = createHash('sha256')
  for await (const chunk of stream) hash.update(chunk)
  if (hash.digest('hex') === row.revision.fileSha256) return
  throw new ServiceError(
    'unavailable',
    'The stored document does not match its SHA-256; nothing was issued. Prepare the next revision.',
  )
}

async function openDocument({ revision }: RevisionRow): Promise<OpenedFile> {
  if (!revision.fileSha256)
    throw new ServiceError(
      'conflict',
      revision.render === 'failed'
        ? `The document could not be made: ${revision.renderError}`
        : 'The document is still being made; ask again in a moment.',
    )
  const opened = await getFileStore().open(revision.fileSha256)
  if (opened) return opened
  throw new ServiceError('unavailable', 'The document is recorded, but the store does not hold it.')
}

/** A revision as it stands now. @throws ServiceError `not_found`. */
export async function getExhibitRevision(ctx: Context, id: string): Promise<ExhibitRevision> {
  authorize(ctx, 'exhibit.read')
  return viewOf(ctx, id)
}

async function viewOf(ctx: Context, id: string): Promise<ExhibitRevision> {
  const row = await revisionRowOf(ctx.db, id)
  return revisionView(ctx, row, await groundOf(ctx, ctx.db, row.exhibit.applicationId))
}

function audited(ctx: Context, tx: Tx, verb: string, subjectId: string, after: object) {
  const action = `exhibit.${verb}`
  return recordAudit(ctx, tx, { action, subjectKind: 'exhibit_revision', subjectId, after })
}
