import { energyFigure, figure } from '@/components/chart/scale'
import { TitleBlock } from '@/components/ui/title-block'
import type { DesignYear } from '@/lib/domain/plant/design-year'

interface YearTitleProps {
  /** `Juniper Flat, no. 5`. */
  name: string
  note: string
  year?: DesignYear
  weather?: { name: string; synthetic: boolean }
}

/** The title block of a clipping calculation, live or frozen. */
export function YearTitle({ name, note, year, weather }: YearTitleProps) {
  const annual = year?.annual
  const or = (value: string | undefined) => value ?? '–'
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
          value: or(annual && `${figure(100 * annual.limitedFraction, 1)} %`),
        },
        { caption: 'At the POI, a year', value: or(annual && energyFigure(annual.exportKwh)) },
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
