import { and, desc, eq, lte, sql } from 'drizzle-orm'
import { alias } from 'drizzle-orm/pg-core'
import type { Db, Tx } from '@/db/client'
import { applications, applicationStates, facts } from '@/db/schema/applications'
import { files } from '@/db/schema/correspondence'
import { people } from '@/db/schema/people'
import {
  calculations,
  designRevisions,
  designs,
  exhibitRevisions,
  exhibits,
} from '@/db/schema/plant'
import { localOf } from '@/lib/domain/clocks/zoned'
import {
  exhibitTitles,
  outOfStepWords,
  poiMegawatts,
  revisionStateWords,
  type ExhibitData,
  type ExhibitLetter,
  type ExhibitSource,
} from '@/lib/domain/exhibits'
import { formatShortDate } from '@/lib/domain/format-date'
import type { CalculationInputs, CalculationResult } from '@/lib/schemas/design'
import type { ExhibitRevision } from '@/lib/schemas/exhibit'
import type { Context } from '@/lib/services/context'
import { notFound } from '@/lib/services/errors'
import { isUuid } from '@/lib/services/uuid'

const preparer = alias(people, 'preparer')
const checker = alias(people, 'checker')
const issuer = alias(people, 'issuer')

/** Revisions with their exhibit, calculation and the people who signed. */
export function revisionRows(db: Db | Tx) {
  return db
    .select({
      revision: exhibitRevisions,
      exhibit: exhibits,
      calculation: calculations,
      size: files.size,
      preparedBy: { id: preparer.id, name: preparer.name },
      checkedBy: { id: checker.id, name: checker.name },
      issuedBy: { id: issuer.id, name: issuer.name },
    })
    .from(exhibitRevisions)
    .innerJoin(exhibits, eq(exhibits.id, exhibitRevisions.exhibitId))
    .innerJoin(calculations, eq(calculations.id, exhibitRevisions.calculationId))
    .innerJoin(preparer, eq(preparer.id, exhibitRevisions.preparedBy))
    .leftJoin(checker, eq(checker.id, exhibitRevisions.checkedBy))
    .leftJoin(issuer, eq(issuer.id, exhibitRevisions.issuedBy))
    .leftJoin(files, eq(files.sha256, exhibitRevisions.fileSha256))
    .$dynamic()
}

export type RevisionRow = Awaited<ReturnType<typeof revisionRows>>[number]

/** One revision's row. @throws ServiceError `not_found`. */
export async function revisionRowOf(db: Db | Tx, id: string): Promise<RevisionRow> {
  const [row] = isUuid(id) ? await revisionRows(db).where(eq(exhibitRevisions.id, id)) : []
  if (!row) throw notFound('exhibit revision')
  return row
}

/** The same, with its exhibit held, so that two acts on one exhibit come one by one. */
export async function lockedRevision(tx: Tx, id: string): Promise<RevisionRow> {
  const { exhibit } = await revisionRowOf(tx, id)
  await tx.select().from(exhibits).where(eq(exhibits.id, exhibit.id)).for('update')
  return revisionRowOf(tx, id)
}

/** What a revision is held against: the project's latest design, and the request's terms. */
export interface Ground {
  latestDesign: { no: number; recordedAt: Date } | null
  poiMw: number | null
  termsAt: Date | null
}

/** The ground of an application as recorded by `ctx.now`. @throws ServiceError `not_found`. */
export async function groundOf(ctx: Context, db: Db | Tx, applicationId: string): Promise<Ground> {
  const [state] = await db
    .select({ terms: applicationStates.terms, projectId: applications.projectId })
    .from(applications)
    .innerJoin(applicationStates, eq(applicationStates.applicationId, applications.id))
    .where(eq(applications.id, applicationId))
  if (!state) throw notFound('application')
  const [latest] = await db
    .select({ no: designRevisions.no, recordedAt: designRevisions.recordedAt })
    .from(designRevisions)
    .innerJoin(designs, eq(designs.id, designRevisions.designId))
    .where(and(eq(designs.projectId, state.projectId), lte(designRevisions.recordedAt, ctx.now)))
    .orderBy(desc(designRevisions.no))
    .limit(1)
  const [fact] = await db
    .select({ recordedAt: facts.recordedAt })
    .from(facts)
    .where(
      and(
        eq(facts.applicationId, applicationId),
        sql`jsonb_exists_any(${facts.body} -> 'terms', array['requestedMw', 'studiedMw', 'grantedMw', 'installedMw'])`,
      ),
    )
    .orderBy(desc(facts.seq))
    .limit(1)
  return {
    latestDesign: latest ?? null,
    poiMw: poiMegawatts(state.terms),
    termsAt: fact?.recordedAt ?? null,
  }
}

/** Why a revision no longer matches, in words; null while it does. */
export function outOfStepOf(ctx: Context, row: RevisionRow, ground: Ground): string | null {
  const inputs = row.calculation.inputs as CalculationInputs
  const { zone } = dataOf(row).operator
  const today = localOf(ctx.now.toISOString(), zone).on
  const words = (at: Date) => formatShortDate(localOf(at.toISOString(), zone).on, today)
  const { latestDesign, poiMw, termsAt } = ground
  return outOfStepWords({
    designNo: inputs.designNo,
    latestDesign: {
      no: latestDesign?.no ?? inputs.designNo,
      on: latestDesign ? words(latestDesign.recordedAt) : '',
    },
    exportLimitMw: inputs.design.exportLimitMw,
    poiMw,
    termsOn: termsAt && words(termsAt),
  })
}

/** A revision as pages and the API show it. */
export function revisionView(ctx: Context, row: RevisionRow, ground: Ground): ExhibitRevision {
  const { revision, exhibit, calculation, size } = row
  const data = dataOf(row)
  const isLive = revision.state !== 'superseded'
  const outOfStep = isLive ? outOfStepOf(ctx, row, ground) : null
  const { state } = revision
  return {
    id: revision.id,
    applicationId: exhibit.applicationId,
    letter: exhibit.letter,
    title: exhibitTitles[exhibit.letter as ExhibitLetter],
    revision: revision.no,
    state,
    stateWords: revisionStateWords({ state, wasIssued: revision.issuedAt !== null, outOfStep }),
    outOfStep,
    what: data.what,
    weatherReason: data.weatherReason,
    calculation: {
      no: calculation.no,
      sha256: calculation.sha256,
      designNo: (calculation.inputs as CalculationInputs).designNo,
    },
    render: revision.render,
    renderError: revision.renderError,
    renderSince: (revision.checkedAt ?? revision.preparedAt).toISOString(),
    document: revision.fileSha256 && size !== null ? { sha256: revision.fileSha256, size } : null,
    preparedBy: row.preparedBy,
    preparedAt: revision.preparedAt.toISOString(),
    checkedBy: row.checkedBy,
    checkedAt: revision.checkedAt?.toISOString() ?? null,
    checkNotes: data.checkNotes,
    issuedBy: row.issuedBy,
    issuedAt: revision.issuedAt?.toISOString() ?? null,
  }
}

/** What the revision holds beside its calculation. */
export function dataOf({ revision }: RevisionRow): ExhibitData {
  return revision.data as ExhibitData
}

/** A revision with its frozen calculation: all that its document is made of. */
export function sourceOf(row: RevisionRow): ExhibitSource {
  const inputs = row.calculation.inputs as CalculationInputs
  return {
    no: row.revision.no,
    data: dataOf(row),
    weatherName: inputs.weather.name,
    design: inputs.design,
    result: row.calculation.result as CalculationResult,
  }
}
