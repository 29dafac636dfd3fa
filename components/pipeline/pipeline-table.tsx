import type { ReactNode } from 'react'
import { leftTone } from '@/components/applications/clock-words'
import { lineModelOf } from '@/components/line/line-of-items'
import { StepLineSmall } from '@/components/line/step-line-small'
import { nextDateWords, titleWithRound } from '@/components/pipeline/clock-text'
import { dcAcWords, megawattWords } from '@/components/pipeline/figures'
import { sortAddress, sortOf } from '@/components/pipeline/pipeline-address'
import { type Column, DataTable } from '@/components/ui/data-table'
import { LeftFigure } from '@/components/ui/left-figure'
import { pagePalette } from '@/components/ui/page-palette'
import { routes } from '@/lib/routes'
import type { PipelineFilter, PipelineRow } from '@/lib/schemas/application'

interface PipelineTableProps {
  rows: readonly PipelineRow[]
  filter: PipelineFilter
  empty: ReactNode
}

/** Every application in a row with its step line and its next clock; a row opens the application. */
export function PipelineTable({ rows, filter, empty }: PipelineTableProps) {
  return (
    <DataTable
      caption="Applications"
      columns={columns}
      rows={rows}
      rowKey={(row) => row.id}
      rowHref={(row) => routes.application(row.id)}
      sort={sortOf(filter)}
      sortHref={(sort) => sortAddress(filter, sort)}
      empty={empty}
    />
  )
}

const columns: readonly Column<PipelineRow>[] = [
  { key: 'project', header: 'Project', sortBy: 'project', cell: (row) => <Project row={row} /> },
  {
    key: 'request',
    header: 'Request, POI',
    phone: 'hide',
    cell: (row) => (
      <>
        <span className="mono block whitespace-nowrap">
          {row.requestNo ?? (row.standing === 'preparing' ? 'draft' : 'no number')}
        </span>
        <span className="cap block">{row.poi}</span>
      </>
    ),
  },
  {
    key: 'mw',
    header: 'MWac',
    sortBy: 'mwAc',
    align: 'end',
    mono: true,
    phone: 'hide',
    cell: (row) => megawattWords(row.mwAc),
  },
  {
    key: 'ratio',
    header: 'DC/AC',
    align: 'end',
    mono: true,
    phone: 'hide',
    className: 'whitespace-nowrap',
    cell: dcAcWords,
  },
  {
    key: 'line',
    header: 'Sequence',
    phone: 'bare',
    className: 'max-sm:order-1 lg:w-[16.5rem]',
    cell: (row) => (
      <StepLineSmall
        steps={lineModelOf(row.line, row.todayOn).steps}
        palette={pagePalette}
        title={`Sequence of ${row.project}`}
      />
    ),
  },
  {
    key: 'next',
    header: 'Next clock',
    sortBy: 'next',
    phone: 'bare',
    cell: (row) => <NextClock row={row} />,
  },
  {
    key: 'left',
    header: 'Left',
    phone: 'aside',
    className: 'lg:w-40',
    cell: (row) => <Left row={row} />,
  },
]

function Project({ row }: { row: PipelineRow }) {
  const size = row.mwAc === null ? '' : ` · ${megawattWords(row.mwAc)} MWac`
  return (
    <>
      <strong className="block text-lg font-semibold">{row.project}</strong>
      <span className="cap block">
        {row.operator}
        <span className="sm:hidden">{size}</span>
      </span>
    </>
  )
}

const settledWords: Partial<Record<PipelineRow['standing'], string>> = {
  withdrawn: 'Withdrawn',
  in_operation: 'In operation',
}

function NextClock({ row }: { row: PipelineRow }) {
  if (!row.next) {
    return <span className="text-ink-2">{settledWords[row.standing] ?? 'Nothing is running'}</span>
  }
  return (
    <>
      <span className="block">{titleWithRound(row.next)}</span>
      <span className="mono text-ink-2 block text-sm">{nextDateWords(row.next, row.todayOn)}</span>
    </>
  )
}

function Left({ row }: { row: PipelineRow }) {
  const tone = row.next && leftTone(row.next)
  if (!row.next || !tone || row.next.standing.businessDays === null) return null
  return <LeftFigure tone={tone}>{row.next.standing.left}</LeftFigure>
}
