'use client'

import { useQuery } from '@tanstack/react-query'
import { PrepareExhibit } from '@/app/(inside)/applications/[id]/exhibits/_components/prepare-exhibit'
import type {
  CalculationChoice,
  Reader,
} from '@/app/(inside)/applications/[id]/exhibits/_components/reader'
import { RevisionTable } from '@/app/(inside)/applications/[id]/exhibits/_components/revision-table'
import { Caution } from '@/components/ui/caution'
import { EmptyState } from '@/components/ui/empty-state'
import { LinkButton } from '@/components/ui/link-button'
import { exhibitsQuery } from '@/lib/client/exhibits'
import { exhibitTitles } from '@/lib/domain/exhibits'
import { routes } from '@/lib/routes'
import type { ExhibitList } from '@/lib/schemas/exhibit'

interface ExhibitsProps {
  applicationId: string
  first: ExhibitList
  calculations: readonly CalculationChoice[]
  reader: Reader
}

/** Exhibit C with its revisions; while a document is made the page asks for it by itself. */
export function Exhibits({ applicationId, first, calculations, reader }: ExhibitsProps) {
  const { data, dataUpdatedAt } = useQuery(exhibitsQuery(applicationId, first))
  const items = data?.items ?? first.items
  const mayPrepare = reader.mayPrepare && calculations.length > 0
  const press = (
    <PrepareExhibit
      applicationId={applicationId}
      calculations={calculations}
      revisions={items}
      reader={reader}
    />
  )
  if (items.length === 0)
    return (
      <div className="mt-6">
        <EmptyState
          title={`No exhibit C yet: ${exhibitTitles.C}`}
          actions={mayPrepare ? press : calculations.length === 0 && toDesign(applicationId)}
        >
          {calculations.length === 0
            ? 'It is filled from a frozen calculation, and none is frozen yet. An engineer freezes one on the design.'
            : 'An engineer prepares it from a frozen calculation, another engineer checks it, then it is issued.'}
        </EmptyState>
      </div>
    )
  return (
    <section className="mt-6">
      <div className="mb-3 flex flex-wrap items-end justify-between gap-x-6 gap-y-3">
        <div>
          <h2 className="text-lg">Exhibit C. {exhibitTitles.C}</h2>
          <p className="text-ink-2 text-sm">{standingOf(items)}</p>
        </div>
        {mayPrepare && press}
      </div>
      <RevisionTable items={items} reader={reader} askedAt={dataUpdatedAt} />
      <div className="mt-5 max-w-3xl">
        <Caution>
          A licensed engineer reviews an exhibit before it is submitted. The utility’s requirements
          and local code come first.
        </Caution>
      </div>
    </section>
  )
}

function toDesign(applicationId: string) {
  return <LinkButton href={routes.application(applicationId, 'design')}>Open the design</LinkButton>
}

function standingOf(items: ExhibitList['items']): string {
  const issued = items.find((one) => one.state === 'issued')
  if (!issued) return 'Nothing is issued yet.'
  return `Revision ${issued.revision} is ${issued.stateWords}.`
}
