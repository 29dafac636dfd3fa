import { and, asc, eq } from 'drizzle-orm'
import type { Tx } from '@/db/client'
import {
  applicationOrganizations,
  applications,
  applicationStates,
  projects,
} from '@/db/schema/applications'
import { organizations } from '@/db/schema/organizations'
import { calculations, designRevisions, exhibitRevisions } from '@/db/schema/plant'
import { localOf } from '@/lib/domain/clocks/zoned'
import { poiMegawatts, type EarlierRevision, type ExhibitData } from '@/lib/domain/exhibits'
import type { CalculationInputs, CalculationResult } from '@/lib/schemas/design'
import type { PrepareExhibitInput } from '@/lib/schemas/exhibit'
import type { PersonActor } from '@/lib/services/context'
import { invalid, notFound } from '@/lib/services/errors'
import { dataOf, revisionRows, type RevisionRow } from '@/lib/services/exhibit-reading'

export interface DataInputs {
  applicationId: string
  exhibitId: string
  input: PrepareExhibitInput
  preparer: PersonActor
  now: Date
}

export type CalculationFound = Awaited<ReturnType<typeof calculationOf>>

/** The calculation of that number. @throws ServiceError `invalid` where there is none. */
export async function calculationOf(tx: Tx, applicationId: string, no: number) {
  const [row] = await tx
    .select({ calculation: calculations, designRecordedAt: designRevisions.recordedAt })
    .from(calculations)
    .innerJoin(designRevisions, eq(designRevisions.id, calculations.designRevisionId))
    .where(and(eq(calculations.applicationId, applicationId), eq(calculations.no, no)))
  if (row) return row
  throw invalid([
    { path: 'calculationNo', message: `Found ${no}; this application has no such calculation.` },
  ])
}

/**
 * What the new revision holds beside its calculation, as known now. Later changes of project or
 * terms do not reach it.
 * @throws ServiceError `invalid` for a synthetic year without its reason.
 */
export async function newExhibitData(
  tx: Tx,
  found: CalculationFound,
  { applicationId, exhibitId, input, preparer, now }: DataInputs,
): Promise<ExhibitData> {
  const { calculation, designRecordedAt } = found
  const head = await headOf(tx, applicationId)
  const { zone } = head.operator
  const dayOf = (at: Date) => localOf(at.toISOString(), zone).on
  const inputs = calculation.inputs as CalculationInputs
  const earlier = await revisionRows(tx)
    .where(eq(exhibitRevisions.exhibitId, exhibitId))
    .orderBy(asc(exhibitRevisions.no))
  const lastIssued = earlier.findLast((row) => row.revision.issuedAt !== null)
  return {
    ...head,
    calculation: {
      no: calculation.no,
      sha256: calculation.sha256,
      recordedOn: dayOf(calculation.recordedAt),
      engineVersion: calculation.engineVersion,
    },
    design: { no: inputs.designNo, recordedOn: dayOf(designRecordedAt) },
    weatherReason: weatherReasonOf(calculation.result as CalculationResult, input),
    what: input.what,
    prepared: { name: preparer.name, on: dayOf(now) },
    checked: null,
    checkNotes: null,
    earlier: earlier.map(earlierRevision),
    comparedWithId: lastIssued?.revision.id ?? null,
  }
}

function weatherReasonOf(result: CalculationResult, input: PrepareExhibitInput): string | null {
  if (result.weather.kind !== 'synthetic') return null
  if (input.weatherReason) return input.weatherReason
  throw invalid([
    {
      path: 'weatherReason',
      message: 'The calculation ran on a synthetic year: state why no station’s file was taken.',
    },
  ])
}

async function headOf(tx: Tx, applicationId: string) {
  const [row] = await tx
    .select({ project: projects, terms: applicationStates.terms, operator: organizations })
    .from(applications)
    .innerJoin(projects, eq(projects.id, applications.projectId))
    .innerJoin(applicationStates, eq(applicationStates.applicationId, applications.id))
    .innerJoin(
      applicationOrganizations,
      and(
        eq(applicationOrganizations.applicationId, applications.id),
        eq(applicationOrganizations.role, 'operator'),
      ),
    )
    .innerJoin(organizations, eq(organizations.id, applicationOrganizations.organizationId))
    .where(eq(applications.id, applicationId))
  if (!row) throw notFound('application')
  const { name, town, latitude, longitude } = row.project
  const { poi, poiVoltageKv, requestNo } = row.terms
  return {
    project: { name, town, latitude, longitude },
    requestNo: requestNo ?? null,
    operator: { name: row.operator.name, zone: row.operator.zone },
    terms: {
      poi: poi ?? null,
      poiVoltageKv: poiVoltageKv ?? null,
      poiMw: poiMegawatts(row.terms),
    },
  }
}

function earlierRevision(row: RevisionRow): EarlierRevision {
  const { prepared, checked, what } = dataOf(row)
  return {
    no: row.revision.no,
    on: (checked ?? prepared).on,
    preparedBy: prepared.name,
    checkedBy: checked?.name ?? null,
    wasIssued: row.revision.issuedAt !== null,
    what,
  }
}
