'use client'

import { memo } from 'react'
import { figure } from '@/components/chart/scale'
import { FileDrop, type FileInHand } from '@/components/ui/file-drop'
import { SelectField } from '@/components/ui/text-fields'
import { StateWord } from '@/components/ui/state-word'
import type { Weather } from '@/lib/schemas/weather'

interface WeatherPanelProps {
  items: readonly Weather[]
  chosen?: Weather
  onChoose: (id: string) => void
  /** Left out for those who may not upload. */
  onFiles?: (files: File[]) => void
  files: readonly FileInHand[]
  /** What a refused file was refused for, line by line. */
  refusals: readonly string[]
}

const kinds = {
  tmy3: 'TMY3, typical year',
  epw: 'EPW, typical year',
  synthetic: 'synthetic, not measured',
} as const

/** The weather year of the figures: choose a kept one or send a file; its report in words. */
export function WeatherPanel(props: WeatherPanelProps) {
  const { items, chosen, onChoose, onFiles, files, refusals } = props
  return (
    <section aria-label="Weather" className="mt-8 grid gap-x-8 gap-y-4 lg:grid-cols-2">
      <div className="min-w-0">
        <h2 className="text-[1.0625rem]">Weather</h2>
        <SelectField
          name="weatherId"
          label="Weather year"
          value={chosen?.id ?? ''}
          emptyLabel={chosen ? undefined : 'Choose a weather year'}
          options={items.map((one) => ({
            value: one.id,
            label: `${one.name} (${kinds[one.kind]})`,
          }))}
          onChange={({ target }) => onChoose(target.value)}
        />
        {onFiles && (
          <div className="mt-3">
            <FileDrop
              label="Another station file"
              hint="TMY3 CSV or EPW, up to 20 MB"
              accept=".csv,.epw"
              files={files}
              onFiles={onFiles}
            />
          </div>
        )}
        {refusals.length > 1 && (
          <ul role="alert" className="text-late mt-2 grid gap-1 text-sm">
            {refusals.slice(0, 8).map((line) => (
              <li key={line}>{line}</li>
            ))}
            {refusals.length > 8 && <li>{refusals.length - 8} more of the kind.</li>}
          </ul>
        )}
      </div>
      {chosen && <WeatherReport weather={chosen} />}
    </section>
  )
}

const WeatherReport = memo(function WeatherReport({ weather }: { weather: Weather }) {
  const { meta, report } = weather
  const { annual, missingHours, closure } = report
  const rows = [
    ['Station', `${weather.name}, ${meta.stationId}`],
    ['Kind', kinds[weather.kind]],
    [
      'Place',
      `${figure(meta.latitudeDeg, 2)}°, ${figure(meta.longitudeDeg, 2)}°, ${figure(meta.elevationM, 0)} m, UTC ${figure(meta.utcOffsetHours, 1)} h`,
    ],
    ['Rows read', figure(report.rowsRead, 0)],
    ['Gaps', report.gaps.length === 0 ? 'none' : report.gaps.join(', ')],
    [
      'Filled in',
      `${missingHours.dryBulb} h of dry bulb, ${missingHours.wind} h of wind; irradiance never`,
    ],
    ['Flagged by the source', `${report.flaggedHours} h`],
    [
      'Sums of the year',
      `GHI ${figure(annual.ghiKwhPerM2, 0)}, DNI ${figure(annual.dniKwhPerM2, 0)}, DHI ${figure(annual.dhiKwhPerM2, 0)} kWh/m²`,
    ],
    [
      'Dry bulb',
      `${figure(report.dryBulbC.min, 1)} to ${figure(report.dryBulbC.max, 1)} °C, mean ${figure(report.dryBulbC.mean, 1)} °C`,
    ],
  ] as const
  return (
    <div className="min-w-0">
      <h3>What was read</h3>
      <dl className="mt-1">
        {rows.map(([term, value]) => (
          <div
            key={term}
            className="border-rule-2 grid grid-cols-[9rem_minmax(0,1fr)] gap-3 border-b py-1.5"
          >
            <dt className="text-ink-2">{term}</dt>
            <dd className="break-words">{value}</dd>
          </div>
        ))}
      </dl>
      <p className="mt-2">
        <StateWord tone={closure.agrees ? 'ok' : 'missed'}>{closure.words}</StateWord>
      </p>
      {report.defectHours.length > 0 && (
        <>
          <p className="text-soon mt-2 font-medium">
            {report.defectHours.length === 1
              ? 'One hour cannot be right; it is kept as printed:'
              : `${report.defectHours.length} hours cannot be right; they are kept as printed:`}
          </p>
          <ul className="text-sm">
            {report.defectHours.slice(0, 5).map((hour) => (
              <li key={`${hour.row} ${hour.kind}`}>{hour.message}</li>
            ))}
          </ul>
        </>
      )}
    </div>
  )
})
