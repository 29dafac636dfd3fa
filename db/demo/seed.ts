import { randomUUID } from 'node:crypto'
import { DateTime } from 'luxon'
import { assignments } from '@/db/schema/applications'
import { demoPeople, type DemoOrganization, type DemoPerson } from '@/db/demo/organizations'
import { seedExhibits } from '@/db/demo/exhibits'
import { demoProjects } from '@/db/demo/projects'
import { seedDesigns } from '@/db/demo/seed-designs'
import { seedHouse, type SeededHouse } from '@/db/demo/seed-house'
import type { DemoEvent, DemoProject } from '@/db/demo/story'
import type { Db } from '@/db/client'
import type { CivilDate } from '@/lib/domain/clocks/civil-date'
import { entryInput } from '@/lib/schemas/entry'
import { factInput } from '@/lib/schemas/fact'
import { newApplicationInput } from '@/lib/schemas/application'
import { createApplication } from '@/lib/services/applications'
import type { Context } from '@/lib/services/context'
import { recordEntry } from '@/lib/services/entries'
import { recordFact } from '@/lib/services/facts'

export interface SeedOptions {
  db: Db
  now: Date
  password: string
}

/**
 * Makes the demo company by playing facts through the services a person uses, each as the person
 * who would have recorded it, on the day it happened.
 */
export async function seedDemo({ db, now, password }: SeedOptions): Promise<void> {
  const house = await seedHouse(db, now, password)
  const todayOn = DateTime.fromJSDate(now, { zone: 'America/New_York' }).toFormat('yyyy-MM-dd')
  const places = new Map<string, Place>()
  for (const project of demoProjects(todayOn))
    places.set(project.name, await playProject(db, now, house, project))
  await seedDesigns({
    engineerAt: (instant) => contextOf(db, house, 'engineer', instant),
    now,
    places,
  })
  await seedExhibits({
    db,
    now,
    personAt: (who, instant) => contextOf(db, house, who, instant),
    places,
  })
}

interface Place {
  projectId: string
  applicationId: string
}

async function playProject(
  db: Db,
  now: Date,
  house: SeededHouse,
  project: DemoProject,
): Promise<Place> {
  const applicationId = randomUUID()
  const organization = house.organizations[project.organization]
  const firstOn = project.events[0]?.on
  const openedAt = firstOn ? at(firstOn, '09:00', organization.zone, now, -3) : now
  const view = await createApplication(
    contextOf(db, house, 'developer', openedAt),
    newApplicationInput.parse({
      id: applicationId,
      project: {
        name: project.name,
        town: project.town,
        latitude: project.latitude,
        longitude: project.longitude,
      },
      entityName: `${project.name} Solar, LLC`,
      operatorId: organization.id,
      procedureRevisionId: house.procedures[project.procedure],
      terms: { ...project.terms, ...(project.requestNo && { requestNo: project.requestNo }) },
    }),
  )
  await assign(db, house, applicationId, openedAt)
  for (const event of project.events)
    await playEvent(db, now, house, organization, applicationId, event)
  return { projectId: view.project.id, applicationId }
}

async function assign(
  db: Db,
  house: SeededHouse,
  applicationId: string,
  recordedAt: Date,
): Promise<void> {
  const held: DemoPerson[] = ['developer', 'engineer', 'liaison', 'executive']
  await db.insert(assignments).values(
    held.map((role) => ({
      applicationId,
      step: '*',
      instance: 0,
      obligation: role,
      personId: house.people[role].id,
      recordedAt,
      recordedBy: house.people.developer.id,
    })),
  )
}

async function playEvent(
  db: Db,
  now: Date,
  house: SeededHouse,
  organization: SeededHouse['organizations'][DemoOrganization['key']],
  applicationId: string,
  event: DemoEvent,
): Promise<void> {
  const happenedAt = at(event.on, event.time ?? '11:00', organization.zone, now)
  const ctx = contextOf(
    db,
    house,
    event.by,
    new Date(Math.min(happenedAt.getTime() + 20 * 60_000, now.getTime())),
  )
  const hour =
    event.time && event.fact?.kind === 'happened' ? { receivedAt: happenedAt.toISOString() } : {}
  const fact = event.fact && { ...event.fact, ...hour, id: randomUUID() }
  if (!event.entry) {
    if (fact) await recordFact(ctx, applicationId, factInput.parse(fact))
    return
  }
  const local = DateTime.fromJSDate(happenedAt, { zone: organization.zone })
  await recordEntry(
    ctx,
    entryInput.parse({
      id: randomUUID(),
      on: local.toFormat('yyyy-MM-dd'),
      time: local.toFormat('HH:mm'),
      zone: organization.zone,
      organizationId: organization.id,
      visibility: 'shareable',
      ...event.entry,
      applications: [{ applicationId, step: event.fact?.step, instance: event.fact?.instance }],
      facts: fact ? [{ ...fact, applicationId }] : [],
    }),
  )
}

/** The instant of a local hour, never after now. */
function at(on: CivilDate, time: string, zone: string, now: Date, plusDays = 0): Date {
  const local = DateTime.fromISO(`${on}T${time}`, { zone }).plus({ days: plusDays })
  return new Date(Math.min(local.toMillis(), now.getTime() - 60_000))
}

function contextOf(db: Db, house: SeededHouse, by: DemoPerson, now: Date): Context {
  const person = demoPeople.find((one) => one.key === by)!
  return {
    actor: {
      kind: 'person',
      id: house.people[by].id,
      name: person.name,
      roles: [...person.roles],
      zone: person.zone,
    },
    db,
    now,
    requestId: 'demo',
  }
}
