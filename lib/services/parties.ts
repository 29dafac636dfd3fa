import { desc, eq, inArray } from 'drizzle-orm'
import { applicationOrganizations } from '@/db/schema/applications'
import { calendarRevisions, organizations } from '@/db/schema/organizations'
import type { Db, Tx } from '@/db/client'
import { businessCalendar, type BusinessCalendar } from '@/lib/domain/clocks/calendar'
import type { PartyRole } from '@/lib/domain/clocks/procedure'
import type { OrganizationRules, Parties } from '@/lib/domain/clocks/schedule-types'

export interface OrganizationParty extends OrganizationRules {
  id: string
  shortName: string
  calendarRevisionId: string
}

export type ApplicationParties = Partial<Record<PartyRole, OrganizationParty>> & {
  operator: OrganizationParty
}

// A revision is immutable, so its compiled calendar may be kept for the life of the process.
const compiled = new Map<string, BusinessCalendar>()

/** The calendar of a revision, compiled once. */
export function calendarOf(
  revision: { id: string; rules: Parameters<typeof businessCalendar>[1] },
  name: string,
): BusinessCalendar {
  const known = compiled.get(revision.id)
  if (known) return known
  const made = businessCalendar(name, revision.rules)
  compiled.set(revision.id, made)
  return made
}

/** Every organization with its rules and the latest revision of its calendar, by id. */
export async function organizationParties(db: Db | Tx): Promise<Map<string, OrganizationParty>> {
  const rows = await db
    .selectDistinctOn([organizations.id], {
      organization: organizations,
      revision: calendarRevisions,
    })
    .from(organizations)
    .innerJoin(calendarRevisions, eq(calendarRevisions.calendarId, organizations.calendarId))
    .orderBy(organizations.id, desc(calendarRevisions.no))
  return new Map(
    rows.map(({ organization, revision }) => [
      organization.id,
      {
        id: organization.id,
        name: organization.name,
        shortName: organization.shortName,
        zone: organization.zone,
        closesAt: organization.closesAt,
        receiptRule: organization.receiptRule,
        deemedReceivedDays: organization.deemedReceivedDays,
        calendar: calendarOf(revision, organization.shortName),
        calendarRevisionId: revision.id,
      },
    ]),
  )
}

/** Who is on each application, by role. @throws Error when one has no operator. */
export async function partiesOf(
  db: Db | Tx,
  applicationIds: string[],
): Promise<Map<string, ApplicationParties>> {
  if (applicationIds.length === 0) return new Map()
  const known = await organizationParties(db)
  const rows = await db
    .select()
    .from(applicationOrganizations)
    .where(inArray(applicationOrganizations.applicationId, applicationIds))
  const result = new Map<string, Partial<ApplicationParties>>()
  for (const row of rows) {
    const parties = result.get(row.applicationId) ?? {}
    parties[row.role as PartyRole] = known.get(row.organizationId)
    result.set(row.applicationId, parties)
  }
  for (const [id, parties] of result)
    if (!parties.operator) throw new Error(`Application ${id} has no operator.`)
  return result as Map<string, ApplicationParties>
}

/** The parties of one application. */
export async function partiesOfOne(
  db: Db | Tx,
  applicationId: string,
): Promise<ApplicationParties> {
  const parties = (await partiesOf(db, [applicationId])).get(applicationId)
  if (!parties) throw new Error(`Application ${applicationId} has no operator.`)
  return parties satisfies Parties
}
