import { ApplicationMenu } from '@/app/(inside)/applications/[id]/_components/application-menu'
import { sizeWords } from '@/components/applications/term-words'
import { LinkTabs } from '@/components/ui/link-tabs'
import { TitleBlock, type TitleCell } from '@/components/ui/title-block'
import { type ApplicationTab, routes } from '@/lib/routes'
import type { ApplicationView } from '@/lib/schemas/application'

/** The tabs whose pages exist; the others join as they are built. */
const tabs: readonly { tab: ApplicationTab; label: string }[] = [
  { tab: 'sequence', label: 'Sequence' },
  { tab: 'clocks', label: 'Clocks' },
  { tab: 'design', label: 'Design' },
  { tab: 'exhibits', label: 'Exhibits' },
  { tab: 'correspondence', label: 'Correspondence' },
  { tab: 'record', label: 'Record' },
]

/** The title block of an application, its tabs and what can be done with the request as a whole. */
export function ApplicationHead({
  view,
  mayRecord,
}: {
  view: ApplicationView
  mayRecord: boolean
}) {
  return (
    <>
      <TitleBlock label="Application" cells={titleCells(view)} />
      <div className="flex items-start justify-between gap-x-6 max-sm:flex-col-reverse sm:items-center">
        <div className="min-w-0 flex-1 max-sm:w-full">
          <LinkTabs
            label="Application"
            tabs={tabs.map(({ tab, label }) => ({
              href: routes.application(view.id, tab),
              label,
            }))}
          />
        </div>
        {mayRecord && (
          <ApplicationMenu standing={view.standing} requestNo={view.terms.requestNo ?? null} />
        )}
      </div>
    </>
  )
}

const standingWords: Record<ApplicationView['standing'], string> = {
  preparing: 'in preparation',
  filed: 'filed',
  in_operation: 'in operation',
  withdrawn: 'withdrawn',
}

function titleCells(view: ApplicationView): TitleCell[] {
  const { project, operator, desk, terms, stage, standing } = view
  return [
    {
      caption: 'Project',
      value: project.name,
      heading: true,
      grow: 3,
      note: [project.town, view.entity?.name].filter(Boolean).join(' · ') || undefined,
    },
    {
      caption: desk ? `Utility, ${desk}` : 'Utility',
      value: operator.name,
      grow: 2,
      note:
        view.others.map((one) => `${roleWords(one.role)}: ${one.name}`).join(' · ') || undefined,
    },
    {
      caption: 'Point of interconnection',
      value: terms.poi ?? 'not given yet',
      grow: 2,
      note: terms.poiVoltageKv === undefined ? undefined : `${terms.poiVoltageKv} kV`,
    },
    {
      caption: 'Request',
      value: terms.requestNo ?? 'no number yet',
      mono: terms.requestNo !== undefined,
    },
    { caption: 'At the POI / array', value: sizeWords(terms), grow: 2 },
    {
      caption: 'Stage',
      value: standing === 'withdrawn' ? 'Withdrawn' : stage,
      note: standing === 'withdrawn' ? `in ${stage}` : standingWords[standing],
    },
  ]
}

function roleWords(role: string): string {
  const words = role.replaceAll('_', ' ')
  return `${words.slice(0, 1).toUpperCase()}${words.slice(1)}`
}
