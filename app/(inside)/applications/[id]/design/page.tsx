import type { Metadata } from 'next'
import { readPageApplication } from '@/app/(inside)/applications/[id]/_read'
import { DesignDesk } from '@/components/design/design-desk'
import { pageContext } from '@/lib/auth/page-person'
import { can } from '@/lib/domain/access'
import { listCalculations } from '@/lib/services/calculations'
import { listDesignRevisions } from '@/lib/services/designs'
import { listWeather } from '@/lib/services/weather'

export const metadata: Metadata = { title: 'Design' }

/** The plant of an application's project and its clipping, live while fields move. */
export default async function DesignPage({ params }: { params: Promise<{ id: string }> }) {
  const { id } = await params
  const ctx = await pageContext()
  const { view } = await readPageApplication(id)
  const [revisions, calculations, weather] = await Promise.all([
    listDesignRevisions(ctx, view.project.id),
    listCalculations(ctx, id),
    listWeather(ctx),
  ])
  return (
    <DesignDesk
      key={revisions[0]?.no ?? 0}
      applicationId={id}
      project={view.project}
      revisions={revisions}
      calculations={calculations}
      weather={weather}
      mayFreeze={can(ctx.actor.roles, 'calculation.freeze')}
      mayUpload={can(ctx.actor.roles, 'weather.upload')}
      zone={ctx.actor.zone}
    />
  )
}
