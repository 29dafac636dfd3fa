import { eq } from 'drizzle-orm'
import { applications, facts } from '@/db/schema/applications'
import { factEvidence } from '@/db/schema/correspondence'
import type { Tx } from '@/db/client'
import { localOf } from '@/lib/domain/clocks/zoned'
import type { Fact, FactBody, FactKind } from '@/lib/domain/clocks/facts'
import type { ApplicationView } from '@/lib/schemas/application'
import type { FactInput } from '@/lib/schemas/fact'
import { enqueue } from '@/lib/queue/enqueue'
import { readApplication } from '@/lib/services/application-reading'
import { recordAudit } from '@/lib/services/audit'
import { actorId, authorize, type Context } from '@/lib/services/context'
import { invalid, notFound, ServiceError } from '@/lib/services/errors'
import { checkFact, roundsOf, type CheckGround } from '@/lib/services/fact-checks'
import { hashOfInput } from '@/lib/services/input-hash'
import { computeSchedule, rewriteProjection, type Computed } from '@/lib/services/projection'
import { partiesOfOne } from '@/lib/services/parties'

/**
 * Records a fact about an application and answers with the new schedule. The same input under
 * the same id is one fact, however often it is sent.
 * @throws ServiceError `invalid` with every faulty field, `conflict` for a stale page, a second
 * correction of the same fact or a used id, `not_found`; nothing is kept then.
 */
export async function recordFact(
  ctx: Context,
  applicationId: string,
  input: FactInput,
): Promise<ApplicationView> {
  authorize(ctx, isCorrection(input.kind) ? 'fact.correct' : 'fact.record')
  await ctx.db.transaction((tx) => recordFactInside(ctx, tx, applicationId, input))
  return readApplication(ctx, applicationId)
}

/** The same within a caller's transaction; the caller reads what it needs afterwards. */
export async function recordFactInside(
  ctx: Context,
  tx: Tx,
  applicationId: string,
  input: FactInput,
): Promise<void> {
  authorize(ctx, isCorrection(input.kind) ? 'fact.correct' : 'fact.record')
  const lastSeq = await lockApplication(tx, applicationId)
  if (await isRecorded(tx, applicationId, input)) return
  const ground = await groundOf(ctx, tx, applicationId)
  refuseStale(input, lastSeq, ground.computed)
  const kind = kindOf(input, ground.computed.facts)
  const fields = checkFact(input, kind, ground)
  if (fields.length > 0) throw invalid(fields)
  refuseRepeat(input, kind, ground)
  const seq = lastSeq + 1
  await insertFact(ctx, tx, applicationId, seq, input, ground)
  await tx.update(applications).set({ lastSeq: seq }).where(eq(applications.id, applicationId))
  await rewriteProjection(tx, applicationId, seq)
  await recordAudit(ctx, tx, {
    action: `fact.${input.kind}`,
    subjectKind: 'application',
    subjectId: applicationId,
    after: input,
  })
  await enqueue(tx, 'sweepNotices', {}, { jobKey: 'sweep' })
}

function isCorrection(kind: FactKind): boolean {
  return kind === 'correction' || kind === 'retraction'
}

async function lockApplication(tx: Tx, applicationId: string): Promise<number> {
  const [row] = await tx
    .select({ lastSeq: applications.lastSeq })
    .from(applications)
    .where(eq(applications.id, applicationId))
    .for('update')
  if (!row) throw notFound('application')
  return row.lastSeq
}

async function isRecorded(tx: Tx, applicationId: string, input: FactInput): Promise<boolean> {
  const [known] = await tx
    .select({ applicationId: facts.applicationId, inputSha256: facts.inputSha256 })
    .from(facts)
    .where(eq(facts.id, input.id))
  if (!known) return false
  if (known.applicationId === applicationId && known.inputSha256 === hashOfInput(input)) return true
  throw new ServiceError(
    'conflict',
    'This form was recorded before with other content. Open the record to see what stands.',
  )
}

type Ground = CheckGround & { computed: Computed }

async function groundOf(ctx: Context, tx: Tx, applicationId: string): Promise<Ground> {
  const computed = await computeSchedule(tx, applicationId)
  const parties = await partiesOfOne(tx, applicationId)
  return {
    computed,
    body: computed.body,
    schedule: computed.schedule,
    facts: computed.facts,
    zone: parties.operator.zone,
    nowAt: ctx.now.toISOString(),
  }
}

function refuseStale(input: FactInput, lastSeq: number, computed: Computed): void {
  if (input.atSeq === undefined || input.atSeq >= lastSeq) return
  const newer = computed.facts.filter((fact) => fact.seq > input.atSeq!)
  const titles = newer.map(
    (fact) => computed.body.steps.find((step) => step.key === fact.step)?.title ?? fact.kind,
  )
  throw new ServiceError(
    'conflict',
    `Since this page was opened, somebody recorded: ${titles.join(', ')}. Yours was not saved and is still in the form; look at the new state, then record it again.`,
  )
}

/** A correction is checked as the kind of fact it replaces. */
function kindOf(input: FactInput, known: readonly Fact[]): FactKind {
  if (!isCorrection(input.kind)) return input.kind
  const replaced = known.find((fact) => fact.id === input.replaces)
  if (input.replaces && !replaced)
    throw invalid([{ path: 'replaces', message: 'This application holds no such fact.' }])
  if (replaced && known.some((fact) => fact.replacesId === replaced.id))
    throw new ServiceError('conflict', 'This fact was corrected already. Correct the correction.')
  if (input.kind === 'retraction') return 'retraction'
  let origin = replaced
  while (origin?.replacesId) origin = known.find((fact) => fact.id === origin!.replacesId)
  return origin?.kind ?? 'correction'
}

function refuseRepeat(input: FactInput, kind: FactKind, ground: Ground): void {
  if (kind !== 'happened' || input.kind !== 'happened' || input.obligation) return
  const step = ground.body.steps.find((one) => one.key === input.step)!
  const instance = input.instance ?? roundsOf(ground.schedule, step)
  const item = ground.schedule.items.find(
    (one) => one.step === step.key && one.instance === instance && one.obligation === '',
  )
  if (item?.status === 'done')
    throw new ServiceError(
      'conflict',
      `${step.title}${instance > 1 ? `, round ${instance},` : ''} is recorded already. Correct that fact instead of recording it twice.`,
    )
}

async function insertFact(
  ctx: Context,
  tx: Tx,
  applicationId: string,
  seq: number,
  input: FactInput,
  ground: Ground,
): Promise<void> {
  const step = ground.body.steps.find((one) => one.key === input.step)
  const replaced = ground.computed.facts.find((fact) => fact.id === input.replaces)
  await tx.insert(facts).values({
    id: input.id,
    applicationId,
    seq,
    kind: input.kind,
    step: input.step,
    instance: input.instance ?? replaced?.instance ?? (step ? roundsOf(ground.schedule, step) : 1),
    obligation: input.obligation,
    sentOn: input.sentOn ?? localDate(input.sentAt, ground.zone),
    sentAt: instant(input.sentAt),
    receivedOn: input.receivedOn ?? localDate(input.receivedAt, ground.zone),
    receivedAt: instant(input.receivedAt),
    dueOn: input.dueOn ?? localDate(input.dueAt, ground.zone),
    dueAt: instant(input.dueAt),
    channel: input.channel,
    outcome: input.outcome,
    amountMinor: input.amountMinor,
    body: bodyOf(input),
    replacesId: input.replaces,
    reason: input.reason,
    recordedAt: ctx.now,
    recordedBy: actorId(ctx),
    trust: ctx.actor.kind,
    inputSha256: hashOfInput(input),
  })
  if (input.evidence?.length)
    await tx
      .insert(factEvidence)
      .values(input.evidence.map((evidence) => ({ factId: input.id, ...evidence })))
}

function localDate(at: string | undefined, zone: string): string | undefined {
  return at && localOf(at, zone).on
}

function instant(at: string | undefined): Date | undefined {
  return at ? new Date(at) : undefined
}

function bodyOf(input: FactInput): FactBody {
  const { terms, decision, lengthDays, unit, scope, sinceOn, note, effect, procedureRevisionId } =
    input
  const body = {
    terms,
    decision,
    lengthDays,
    unit,
    scope,
    sinceOn,
    note,
    effect,
    procedureRevisionId,
  }
  return Object.fromEntries(Object.entries(body).filter(([, value]) => value !== undefined))
}

/** Recomputes one application's projection, after a calendar or a shared fact moved. */
export async function recomputeApplication(ctx: Context, applicationId: string): Promise<void> {
  authorize(ctx, 'job.run')
  await ctx.db.transaction(async (tx) => {
    const seq = await lockApplication(tx, applicationId)
    await rewriteProjection(tx, applicationId, seq)
  })
}
