import { randomUUID } from 'node:crypto'
import type { Page } from '@playwright/test'
import { bodyOf, readApplication, send, startApplication } from './applications'
import { demoDesigns, demoWeather } from '@/db/demo/designs'
import { api } from '@/lib/routes'
import type { Weather } from '@/lib/schemas/weather'

export const demoDesign = demoDesigns[0]!.revisions.at(-1)!.body

/** An application of its own with a design on a synthetic year; gives its id. */
export async function designedApplication(
  developer: Page,
  engineer: Page,
  name: string,
): Promise<string> {
  const id = await startApplication(developer, name)
  const { project } = await readApplication(engineer, id)
  const kept = await send(engineer, api.syntheticWeather(), demoWeather.mountain)
  const weather = await bodyOf<Weather>(kept)
  const revision = { id: randomUUID(), baseNo: 0, body: demoDesign, weatherId: weather.id }
  await bodyOf(await send(engineer, api.projectDesign(project.id), revision))
  return id
}
