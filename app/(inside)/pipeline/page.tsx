import type { Metadata } from 'next'
import { NoApplications } from '@/components/pipeline/no-applications'
import { pipelineFilterOf } from '@/components/pipeline/pipeline-address'
import { PipelineFilters } from '@/components/pipeline/pipeline-filters'
import { PipelineTable } from '@/components/pipeline/pipeline-table'
import { TotalsBlock } from '@/components/pipeline/totals-block'
import { LinkButton } from '@/components/ui/link-button'
import { pageContext } from '@/lib/auth/page-person'
import { can } from '@/lib/domain/access'
import { routes } from '@/lib/routes'
import { listApplications } from '@/lib/services/pipeline'

export const metadata: Metadata = { title: 'Pipeline' }

interface PipelinePageProps {
  searchParams: Promise<Record<string, string | string[] | undefined>>
}

export default async function PipelinePage({ searchParams }: PipelinePageProps) {
  const ctx = await pageContext()
  const filter = pipelineFilterOf(await searchParams)
  const { items, organizations, totals } = await listApplications(ctx, filter)
  const mayCreate = can(ctx.actor.roles, 'application.create')
  const isFirst = organizations.length === 0
  const empty = <NoApplications isFirst={isFirst} filter={filter} mayCreate={mayCreate} />
  return (
    <>
      <div className="mb-4 flex min-h-9 flex-wrap items-center justify-between gap-3">
        <h1>Pipeline</h1>
        {mayCreate && (
          <LinkButton look="primary" href={routes.newApplication()}>
            New application
          </LinkButton>
        )}
      </div>
      {isFirst ? (
        empty
      ) : (
        <>
          <TotalsBlock totals={totals} />
          <PipelineFilters organizations={organizations} shown={items.length} />
          <div className="max-sm:border-ink mt-3 max-sm:border-t-[1.5px]">
            <PipelineTable rows={items} filter={filter} empty={empty} />
          </div>
          <p className="cap mt-3">
            Round contact: ours. Square: theirs. Bar: a gate, several obligations by one date.
            Raised blade: open. Copper: closed. Shows paperwork, not the state of equipment.
          </p>
        </>
      )}
    </>
  )
}
