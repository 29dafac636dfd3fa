import { desc, eq } from 'drizzle-orm'
import type { Db, Tx } from '@/db/client'
import { projects } from '@/db/schema/applications'
import { people } from '@/db/schema/people'
import { designRevisions, designs, weather } from '@/db/schema/plant'
import type { DesignBody, DesignRevision, DesignRevisionInput } from '@/lib/schemas/design'
import { recordAudit } from '@/lib/services/audit'
import { actorId, authorize, type Context } from '@/lib/services/context'
import { invalid, notFound, ServiceError } from '@/lib/services/errors'
import { hashOfInput } from '@/lib/services/input-hash'
import { isUuid } from '@/lib/services/uuid'

/** A project's design revisions, the latest first. @throws ServiceError `not_found`. */
export async function listDesignRevisions(
  ctx: Context,
  projectId: string,
): Promise<DesignRevision[]> {
  authorize(ctx, 'design.read')
  if (!isUuid(projectId)) throw notFound('project')
  const [project] = await ctx.db.select().from(projects).where(eq(projects.id, projectId))
  if (!project) throw notFound('project')
  const rows = await revisionRows(ctx.db)
    .where(eq(designs.projectId, projectId))
    .orderBy(desc(designRevisions.no))
  return rows.map(viewOf)
}

/** One revision. @throws ServiceError `not_found`. */
export async function getDesignRevision(ctx: Context, id: string): Promise<DesignRevision> {
  authorize(ctx, 'design.read')
  const [row] = isUuid(id) ? await revisionRows(ctx.db).where(eq(designRevisions.id, id)) : []
  if (!row) throw notFound('design revision')
  return viewOf(row)
}

/**
 * Adds a revision to a project's design; earlier ones stay as they are. The client's id makes a
 * second submit the same revision.
 * @throws ServiceError `not_found` for the project, `invalid` for an unknown weather year,
 * `conflict` where a later revision than `baseNo` is there, or the id holds another revision.
 */
export async function reviseDesign(
  ctx: Context,
  projectId: string,
  input: DesignRevisionInput,
): Promise<DesignRevision> {
  authorize(ctx, 'design.write')
  if (!isUuid(projectId)) throw notFound('project')
  await ctx.db.transaction(async (tx) => {
    const design = await lockedDesign(tx, projectId)
    if (await isRecorded(tx, design.id, input)) return
    await checkBase(tx, design, input)
    await addRevision(ctx, tx, design, input)
  })
  return getDesignRevision(ctx, input.id)
}

type DesignRow = typeof designs.$inferSelect

/** The project's design, made where there is none, locked so that two writers come one by one. */
async function lockedDesign(tx: Tx, projectId: string): Promise<DesignRow> {
  const [project] = await tx.select().from(projects).where(eq(projects.id, projectId))
  if (!project) throw notFound('project')
  await tx.insert(designs).values({ projectId }).onConflictDoNothing()
  const [row] = await tx
    .select()
    .from(designs)
    .where(eq(designs.projectId, projectId))
    .for('update')
  return row!
}

async function isRecorded(tx: Tx, designId: string, input: DesignRevisionInput): Promise<boolean> {
  const [known] = await tx.select().from(designRevisions).where(eq(designRevisions.id, input.id))
  if (!known) return false
  const same =
    known.designId === designId &&
    hashOfInput([known.body, known.weatherId, known.note]) ===
      hashOfInput([input.body, input.weatherId ?? null, input.note ?? null])
  if (same) return true
  throw new ServiceError('conflict', 'This form was saved before with another design.')
}

async function checkBase(tx: Tx, design: DesignRow, input: DesignRevisionInput): Promise<void> {
  if (design.lastNo !== input.baseNo) throw await staleDesign(tx, design, input.baseNo)
  if (!input.weatherId) return
  const [known] = await tx
    .select({ id: weather.id })
    .from(weather)
    .where(eq(weather.id, input.weatherId))
  if (!known) throw invalid([{ path: 'weatherId', message: 'There is no such weather year.' }])
}

async function staleDesign(tx: Tx, design: DesignRow, baseNo: number): Promise<ServiceError> {
  const [latest] = await revisionRows(tx)
    .where(eq(designRevisions.designId, design.id))
    .orderBy(desc(designRevisions.no))
    .limit(1)
  const who = latest?.name ?? 'somebody'
  return new ServiceError(
    'conflict',
    `You started from ${baseNo === 0 ? 'no revision' : `revision ${baseNo}`}; ${who} saved revision ${design.lastNo} since. Nothing was saved: look at revision ${design.lastNo} first.`,
  )
}

async function addRevision(
  ctx: Context,
  tx: Tx,
  design: DesignRow,
  input: DesignRevisionInput,
): Promise<void> {
  const no = design.lastNo + 1
  const [before] = await tx
    .select({ protection: designRevisions.protection, metering: designRevisions.metering })
    .from(designRevisions)
    .where(eq(designRevisions.designId, design.id))
    .orderBy(desc(designRevisions.no))
    .limit(1)
  await tx.insert(designRevisions).values({
    id: input.id,
    designId: design.id,
    no,
    body: input.body,
    ...before,
    weatherId: input.weatherId ?? null,
    note: input.note ?? null,
    recordedAt: ctx.now,
    recordedBy: actorId(ctx),
  })
  await tx.update(designs).set({ lastNo: no }).where(eq(designs.id, design.id))
  await recordAudit(ctx, tx, {
    action: 'design.revise',
    subjectKind: 'design',
    subjectId: design.id,
    before: { no: design.lastNo },
    after: { no, id: input.id, weatherId: input.weatherId },
  })
}

function revisionRows(db: Db | Tx) {
  return db
    .select({ revision: designRevisions, projectId: designs.projectId, name: people.name })
    .from(designRevisions)
    .innerJoin(designs, eq(designs.id, designRevisions.designId))
    .leftJoin(people, eq(people.id, designRevisions.recordedBy))
    .$dynamic()
}

type RevisionRow = Awaited<ReturnType<typeof revisionRows>>[number]

function viewOf({ revision, projectId, name }: RevisionRow): DesignRevision {
  return {
    id: revision.id,
    projectId,
    no: revision.no,
    body: revision.body as DesignBody,
    weatherId: revision.weatherId,
    note: revision.note,
    recordedAt: revision.recordedAt.toISOString(),
    recordedBy: name,
  }
}
