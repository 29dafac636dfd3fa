import { and, eq, inArray, ne, sql } from 'drizzle-orm'
import { alias } from 'drizzle-orm/pg-core'
import { applicationOrganizations, applications, projects } from '@/db/schema/applications'
import { contacts, organizations } from '@/db/schema/organizations'
import type { EntryChoices } from '@/lib/schemas/entry'
import { listRecordableSteps } from '@/lib/services/applications'
import { authorize, type Context } from '@/lib/services/context'
import { notFound } from '@/lib/services/errors'
import { isUuid } from '@/lib/services/uuid'

/**
 * What an entry about this application may name: its organizations with their people, further
 * requests with the same organizations, and the steps open to record.
 * @throws ServiceError `not_found`
 */
export async function getEntryChoices(ctx: Context, applicationId: string): Promise<EntryChoices> {
  authorize(ctx, 'entry.read')
  if (!isUuid(applicationId)) throw notFound('application')
  const parties = await partiesTo(ctx, applicationId)
  const first = parties[0]
  if (!first) throw notFound('application')
  const ids = parties.map((party) => party.id)
  const [people, others, steps] = await Promise.all([
    contactsOf(ctx, ids),
    othersWith(ctx, applicationId, ids),
    listRecordableSteps(ctx, applicationId),
  ])
  return {
    zone: first.zone,
    organizations: parties.map(({ id, name, zone }) => ({
      id,
      name,
      zone,
      contacts: people
        .filter((person) => person.organizationId === id)
        .map((person) => (person.desk ? `${person.name}, ${person.desk}` : person.name)),
    })),
    others,
    steps,
  }
}

/** The organizations of an application, each once, the operator first. */
async function partiesTo(ctx: Context, applicationId: string) {
  const rows = await ctx.db
    .select({ id: organizations.id, name: organizations.name, zone: organizations.zone })
    .from(applicationOrganizations)
    .innerJoin(organizations, eq(organizations.id, applicationOrganizations.organizationId))
    .where(eq(applicationOrganizations.applicationId, applicationId))
    .orderBy(sql`${applicationOrganizations.role} <> 'operator'`, organizations.name)
  return rows.filter((row, index) => rows.findIndex((one) => one.id === row.id) === index)
}

async function contactsOf(ctx: Context, organizationIds: string[]) {
  return ctx.db
    .select()
    .from(contacts)
    .where(inArray(contacts.organizationId, organizationIds))
    .orderBy(contacts.name)
}

async function othersWith(ctx: Context, applicationId: string, organizationIds: string[]) {
  const operators = alias(organizations, 'operators')
  const party = alias(applicationOrganizations, 'operator_of')
  const shared = ctx.db
    .select({ id: applicationOrganizations.applicationId })
    .from(applicationOrganizations)
    .where(inArray(applicationOrganizations.organizationId, organizationIds))
  return ctx.db
    .select({ id: applications.id, projectName: projects.name, operator: operators.shortName })
    .from(applications)
    .innerJoin(projects, eq(projects.id, applications.projectId))
    .innerJoin(party, and(eq(party.applicationId, applications.id), eq(party.role, 'operator')))
    .innerJoin(operators, eq(operators.id, party.organizationId))
    .where(and(ne(applications.id, applicationId), inArray(applications.id, shared)))
    .orderBy(projects.name)
}
