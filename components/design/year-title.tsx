import { energyFigure, figure } from '@/components/chart/scale'
import type { ReactNode } from 'react'
import { TitleBlock } from '@/components/ui/title-block'
import type { DesignYear } from '@/lib/domain/plant/design-year'

interface YearTitleProps {
  /** `Juniper Flat, no. 5`. */
  name: string
  note: string
  year?: DesignYear
  weather?: { name: string; synthetic: boolean }
}

/** The title block of a clipping calculation, live or frozen; `data` carries the unrounded figures. */
export function YearTitle({ name, note, year, weather }: YearTitleProps) {
  const annual = year?.annual
  const or = (value: ReactNode) => value ?? '–'
  return (
    <TitleBlock
      label="Clipping calculation"
      cells={[
        { caption: 'Clipping calculation', value: name, grow: 3, note },
        {
          caption: 'Array over export limit',
          value: or(annual?.dcPerPoiKw === undefined ? undefined : figure(annual.dcPerPoiKw, 2)),
        },
        { caption: 'Array over inverters', value: or(annual && figure(annual.dcPerInverterKw, 2)) },
        {
          caption: 'Clipped a year',
          value: or(
            annual && (
              <data value={annual.limitedFraction}>
                {figure(100 * annual.limitedFraction, 1)} %
              </data>
            ),
          ),
        },
        {
          caption: 'At the POI, a year',
          value: or(
            annual && <data value={annual.exportKwh}>{energyFigure(annual.exportKwh)}</data>,
          ),
        },
        {
          caption: 'Weather',
          value: weather?.name ?? 'none chosen',
          grow: 2,
          note: weather?.synthetic ? 'synthetic from monthly means, not measured' : undefined,
        },
      ]}
    />
  )
}
