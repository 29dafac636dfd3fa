import { asc, eq, inArray } from 'drizzle-orm'
import {
  applicationOrganizations,
  applications,
  applicationStates,
  entities,
  facts,
  projects,
} from '@/db/schema/applications'
import { entries, factEvidence } from '@/db/schema/correspondence'
import { organizations, procedureRevisions, procedures } from '@/db/schema/organizations'
import { people } from '@/db/schema/people'
import { localOf } from '@/lib/domain/clocks/zoned'
import { stepOf, type ProcedureBody } from '@/lib/domain/clocks/procedure'
import type { ApplicationView, FactView, ItemView, RecordableStep } from '@/lib/schemas/application'
import type { Context } from '@/lib/services/context'
import { notFound } from '@/lib/services/errors'
import { holdersOf, itemView, obligationRowsOf } from '@/lib/services/item-views'
import { partiesOfOne } from '@/lib/services/parties'

/** An application with its obligations as they stand now, its facts and what can be recorded. */
export async function readApplication(ctx: Context, id: string): Promise<ApplicationView> {
  const head = await headOf(ctx, id)
  const parties = await partiesOfOne(ctx.db, id)
  const rows = await obligationRowsOf(ctx.db, id)
  const holders = await holdersOf(ctx.db, [id])
  const items = rows.map((row) => itemView(row, parties, holders, ctx.now))
  return {
    id,
    seq: head.application.lastSeq,
    project: { id: head.project.id, name: head.project.name, town: head.project.town },
    entity: head.entity && { id: head.entity.id, name: head.entity.name },
    operator: brief(parties.operator),
    ...(await organizationsOf(ctx, id)),
    procedure: {
      key: head.procedure.key,
      title: head.revision.body.title,
      revisionId: head.revision.id,
      no: head.revision.no,
      stages: head.revision.body.stages,
    },
    terms: head.state.terms,
    standing: head.state.standing,
    stage: head.state.stage,
    todayOn: localOf(ctx.now.toISOString(), parties.operator.zone).on,
    items,
    recordable: recordableSteps(head.revision.body, items),
    settled: settledSteps(head.revision.body, items),
    facts: await factViews(ctx, id, head.revision.body),
    stranded: head.state.stranded,
  }
}

async function headOf(ctx: Context, id: string) {
  const [head] = await ctx.db
    .select({
      application: applications,
      project: projects,
      entity: entities,
      state: applicationStates,
      revision: procedureRevisions,
      procedure: procedures,
    })
    .from(applications)
    .innerJoin(projects, eq(projects.id, applications.projectId))
    .leftJoin(entities, eq(entities.id, applications.entityId))
    .innerJoin(applicationStates, eq(applicationStates.applicationId, applications.id))
    .innerJoin(procedureRevisions, eq(procedureRevisions.id, applicationStates.procedureRevisionId))
    .innerJoin(procedures, eq(procedures.id, procedureRevisions.procedureId))
    .where(eq(applications.id, id))
  if (!head) throw notFound('application')
  return head
}

function brief(organization: {
  id: string
  name: string
  shortName: string
  zone: string
  closesAt: string | null
}) {
  const { id, name, shortName, zone, closesAt } = organization
  return { id, name, shortName, zone, closesAt }
}

async function organizationsOf(
  ctx: Context,
  id: string,
): Promise<Pick<ApplicationView, 'desk' | 'others'>> {
  const rows = await ctx.db
    .select({
      role: applicationOrganizations.role,
      desk: applicationOrganizations.desk,
      organization: organizations,
    })
    .from(applicationOrganizations)
    .innerJoin(organizations, eq(organizations.id, applicationOrganizations.organizationId))
    .where(eq(applicationOrganizations.applicationId, id))
  return {
    desk: rows.find((row) => row.role === 'operator')?.desk ?? null,
    others: rows
      .filter((row) => row.role !== 'operator')
      .map((row) => ({ ...brief(row.organization), role: row.role })),
  }
}

async function factViews(ctx: Context, id: string, body: ProcedureBody): Promise<FactView[]> {
  const rows = await ctx.db
    .select({ fact: facts, name: people.name })
    .from(facts)
    .leftJoin(people, eq(people.id, facts.recordedBy))
    .where(eq(facts.applicationId, id))
    .orderBy(asc(facts.seq))
  const evidence = await evidenceOf(
    ctx,
    rows.map((row) => row.fact.id),
  )
  const replacedBy = new Map(
    rows.flatMap(({ fact }) => (fact.replacesId ? [[fact.replacesId, fact.id]] : [])),
  )
  return rows.map(({ fact, name }) => {
    const step = body.steps.find((one) => one.key === fact.step)
    return {
      id: fact.id,
      seq: fact.seq,
      kind: fact.kind,
      step: fact.step,
      stepTitle: step?.title ?? null,
      instance: fact.instance,
      obligation: fact.obligation,
      sentOn: fact.sentOn,
      sentAt: fact.sentAt?.toISOString() ?? null,
      receivedOn: fact.receivedOn,
      receivedAt: fact.receivedAt?.toISOString() ?? null,
      dueOn: fact.dueOn,
      channel: fact.channel,
      outcome: fact.outcome,
      outcomeTitle: step?.outcomes.find((one) => one.key === fact.outcome)?.title ?? null,
      amountMinor: fact.amountMinor,
      body: fact.body as Record<string, unknown>,
      replacesId: fact.replacesId,
      replacedById: replacedBy.get(fact.id) ?? null,
      reason: fact.reason,
      recordedAt: fact.recordedAt.toISOString(),
      recordedBy: name,
      evidence: evidence.get(fact.id) ?? [],
    }
  })
}

async function evidenceOf(
  ctx: Context,
  factIds: string[],
): Promise<Map<string, FactView['evidence']>> {
  const result = new Map<string, FactView['evidence']>()
  if (factIds.length === 0) return result
  const rows = await ctx.db
    .select({ evidence: factEvidence, subject: entries.subject })
    .from(factEvidence)
    .leftJoin(entries, eq(entries.id, factEvidence.entryId))
    .where(inArray(factEvidence.factId, factIds))
  for (const { evidence, subject } of rows)
    result.set(evidence.factId, [
      ...(result.get(evidence.factId) ?? []),
      { entryId: evidence.entryId, entrySubject: subject, fileSha256: evidence.fileSha256 },
    ])
  return result
}

/** The steps an event may be recorded for: what runs first, then what lies ahead. */
export function recordableSteps(body: ProcedureBody, items: readonly ItemView[]): RecordableStep[] {
  const steps = items.filter((item) => item.obligation === '')
  const listed = steps.filter((item) => ['open', 'stopped', 'waiting'].includes(item.status))
  const anytime = body.steps
    .filter((step) => step.kind === 'anytime')
    .map((step) => ({
      step: step.key,
      instance: steps.filter((item) => item.step === step.key).length + 1,
      status: 'open' as const,
    }))
  return [...listed, ...anytime]
    .map((one) => recordableStep(body, one))
    .sort((a, b) => Number(a.status === 'waiting') - Number(b.status === 'waiting'))
}

/** The steps that are closed, with the outcomes and parts that a correction may choose. */
function settledSteps(body: ProcedureBody, items: readonly ItemView[]): RecordableStep[] {
  return items
    .filter((item) => item.obligation === '')
    .filter((item) => !['open', 'stopped', 'waiting'].includes(item.status))
    .map((item) => recordableStep(body, item))
}

function recordableStep(
  body: ProcedureBody,
  { step: key, instance, status }: Pick<RecordableStep, 'step' | 'instance' | 'status'>,
): RecordableStep {
  const step = stepOf(body, key)
  return {
    step: key,
    instance,
    status,
    title: step.title,
    stage: step.stage,
    party: step.party,
    evidence: step.evidence ?? null,
    outcomes: step.outcomes,
    obligations: (step.obligations ?? []).map(({ key: name, title, what }) => ({
      key: name,
      title,
      what,
    })),
  }
}
