import type { Metadata } from 'next'
import { readPageApplication } from '@/app/(inside)/applications/[id]/_read'
import { Exhibits } from '@/app/(inside)/applications/[id]/exhibits/_components/exhibits'
import { can } from '@/lib/domain/access'
import { listCalculations } from '@/lib/services/calculations'
import { listExhibits } from '@/lib/services/exhibits'

export const metadata: Metadata = { title: 'Exhibits' }

/** The technical exhibits of one request, revision by revision. */
export default async function ExhibitsPage({ params }: { params: Promise<{ id: string }> }) {
  const { ctx, view, roles } = await readPageApplication((await params).id)
  const items = await listExhibits(ctx, view.id)
  const calculations = await listCalculations(ctx, view.id)
  return (
    <Exhibits
      applicationId={view.id}
      first={{ items }}
      calculations={calculations.map(({ no, designNo, synthetic, weatherName, recordedAt }) => ({
        no,
        designNo,
        synthetic,
        weatherName,
        recordedAt,
      }))}
      reader={{
        id: ctx.actor.id,
        zone: ctx.actor.zone,
        todayOn: view.todayOn,
        mayPrepare: can(roles, 'exhibit.prepare'),
        mayCheck: can(roles, 'exhibit.check'),
        mayIssue: can(roles, 'exhibit.issue'),
      }}
    />
  )
}
