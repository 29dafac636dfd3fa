import { randomUUID } from 'node:crypto'
import { seedHouse, type SeededHouse } from '@/db/demo/seed-house'
import type { Db } from '@/db/client'
import type { DemoPerson } from '@/db/demo/organizations'
import { demoPeople } from '@/db/demo/organizations'
import type { ApplicationView } from '@/lib/schemas/application'
import { newApplicationInput } from '@/lib/schemas/application'
import { factInput, type FactInput } from '@/lib/schemas/fact'
import { createApplication } from '@/lib/services/applications'
import type { Context } from '@/lib/services/context'
import { recordFact } from '@/lib/services/facts'

/** People, organizations, calendars and procedures in a fresh test database. */
export function makeHouse(db: Db): Promise<SeededHouse> {
  return seedHouse(db, new Date('2026-01-05T12:00:00Z'), 'a long demo password')
}

/** A person of the house acting at an instant. */
export function as(db: Db, house: SeededHouse, who: DemoPerson, now: string): Context {
  const person = demoPeople.find((one) => one.key === who)!
  return {
    actor: {
      kind: 'person',
      id: house.people[who].id,
      name: person.name,
      roles: [...person.roles],
      zone: person.zone,
    },
    db,
    now: new Date(now),
    requestId: 'test',
  }
}

let made = 0

/** A fresh application at an organization on a procedure. */
export async function makeApplication(
  ctx: Context,
  house: SeededHouse,
  {
    organization = 'ave',
    procedure = 'federal_fast_track',
  }: { organization?: keyof SeededHouse['organizations']; procedure?: string } = {},
): Promise<ApplicationView> {
  made += 1
  return createApplication(
    ctx,
    newApplicationInput.parse({
      id: randomUUID(),
      project: { name: `Test Meadow ${made}` },
      entityName: 'Test Meadow Solar, LLC',
      operatorId: house.organizations[organization].id,
      procedureRevisionId: house.procedures[procedure],
      terms: { requestedMw: 2, dcMw: 2.6, poi: '12.47 kV feeder 1', poiVoltageKv: 12.47 },
    }),
  )
}

/** Records a fact with a fresh id unless one is given. */
export function record(
  ctx: Context,
  applicationId: string,
  fact: Omit<FactInput, 'id'> & { id?: string },
): Promise<ApplicationView> {
  return recordFact(ctx, applicationId, factInput.parse({ id: randomUUID(), ...fact }))
}
