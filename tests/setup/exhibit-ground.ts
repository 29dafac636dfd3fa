import { randomUUID } from 'node:crypto'
import { applications } from '@/db/schema/applications'
import { demoDesigns, demoWeather } from '@/db/demo/designs'
import type { SeededHouse } from '@/db/demo/seed-house'
import type { Db } from '@/db/client'
import { designRevisionInput, type DesignBody } from '@/lib/schemas/design'
import { freezeCalculation } from '@/lib/services/calculations'
import { reviseDesign } from '@/lib/services/designs'
import { createSyntheticWeather } from '@/lib/services/weather'
import { as, makeApplication } from '@/tests/factories/house'
import { eq } from 'drizzle-orm'

/** A small invented plant of 2 MWac: the demo's design, scaled to the request of the test house. */
export const smallDesign: DesignBody = {
  ...demoDesigns[0]!.revisions.at(-1)!.body,
  modulesPerString: 25,
  strings: 180,
  inverter: {
    ...demoDesigns[0]!.revisions.at(-1)!.body.inverter,
    count: 1,
    ratedKva: 2400,
    ratedKw: 2400,
  },
  exportLimitMw: 2,
  transformers: [
    {
      ...demoDesigns[0]!.revisions.at(-1)!.body.transformers[1]!,
      count: 1,
      mva: 2.5,
      highKv: 12.47,
    },
  ],
}

export interface ExhibitGround {
  applicationId: string
  projectId: string
  weatherId: string
  designRevisionId: string
}

/** An application with one design revision on a synthetic year and its frozen calculation no. 1. */
export async function makeExhibitGround(
  db: Db,
  house: SeededHouse,
  now: string,
): Promise<ExhibitGround> {
  const application = await makeApplication(as(db, house, 'developer', now), house)
  const engineer = as(db, house, 'engineer', now)
  const [row] = await db.select().from(applications).where(eq(applications.id, application.id))
  const projectId = row!.projectId
  const { id: weatherId } = await createSyntheticWeather(engineer, demoWeather.mountain)
  const ground = { applicationId: application.id, projectId, weatherId }
  const designRevisionId = await addDesign(db, house, now, ground, 0)
  await freeze(db, house, now, { ...ground, designRevisionId })
  return { ...ground, designRevisionId }
}

/** The next design revision. @returns its id */
export async function addDesign(
  db: Db,
  house: SeededHouse,
  now: string,
  { projectId, weatherId }: Pick<ExhibitGround, 'projectId' | 'weatherId'>,
  baseNo: number,
  change: Partial<DesignBody> = {},
): Promise<string> {
  const id = randomUUID()
  const input = { id, baseNo, body: { ...smallDesign, ...change }, weatherId, note: 'for a test' }
  await reviseDesign(as(db, house, 'engineer', now), projectId, designRevisionInput.parse(input))
  return id
}

/** The next frozen calculation of the ground's design revision. */
export async function freeze(
  db: Db,
  house: SeededHouse,
  now: string,
  { applicationId, designRevisionId }: Pick<ExhibitGround, 'applicationId' | 'designRevisionId'>,
): Promise<void> {
  const input = { id: randomUUID(), designRevisionId }
  await freezeCalculation(as(db, house, 'engineer', now), applicationId, input)
}
