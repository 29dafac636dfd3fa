import { figure } from '@/components/chart/scale'
import type { DesignYear } from '@/lib/domain/plant/design-year'
import { percent } from '@/templates/exhibits/exhibit-c-figures'

export interface MonthlyTable {
  head: string[]
  rows: string[][]
  total: string[]
}

const NAMES = ['Jan', 'Feb', 'Mar', 'Apr', 'May', 'Jun', 'Jul', 'Aug', 'Sep', 'Oct', 'Nov', 'Dec']

type Energies = Pick<
  DesignYear['annual'],
  | 'poaKwhPerM2'
  | 'atPoiKwh'
  | 'poiCurtailedKwh'
  | 'inverterClippedKwh'
  | 'exportKwh'
  | 'hoursAtPoiLimit'
  | 'limitedFraction'
>

/** Month by month what reaches the POI and what the limits take; MWh. */
export function monthlyOf({ monthly, annual }: DesignYear): MonthlyTable {
  return {
    head: [
      'Month',
      'On the modules, kWh/m²',
      'At the POI before its limit, MWh',
      'Clipped by the export limit, MWh',
      'Clipped by the inverters, MWh',
      'Exported, MWh',
      'Hours at the export limit',
      'Clipped',
    ],
    rows: monthly.map((month) => [NAMES[month.month - 1] ?? '', ...cells(month)]),
    total: ['Year', ...cells(annual)],
  }
}

function cells(one: Energies): string[] {
  return [
    figure(one.poaKwhPerM2, 0),
    mwh(one.atPoiKwh),
    mwh(one.poiCurtailedKwh),
    mwh(one.inverterClippedKwh),
    mwh(one.exportKwh),
    figure(one.hoursAtPoiLimit, 0),
    percent(one.limitedFraction),
  ]
}

/** MWh without decimals from 10 on, one decimal below, `<0.1` where that would hide it. */
function mwh(kwh: number): string {
  const value = kwh / 1000
  if (value > 0 && value < 0.05) return '<0.1'
  return figure(value, value !== 0 && Math.abs(value) < 10 ? 1 : 0)
}
