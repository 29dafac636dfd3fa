import { and, asc, desc, eq } from 'drizzle-orm'
import { randomUUID } from 'node:crypto'
import {
  applicationOrganizations,
  applications,
  applicationStates,
  entities,
  facts,
  projects,
} from '@/db/schema/applications'
import { organizations, procedureRevisions, procedures } from '@/db/schema/organizations'
import type { Tx } from '@/db/client'
import type {
  ApplicationChoices,
  ApplicationView,
  NewApplicationInput,
  RecordableStep,
} from '@/lib/schemas/application'
import { readApplication } from '@/lib/services/application-reading'
import { recordAudit } from '@/lib/services/audit'
import { actorId, authorize, type Context } from '@/lib/services/context'
import { invalid, ServiceError } from '@/lib/services/errors'
import { hashOfInput } from '@/lib/services/input-hash'
import { rewriteProjection } from '@/lib/services/projection'
import { isUuid } from '@/lib/services/uuid'
import { notFound } from '@/lib/services/errors'

/** One application as it stands now. @throws ServiceError `not_found`. */
export async function getApplication(ctx: Context, id: string): Promise<ApplicationView> {
  authorize(ctx, 'application.read')
  if (!isUuid(id)) throw notFound('application')
  return readApplication(ctx, id)
}

/** The steps for which an event may be recorded now. @throws ServiceError `not_found`. */
export async function listRecordableSteps(ctx: Context, id: string): Promise<RecordableStep[]> {
  authorize(ctx, 'application.read')
  return (await getApplication(ctx, id)).recordable
}

/**
 * Starts an application: project and project company found or made, the procedure revision
 * pinned and the requested terms recorded as its first fact. The client's id makes a second
 * submit the same application.
 * @throws ServiceError `invalid` for an unknown project, organization or procedure revision.
 */
export async function createApplication(
  ctx: Context,
  input: NewApplicationInput,
): Promise<ApplicationView> {
  authorize(ctx, 'application.create')
  await ctx.db.transaction(async (tx) => {
    const [known] = await tx
      .select({ id: applications.id })
      .from(applications)
      .where(eq(applications.id, input.id))
    if (known) return
    await checkReferences(tx, input)
    const projectId = await projectFor(tx, input.project)
    const entityId = await entityFor(tx, input.entityName)
    await insertApplication(ctx, tx, input, projectId, entityId)
  })
  return readApplication(ctx, input.id)
}

async function checkReferences(tx: Tx, input: NewApplicationInput): Promise<void> {
  const [operator] = await tx
    .select({ id: organizations.id })
    .from(organizations)
    .where(eq(organizations.id, input.operatorId))
  const [revision] = await tx
    .select({ id: procedureRevisions.id, organizationId: procedures.organizationId })
    .from(procedureRevisions)
    .innerJoin(procedures, eq(procedures.id, procedureRevisions.procedureId))
    .where(eq(procedureRevisions.id, input.procedureRevisionId))
  const fields = []
  if (!operator) fields.push({ path: 'operatorId', message: 'Choose one of the organizations.' })
  if (!revision)
    fields.push({ path: 'procedureRevisionId', message: 'Choose one of the procedures.' })
  else if (revision.organizationId && revision.organizationId !== input.operatorId)
    fields.push({
      path: 'procedureRevisionId',
      message: 'This procedure belongs to another organization.',
    })
  if (fields.length > 0) throw invalid(fields)
}

async function projectFor(tx: Tx, project: NewApplicationInput['project']): Promise<string> {
  if ('id' in project) {
    const [known] = await tx
      .select({ id: projects.id })
      .from(projects)
      .where(eq(projects.id, project.id))
    if (!known) throw invalid([{ path: 'project.id', message: 'There is no such project.' }])
    return known.id
  }
  const [made] = await tx
    .insert(projects)
    .values(project)
    .onConflictDoNothing()
    .returning({ id: projects.id })
  if (made) return made.id
  throw new ServiceError('invalid', 'Some fields need another look.', [
    {
      path: 'project.name',
      message: `A project named "${project.name}" exists already. Choose it from the list.`,
    },
  ])
}

async function entityFor(tx: Tx, name: string): Promise<string> {
  await tx.insert(entities).values({ name }).onConflictDoNothing()
  const [entity] = await tx
    .select({ id: entities.id })
    .from(entities)
    .where(eq(entities.name, name))
  return entity!.id
}

async function insertApplication(
  ctx: Context,
  tx: Tx,
  input: NewApplicationInput,
  projectId: string,
  entityId: string,
): Promise<void> {
  const { id } = input
  await tx
    .insert(applications)
    .values({ id, projectId, entityId, lastSeq: 1, createdAt: ctx.now, createdBy: actorId(ctx) })
  await tx.insert(applicationOrganizations).values({
    applicationId: id,
    organizationId: input.operatorId,
    role: 'operator',
    desk: input.desk,
  })
  await tx.insert(facts).values({
    id: randomUUID(),
    applicationId: id,
    seq: 1,
    kind: 'changed',
    receivedOn: input.openedOn,
    body: {
      terms: input.terms,
      procedureRevisionId: input.procedureRevisionId,
      note: 'Terms as first requested',
    },
    recordedAt: ctx.now,
    recordedBy: actorId(ctx),
    trust: ctx.actor.kind,
    inputSha256: hashOfInput(input),
  })
  await rewriteProjection(tx, id, 1)
  await recordAudit(ctx, tx, {
    action: 'application.create',
    subjectKind: 'application',
    subjectId: id,
    after: input,
  })
}

/** What a new application chooses from: organizations, latest procedure revisions, projects. */
export async function listApplicationChoices(ctx: Context): Promise<ApplicationChoices> {
  authorize(ctx, 'procedure.read')
  const latest = await ctx.db
    .selectDistinctOn([procedures.id], { procedure: procedures, revision: procedureRevisions })
    .from(procedures)
    .innerJoin(procedureRevisions, eq(procedureRevisions.procedureId, procedures.id))
    .orderBy(procedures.id, desc(procedureRevisions.no))
  return {
    organizations: await ctx.db
      .select({ id: organizations.id, name: organizations.name, zone: organizations.zone })
      .from(organizations)
      .orderBy(asc(organizations.name)),
    procedures: latest
      .map(({ procedure, revision }) => ({
        revisionId: revision.id,
        title: procedure.title,
        no: revision.no,
        organizationId: procedure.organizationId,
        key: procedure.key,
        steps: revision.body.steps.length,
      }))
      .sort((a, b) => a.title.localeCompare(b.title)),
    projects: await ctx.db
      .select({ id: projects.id, name: projects.name, town: projects.town })
      .from(projects)
      .orderBy(asc(projects.name)),
    entities: await ctx.db
      .select({ id: entities.id, name: entities.name })
      .from(entities)
      .orderBy(asc(entities.name)),
  }
}

/** Applications of one standing, by id and name, for pickers. */
export async function listApplicationNames(
  ctx: Context,
): Promise<{ id: string; project: string; requestNo: string | null }[]> {
  authorize(ctx, 'application.read')
  const rows = await ctx.db
    .select({ id: applications.id, project: projects.name, terms: applicationStates.terms })
    .from(applications)
    .innerJoin(projects, eq(projects.id, applications.projectId))
    .innerJoin(applicationStates, and(eq(applicationStates.applicationId, applications.id)))
    .orderBy(asc(projects.name))
  return rows.map((row) => ({
    id: row.id,
    project: row.project,
    requestNo: row.terms.requestNo ?? null,
  }))
}
