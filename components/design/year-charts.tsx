'use client'

import { memo, type ReactNode } from 'react'
import { ClippingCurve } from '@/components/chart/clipping-curve'
import { DurationCurve } from '@/components/chart/duration-curve'
import { HourMonthGrid } from '@/components/chart/hour-month-grid'
import { LossChain } from '@/components/chart/loss-chain'
import type { LossPlace } from '@/components/chart/losses'
import { MonthBars } from '@/components/chart/month-bars'
import { figure } from '@/components/chart/scale'
import { ChartBox } from '@/components/design/chart-box'
import { metrics } from '@/components/drawing/metrics'
import { pagePalette } from '@/components/ui/page-palette'
import { plantOf, type Design } from '@/lib/domain/plant/design'
import type { DesignYear } from '@/lib/domain/plant/design-year'

export interface YearProps {
  year: DesignYear
  design: Design
}

const common = { palette: pagePalette, metrics }

function Part({ title, note, children }: { title: string; note?: string; children: ReactNode }) {
  return (
    <section className="min-w-0">
      <h2 className="text-[1.0625rem]">{title}</h2>
      {note && <p className="cap mt-0.5">{note}</p>}
      {children}
    </section>
  )
}

/** Energy clipped against array over export limit, with the plant's own point. */
export const ClippingPart = memo(function ClippingPart({ year }: YearProps) {
  const { annual, poiRatios } = year
  const points = poiRatios.map(({ dcPerPoi, limitedFraction }) => ({
    ratio: dcPerPoi,
    lostFraction: limitedFraction,
  }))
  const at = { ratio: annual.dcPerPoiKw ?? 0, lostFraction: annual.limitedFraction }
  return (
    <Part title="Clipped a year, against array over export limit">
      <ChartBox fallback={600} height={290}>
        {(width) => (
          <ClippingCurve
            {...common}
            points={points}
            at={at}
            ratioName="array over export limit"
            width={width}
            height={290}
          />
        )}
      </ChartBox>
    </Part>
  )
})

/** The duration curve with the limits and what they take. */
export const DurationPart = memo(function DurationPart({ year, design }: YearProps) {
  const { annual, durationCurve } = year
  const plant = plantOf(design)
  const keep = 1 - (plant.acLossFraction ?? 0)
  const invertersKw = plant.inverterAcKw * keep
  const limitKw = plant.poiLimitKw ?? invertersKw
  const limits = [
    {
      kw: invertersKw,
      label: `${megawatts(invertersKw)} inverters, after losses`,
      clips: invertersKw < limitKw,
    },
    {
      kw: limitKw,
      label: `${megawatts(limitKw)} export limit at the POI`,
      clips: limitKw <= invertersKw,
    },
  ]
  return (
    <Part title="Hours a year at or above each output, MW before the limit">
      <ChartBox fallback={600} height={270}>
        {(width) => (
          <DurationCurve
            {...common}
            points={durationCurve}
            limits={limits}
            clippedKwh={clippedKwhOf(annual, keep)}
            clippedHours={Math.max(annual.hoursAtPoiLimit, annual.hoursAtInverterLimit)}
            width={width}
            height={270}
          />
        )}
      </ChartBox>
    </Part>
  )
})

/** When it clips: hour of the day by month. */
export const HoursPart = memo(function HoursPart({ year }: YearProps) {
  return (
    <Part
      title="Where the clipping falls"
      note="Hour ending, standard time, by month. Denser hatch: more MWh."
    >
      <ChartBox fallback={360} height={300}>
        {(width) => (
          <HourMonthGrid
            {...common}
            kwhByHourAndMonth={year.clippedByHourAndMonth}
            title="Clipped energy"
            width={width}
            height={300}
          />
        )}
      </ChartBox>
    </Part>
  )
})

/** Energy at the POI month by month. */
export const MonthsPart = memo(function MonthsPart({ year, design }: YearProps) {
  const keep = 1 - design.acLossFraction
  const months = year.monthly.map((month) => ({
    month: month.month,
    exportKwh: month.exportKwh,
    clippedKwh: clippedKwhOf(month, keep),
  }))
  return (
    <Part title="Energy at the POI by month">
      <ChartBox fallback={600} height={220}>
        {(width) => <MonthBars {...common} months={months} width={width} height={220} />}
      </ChartBox>
    </Part>
  )
})

/** Losses along the one-line, from the array to the POI. */
export const LossPart = memo(function LossPart(props: YearProps) {
  return (
    <Part
      title="From the array to the POI"
      note="From the array’s STC rating under the light on its plane; each loss of what arrives there."
    >
      <ChartBox fallback={1100} height={150}>
        {(width) => <LossChain {...common} places={lossPlaces(props)} width={width} />}
      </ChartBox>
    </Part>
  )
})

/** The chain's losses as fractions of what arrives; the array's energy is its STC rating at the plane. */
export function lossPlaces({ year, design }: YearProps): LossPlace[] {
  const { annual } = year
  const plant = plantOf(design)
  const atRating = annual.poaKwhPerM2 * plant.dcKw
  const beforeDc = annual.dcKwh / (1 - plant.dcLossFraction)
  const poi = {
    label: 'Curtailed at the export limit',
    fraction: annual.curtailedFraction,
    clips: true,
  }
  const inverter = {
    label: 'Clipped by the inverters',
    fraction: annual.clippedFraction,
    clips: true,
  }
  return [
    {
      kind: 'pv_array',
      title: 'Array',
      energyKwh: atRating,
      losses: [
        { label: 'Incidence and temperature', fraction: 1 - ratio(beforeDc, atRating) },
        { label: 'DC losses together', fraction: plant.dcLossFraction },
      ],
    },
    {
      kind: 'inverter',
      title: 'Inverters',
      energyKwh: annual.dcKwh,
      losses: [
        { label: 'Inverter efficiency', fraction: 1 - ratio(annual.acUnclippedKwh, annual.dcKwh) },
        ...(inverter.fraction > 0 ? [inverter] : []),
      ],
    },
    {
      kind: 'transformer',
      title: 'Transformers',
      energyKwh: annual.acKwh,
      losses: [
        { label: 'Transformers and line', fraction: plant.acLossFraction ?? 0 },
        ...(poi.fraction > 0 ? [poi] : []),
      ],
    },
    { kind: 'poi', title: 'At the POI', energyKwh: annual.exportKwh, losses: [] },
  ]
}

/** Both kinds of clipping as energy that would have reached the POI, kWh. */
function clippedKwhOf(
  energy: { inverterClippedKwh: number; poiCurtailedKwh: number },
  keep: number,
): number {
  return energy.inverterClippedKwh * keep + energy.poiCurtailedKwh
}

const ratio = (part: number, whole: number) => (whole > 0 ? part / whole : 1)
const megawatts = (kw: number) => `${figure(kw / 1000, kw < 10_000 ? 2 : 1)} MW`
