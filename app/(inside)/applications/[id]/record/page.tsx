import type { Metadata } from 'next'
import { FactList } from '@/app/(inside)/applications/[id]/record/_components/fact-list'
import { readPageApplication } from '@/app/(inside)/applications/[id]/_read'
import { can } from '@/lib/domain/access'

export const metadata: Metadata = { title: 'Record' }

/** Every fact of the request in the order it was recorded; nothing is ever taken out. */
export default async function RecordPage({ params }: { params: Promise<{ id: string }> }) {
  const { ctx, view, roles } = await readPageApplication((await params).id)
  return (
    <FactList view={view} readerZone={ctx.actor.zone} mayCorrect={can(roles, 'fact.correct')} />
  )
}
