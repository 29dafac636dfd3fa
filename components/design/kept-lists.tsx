import { energyFigure, figure } from '@/components/chart/scale'
import { DataTable, type Column } from '@/components/ui/data-table'
import { formatInstant } from '@/lib/domain/format-date'
import { routes } from '@/lib/routes'
import type { CalculationSummary, DesignRevision } from '@/lib/schemas/design'

interface KeptListsProps {
  applicationId: string
  calculations: readonly CalculationSummary[]
  revisions: readonly DesignRevision[]
  /** Names of weather years by id. */
  weatherNames: Readonly<Record<string, string>>
  zone: string
}

/** What was frozen and which designs were saved; nothing here ever changes. */
export function KeptLists(props: KeptListsProps) {
  const { applicationId, calculations, revisions, weatherNames, zone } = props
  return (
    <div className="mt-10 grid gap-8">
      <section>
        <h2 className="mb-1 text-[1.0625rem]">Frozen calculations</h2>
        <DataTable
          caption="Frozen calculations"
          columns={calculationColumns(zone)}
          rows={calculations}
          rowKey={(row) => row.id}
          rowHref={(row) => routes.calculation(applicationId, row.no)}
          empty={<p className="text-ink-2">None yet. An engineer freezes the figures as no. 1.</p>}
        />
      </section>
      <section>
        <h2 className="mb-1 text-[1.0625rem]">Design revisions</h2>
        <DataTable
          caption="Design revisions"
          columns={revisionColumns(zone, weatherNames)}
          rows={revisions}
          rowKey={(row) => row.id}
          empty={<p className="text-ink-2">None yet. Freezing saves the first.</p>}
        />
      </section>
    </div>
  )
}

function calculationColumns(zone: string): Column<CalculationSummary>[] {
  return [
    { key: 'no', header: 'Calculation', cell: (row) => `no. ${row.no}` },
    {
      key: 'clipped',
      header: 'Clipped a year',
      align: 'end',
      mono: true,
      phone: 'aside',
      cell: (row) => `${figure(100 * row.limitedFraction, 1)} %`,
    },
    {
      key: 'export',
      header: 'At the POI, a year',
      align: 'end',
      mono: true,
      cell: (row) => energyFigure(row.exportKwh),
    },
    {
      key: 'ratio',
      header: 'Array over export limit',
      align: 'end',
      mono: true,
      cell: (row) => figure(row.dcPerPoi, 2),
    },
    { key: 'design', header: 'Design', cell: (row) => `revision ${row.designNo}` },
    {
      key: 'weather',
      header: 'Weather',
      cell: (row) => `${row.weatherName}${row.synthetic ? ' (synthetic)' : ''}`,
    },
    { key: 'who', header: 'Frozen by', cell: (row) => row.recordedBy ?? 'the product' },
    { key: 'at', header: 'Frozen', mono: true, cell: (row) => formatInstant(row.recordedAt, zone) },
  ]
}

function revisionColumns(
  zone: string,
  weatherNames: Readonly<Record<string, string>>,
): Column<DesignRevision>[] {
  return [
    { key: 'no', header: 'Design', cell: (row) => `revision ${row.no}` },
    {
      key: 'array',
      header: 'Array',
      cell: ({ body }) =>
        `${body.modulesPerString} × ${figure(body.strings, 0)} ${body.module.name}`,
    },
    {
      key: 'inverters',
      header: 'Inverters',
      cell: ({ body }) => `${body.inverter.count} × ${body.inverter.name}`,
    },
    {
      key: 'limit',
      header: 'Export limit',
      align: 'end',
      mono: true,
      cell: ({ body }) => `${figure(body.exportLimitMw, 1)} MWac`,
    },
    {
      key: 'weather',
      header: 'Weather',
      cell: (row) => (row.weatherId && weatherNames[row.weatherId]) ?? 'none',
    },
    { key: 'note', header: 'What changed', phone: 'bare', cell: (row) => row.note ?? '' },
    { key: 'who', header: 'Saved by', cell: (row) => row.recordedBy ?? 'the product' },
    { key: 'at', header: 'Saved', mono: true, cell: (row) => formatInstant(row.recordedAt, zone) },
  ]
}
