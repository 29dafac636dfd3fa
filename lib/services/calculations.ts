import { and, desc, eq, sql } from 'drizzle-orm'
import type { Db, Tx } from '@/db/client'
import { applications, facts } from '@/db/schema/applications'
import { people } from '@/db/schema/people'
import { calculations } from '@/db/schema/plant'
import { designRunner } from '@/lib/domain/plant/design-year'
import { DEFAULT_RATIOS } from '@/lib/domain/plant/year'
import type {
  Calculation,
  CalculationInput,
  CalculationInputs,
  CalculationResult,
  CalculationSummary,
  DesignRevision,
} from '@/lib/schemas/design'
import { recordAudit } from '@/lib/services/audit'
import { actorId, authorize, type Context } from '@/lib/services/context'
import { getDesignRevision } from '@/lib/services/designs'
import { invalid, notFound, ServiceError } from '@/lib/services/errors'
import { hashOfInput } from '@/lib/services/input-hash'
import { isUuid } from '@/lib/services/uuid'
import { getWeatherYear } from '@/lib/services/weather'

/** An application's frozen calculations, the latest first. @throws ServiceError `not_found`. */
export async function listCalculations(
  ctx: Context,
  applicationId: string,
): Promise<CalculationSummary[]> {
  authorize(ctx, 'calculation.read')
  await applicationOf(ctx.db, applicationId)
  const rows = await calculationRows(ctx.db)
    .where(eq(calculations.applicationId, applicationId))
    .orderBy(desc(calculations.no))
  return rows.map(summaryOf)
}

/** One frozen calculation by its number. @throws ServiceError `not_found`. */
export async function getCalculation(
  ctx: Context,
  applicationId: string,
  no: number,
): Promise<Calculation> {
  authorize(ctx, 'calculation.read')
  if (!isUuid(applicationId) || !Number.isInteger(no)) throw notFound('calculation')
  const [row] = await calculationRows(ctx.db).where(
    and(eq(calculations.applicationId, applicationId), eq(calculations.no, no)),
  )
  if (!row) throw notFound('calculation')
  return viewOf(row)
}

/**
 * Runs the chain on a design revision and its weather year and keeps inputs, result, engine version
 * and SHA-256 under the application's next number, never to be changed. The same id is the same
 * calculation.
 * @throws ServiceError `not_found`, `invalid` for a revision of another project or without a
 * weather year, `conflict` where the id holds another calculation.
 */
export async function freezeCalculation(
  ctx: Context,
  applicationId: string,
  input: CalculationInput,
): Promise<Calculation> {
  authorize(ctx, 'calculation.freeze')
  const { projectId } = await applicationOf(ctx.db, applicationId)
  const known = await findCalculation(ctx.db, input.id)
  if (known) return sameOrConflict(known, applicationId, input)
  const frozen = await runFrozen(ctx, projectId, input)
  const kept = await ctx.db.transaction((tx) => keep(ctx, tx, applicationId, input, frozen))
  return sameOrConflict(kept, applicationId, input)
}

interface Frozen {
  revision: DesignRevision
  weatherId: string
  inputs: CalculationInputs
  result: CalculationResult
  sha256: string
}

async function runFrozen(
  ctx: Context,
  projectId: string,
  { designRevisionId }: CalculationInput,
): Promise<Frozen> {
  const fault = (message: string) => invalid([{ path: 'designRevisionId', message }])
  const revision = await getDesignRevision(ctx, designRevisionId).catch(() => {
    throw fault('There is no such design revision.')
  })
  if (revision.projectId !== projectId)
    throw fault('This design revision belongs to another project.')
  if (!revision.weatherId) throw fault(`Revision ${revision.no} names no weather year; choose one.`)
  const { weather, year } = await getWeatherYear(ctx, revision.weatherId)
  const inputs = {
    design: revision.body,
    designNo: revision.no,
    weather: { id: weather.id, sha256: weather.sha256, name: weather.name },
    ratios: DEFAULT_RATIOS,
  }
  const result = designRunner(year).run(revision.body)
  const sha256 = hashOfInput({ inputs, result, engineVersion: result.engineVersion })
  return { revision, weatherId: weather.id, inputs, result, sha256 }
}

/** The application's row is held, so that two calculations never take one number. */
async function keep(
  ctx: Context,
  tx: Tx,
  applicationId: string,
  { id }: CalculationInput,
  { revision, weatherId, inputs, result, sha256 }: Frozen,
): Promise<CalculationRow> {
  await tx
    .select({ id: applications.id })
    .from(applications)
    .where(eq(applications.id, applicationId))
    .for('update')
  const earlier = await findCalculation(tx, id)
  if (earlier) return earlier
  const [last] = await tx
    .select({ no: sql<number>`coalesce(max(${calculations.no}), 0)::int` })
    .from(calculations)
    .where(eq(calculations.applicationId, applicationId))
  const no = (last?.no ?? 0) + 1
  await tx.insert(calculations).values({
    id,
    applicationId,
    no,
    designRevisionId: revision.id,
    termsFactId: await termsFactOf(tx, applicationId),
    weatherId,
    inputs,
    result,
    engineVersion: result.engineVersion,
    sha256,
    recordedAt: ctx.now,
    recordedBy: actorId(ctx),
  })
  await recordAudit(ctx, tx, {
    action: 'calculation.freeze',
    subjectKind: 'calculation',
    subjectId: id,
    after: { applicationId, no, designRevisionId: revision.id, sha256 },
  })
  return (await findCalculation(tx, id))!
}

/** The fact that states the terms in force, so that a later change can be told. */
async function termsFactOf(tx: Tx, applicationId: string): Promise<string | null> {
  const [row] = await tx
    .select({ id: facts.id })
    .from(facts)
    .where(
      and(
        eq(facts.applicationId, applicationId),
        eq(facts.kind, 'changed'),
        sql`${facts.body} ? 'terms'`,
      ),
    )
    .orderBy(desc(facts.seq))
    .limit(1)
  return row?.id ?? null
}

async function applicationOf(db: Db | Tx, id: string): Promise<{ projectId: string }> {
  const [row] = isUuid(id)
    ? await db
        .select({ projectId: applications.projectId })
        .from(applications)
        .where(eq(applications.id, id))
    : []
  if (!row) throw notFound('application')
  return row
}

async function findCalculation(db: Db | Tx, id: string): Promise<CalculationRow | null> {
  const [row] = await calculationRows(db).where(eq(calculations.id, id))
  return row ?? null
}

function sameOrConflict(
  row: CalculationRow,
  applicationId: string,
  input: CalculationInput,
): Calculation {
  const { calculation } = row
  const isSame =
    calculation.applicationId === applicationId &&
    calculation.designRevisionId === input.designRevisionId
  if (isSame) return viewOf(row)
  throw new ServiceError('conflict', 'This id holds another frozen calculation already.')
}

function calculationRows(db: Db | Tx) {
  return db
    .select({ calculation: calculations, name: people.name })
    .from(calculations)
    .leftJoin(people, eq(people.id, calculations.recordedBy))
    .$dynamic()
}

type CalculationRow = Awaited<ReturnType<typeof calculationRows>>[number]

function summaryOf({ calculation, name }: CalculationRow): CalculationSummary {
  const inputs = calculation.inputs as CalculationInputs
  const result = calculation.result as CalculationResult
  return {
    id: calculation.id,
    no: calculation.no,
    designRevisionId: calculation.designRevisionId,
    designNo: inputs.designNo,
    weatherId: calculation.weatherId,
    weatherName: inputs.weather.name,
    synthetic: result.weather.kind === 'synthetic',
    limitedFraction: result.annual.limitedFraction,
    exportKwh: result.annual.exportKwh,
    dcPerPoi: result.annual.dcPerPoiKw ?? 0,
    engineVersion: calculation.engineVersion,
    sha256: calculation.sha256,
    recordedAt: calculation.recordedAt.toISOString(),
    recordedBy: name,
  }
}

function viewOf(row: CalculationRow): Calculation {
  return {
    ...summaryOf(row),
    applicationId: row.calculation.applicationId,
    inputs: row.calculation.inputs as CalculationInputs,
    result: row.calculation.result as CalculationResult,
  }
}
