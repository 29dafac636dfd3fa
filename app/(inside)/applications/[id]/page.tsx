import type { Metadata } from 'next'
import { CurrentExhibits } from '@/app/(inside)/applications/[id]/_components/current-exhibits'
import { LatestEntries } from '@/app/(inside)/applications/[id]/_components/latest-entries'
import { OpenNow } from '@/app/(inside)/applications/[id]/_components/open-now'
import { Stranded } from '@/app/(inside)/applications/[id]/_components/stranded'
import { WhereItStands } from '@/app/(inside)/applications/[id]/_components/where-it-stands'
import { readPageApplication } from '@/app/(inside)/applications/[id]/_read'
import { zoneWords } from '@/components/applications/clock-words'
import { SequenceDrawing } from '@/components/applications/sequence-drawing'
import { runningClockOf } from '@/components/line/clock-of-items'
import { lineModelOf } from '@/components/line/line-of-items'
import { can } from '@/lib/domain/access'
import { listEntries } from '@/lib/services/entries'
import { listExhibits } from '@/lib/services/exhibits'

export const metadata: Metadata = { title: 'Sequence' }

interface PageProps {
  params: Promise<{ id: string }>
}

/** Where the request stands: its step line, what runs now, and the latest correspondence. */
export default async function SequencePage({ params }: PageProps) {
  const { ctx, view, roles } = await readPageApplication((await params).id)
  const [{ items: latest }, exhibits] = await Promise.all([
    listEntries(ctx, { applicationId: view.id, limit: 5 }),
    listExhibits(ctx, view.id),
  ])
  const mayRecord = can(roles, 'fact.record')
  const model = lineModelOf(view.items, view.todayOn, {
    running: runningClockOf(view.items, view.todayOn),
    zoneNote: `Times are ${zoneWords(view.operator.zone)}.`,
  })
  return (
    <>
      <WhereItStands view={view} mayRecord={mayRecord} />
      <SequenceDrawing model={model} title={`Sequence of ${view.project.name}`} />
      <Stranded view={view} mayCorrect={can(roles, 'fact.correct')} />
      <div className="mt-7 grid items-start gap-x-10 gap-y-9 lg:grid-cols-[minmax(0,3fr)_minmax(0,2fr)]">
        <OpenNow view={view} mayRecord={mayRecord} />
        <div className="grid gap-9">
          <CurrentExhibits applicationId={view.id} revisions={exhibits} />
          <LatestEntries
            applicationId={view.id}
            entries={latest}
            todayOn={view.todayOn}
            mayRecord={can(roles, 'entry.record')}
          />
        </div>
      </div>
    </>
  )
}
