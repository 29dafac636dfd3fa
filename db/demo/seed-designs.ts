import { randomUUID } from 'node:crypto'
import { demoDesigns, demoWeather, type DemoRevision, type DemoWeather } from '@/db/demo/designs'
import { designRevisionInput } from '@/lib/schemas/design'
import { freezeCalculation } from '@/lib/services/calculations'
import type { Context } from '@/lib/services/context'
import { reviseDesign } from '@/lib/services/designs'
import { createSyntheticWeather } from '@/lib/services/weather'

export interface DesignSeed {
  /** The context of the engineer who would have done it, at an instant. */
  engineerAt: (at: Date) => Context
  now: Date
  /** Project and application by the project's name; a name that is absent is left out. */
  places: ReadonlyMap<string, { projectId: string; applicationId: string }>
}

const dayMs = 86_400_000

/** Weather years, design revisions and frozen calculations, through the services a person uses. */
export async function seedDesigns({ engineerAt, now, places }: DesignSeed): Promise<void> {
  const weatherIds = await seedWeather(engineerAt(new Date(now.getTime() - 420 * dayMs)))
  for (const { project, revisions } of demoDesigns) {
    const place = places.get(project)
    if (!place) continue
    for (const [baseNo, revision] of revisions.entries())
      await playRevision({ engineerAt, now, places }, place, baseNo, revision, weatherIds)
  }
}

async function seedWeather(ctx: Context): Promise<Record<DemoWeather, string>> {
  const ids = {} as Record<DemoWeather, string>
  for (const key of Object.keys(demoWeather) as DemoWeather[])
    ids[key] = (await createSyntheticWeather(ctx, demoWeather[key])).id
  return ids
}

async function playRevision(
  { engineerAt, now }: DesignSeed,
  { projectId, applicationId }: { projectId: string; applicationId: string },
  baseNo: number,
  revision: DemoRevision,
  weatherIds: Record<DemoWeather, string>,
): Promise<void> {
  const savedAt = now.getTime() - revision.daysAgo * dayMs
  const { id } = await reviseDesign(
    engineerAt(new Date(savedAt)),
    projectId,
    designRevisionInput.parse({
      id: randomUUID(),
      baseNo,
      body: revision.body,
      weatherId: weatherIds[revision.weather],
      note: revision.note,
    }),
  )
  if (revision.frozenAfterDays === undefined) return
  const frozenAt = new Date(Math.min(savedAt + revision.frozenAfterDays * dayMs, now.getTime()))
  await freezeCalculation(engineerAt(frozenAt), applicationId, {
    id: randomUUID(),
    designRevisionId: id,
  })
}
