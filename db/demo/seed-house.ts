import { createHash } from 'node:crypto'
import { eq } from 'drizzle-orm'
import {
  calendarRevisions,
  calendars,
  contacts,
  organizations,
  procedureRevisions,
  procedures,
} from '@/db/schema/organizations'
import type { Db } from '@/db/client'
import { demoCalendars } from '@/db/demo/calendars'
import {
  demoOrganizations,
  demoPeople,
  type DemoOrganization,
  type DemoPerson,
} from '@/db/demo/organizations'
import { demoProcedures, procedureOwners } from '@/db/demo/procedures'
import type { Context } from '@/lib/services/context'
import { createPersonWithPassword } from '@/lib/services/people'

export interface SeededHouse {
  people: Record<DemoPerson, { id: string }>
  organizations: Record<DemoOrganization['key'], { id: string; zone: string }>
  /** Procedure key → id of its revision. */
  procedures: Record<string, string>
}

/** People, calendars, organizations and library procedures of the demo. */
export async function seedHouse(db: Db, now: Date, password: string): Promise<SeededHouse> {
  const calendarIds = await seedCalendars(db)
  const organizationRows = await seedOrganizations(db, calendarIds)
  const ids = await seedProcedures(db, organizationRows)
  return {
    people: await seedPeople(db, now, password),
    organizations: organizationRows,
    procedures: ids,
  }
}

async function seedPeople(db: Db, now: Date, password: string): Promise<SeededHouse['people']> {
  const ctx: Context = { actor: { kind: 'job', name: 'demo' }, db, now, requestId: 'demo' }
  const made: Partial<SeededHouse['people']> = {}
  for (const person of demoPeople)
    made[person.key] = await createPersonWithPassword(ctx, {
      email: `${person.key}@demo.test`,
      name: person.name,
      roles: [...person.roles],
      zone: person.zone,
      password,
    })
  return made as SeededHouse['people']
}

async function seedCalendars(db: Db): Promise<Record<string, string>> {
  const ids: Record<string, string> = {}
  for (const [key, { name, rules }] of Object.entries(demoCalendars)) {
    const [calendar] = await db
      .insert(calendars)
      .values({ key, name })
      .returning({ id: calendars.id })
    await db.insert(calendarRevisions).values({ calendarId: calendar!.id, no: 1, rules })
    ids[key] = calendar!.id
  }
  return ids
}

async function seedOrganizations(
  db: Db,
  calendarIds: Record<string, string>,
): Promise<SeededHouse['organizations']> {
  const made: Partial<SeededHouse['organizations']> = {}
  for (const { key, calendar, contacts: people, ...fields } of demoOrganizations) {
    const [organization] = await db
      .insert(organizations)
      .values({ ...fields, calendarId: calendarIds[calendar]! })
      .returning({ id: organizations.id, zone: organizations.zone })
    await db
      .insert(contacts)
      .values(people.map((contact) => ({ ...contact, organizationId: organization!.id })))
    made[key] = organization
  }
  return made as SeededHouse['organizations']
}

async function seedProcedures(
  db: Db,
  seeded: SeededHouse['organizations'],
): Promise<Record<string, string>> {
  const ids: Record<string, string> = {}
  for (const { key, title, body } of demoProcedures) {
    const owner = procedureOwners[key]
    const [procedure] = await db
      .insert(procedures)
      .values({ key, title, organizationId: owner ? seeded[owner].id : null })
      .returning({ id: procedures.id })
    const sha256 = createHash('sha256').update(JSON.stringify(body)).digest('hex')
    const [revision] = await db
      .insert(procedureRevisions)
      .values({ procedureId: procedure!.id, no: 1, body, sha256 })
      .returning({ id: procedureRevisions.id })
    ids[key] = revision!.id
  }
  return ids
}

/** Whether the database holds a company already. */
export async function isSeeded(db: Db): Promise<boolean> {
  const rows = await db
    .select({ id: organizations.id })
    .from(organizations)
    .where(eq(organizations.name, demoOrganizations[0]!.name))
  return rows.length > 0
}
