'use client'

import { clsx } from 'clsx'
import type { ReactNode } from 'react'
import { figure } from '@/components/chart/scale'
import {
  ClippingPart,
  DurationPart,
  HoursPart,
  LossPart,
  MonthsPart,
  type YearProps,
} from '@/components/design/year-charts'
import { Caution } from '@/components/ui/caution'

interface YearSheetProps {
  /** Absent until the first run is done. */
  shown?: YearProps
  /** What stands at the left: the plant. */
  plant: ReactNode
  /** What stands in place of the figures while there are none. */
  waiting: ReactNode
  /** Number of the run, for whoever follows the figures. */
  seq?: number
  /** The figures belong to an earlier plant or weather year. */
  stale?: boolean
}

/** The plant at the left, its year beside it, the losses below. */
export function YearSheet({ shown, plant, waiting, seq, stale }: YearSheetProps) {
  const look = clsx('grid min-w-0 content-start', stale && 'opacity-55')
  return (
    <>
      <div className="mt-6 grid gap-x-8 gap-y-8 lg:grid-cols-[19rem_minmax(0,1fr)] xl:grid-cols-[20rem_minmax(0,1fr)_21rem]">
        <section aria-label="Plant" className="min-w-0 max-xl:lg:row-span-2">
          <h2 className="text-[1.0625rem]">Plant</h2>
          {plant}
        </section>
        {shown ? (
          <>
            <div data-run={seq} aria-busy={stale ?? false} className={clsx(look, 'gap-8')}>
              <ClippingPart {...shown} />
              <DurationPart {...shown} />
              <MonthsPart {...shown} />
            </div>
            <div className="grid min-w-0 content-start gap-7">
              <div className={clsx(look, 'gap-7')}>
                <HoursPart {...shown} />
                <YearFigures {...shown} />
              </div>
              <Caution>
                Estimate for the application only. A licensed engineer reviews the design; the
                utility’s requirements and local code come first.
              </Caution>
            </div>
          </>
        ) : (
          <div className="min-h-[34rem]">{waiting}</div>
        )}
      </div>
      {shown && (
        <div className={clsx('mt-8', stale && 'opacity-55')}>
          <LossPart {...shown} />
        </div>
      )}
    </>
  )
}

/** The year's figures that no chart says. */
function YearFigures({ year, design }: YearProps) {
  const { annual, subHourly, nextMwdcKwh } = year
  const { lowPoints, highPoints } = subHourly
  const rows = [
    ['The next MWdc yields', `${figure(nextMwdcKwh / 1000, 0)} MWh`],
    ['Sub-hourly, not in the total', `+${figure(lowPoints, 1)} to ${figure(highPoints, 1)} points`],
    [
      `Capacity factor on ${figure(design.exportLimitMw, 1)} MWac`,
      `${figure(100 * annual.acCapacityFactor, 1)} %`,
    ],
  ] as const
  return (
    <dl>
      {rows.map(([term, value]) => (
        <div
          key={term}
          className="border-rule flex items-baseline justify-between gap-4 border-b py-2.5"
        >
          <dt>{term}</dt>
          <dd className="mono text-right">{value}</dd>
        </div>
      ))}
    </dl>
  )
}
