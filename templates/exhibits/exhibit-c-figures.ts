import { energyFigure, figure } from '@/components/chart/scale'
import type { ExhibitSource } from '@/lib/domain/exhibits'
import { megaOf, transformerWords, trimmed } from '@/lib/domain/one-line-of-design'
import { figuresOf, type Design } from '@/lib/domain/plant/design'
import type { ContentRow } from '@/templates/exhibits/exhibit-c-content'

/** The plant as modelled, element by element from the array to the grid. */
export function elementRows({ design, data }: ExhibitSource): ContentRow[] {
  const { module, inverter } = design
  const f = figuresOf(design)
  const modules = design.modulesPerString * design.strings
  return [
    {
      label: 'PV array',
      value: `${figure(f.dcMw, 2)} MWdc`,
      note: `${figure(modules, 0)} modules ${module.name}, ${trimmed(module.pmaxW)} W; ${figure(design.strings, 0)} strings of ${design.modulesPerString}`,
    },
    { label: 'Mounting', ...mountingWords(design) },
    {
      label: 'Inverters',
      value: `${figure(f.inverterMva, 2)} MVA`,
      note: `${inverter.count} × ${megaOf(inverter.ratedKva)} MVA, ${megaOf(inverter.ratedKw)} MW; ${inverter.name}`,
    },
    ...design.transformers.toReversed().map((one) => ({
      label: one.name,
      value: `${figure(one.count * one.mva, 1)} MVA`,
      note: `${transformerWords(one)}, X/R ${trimmed(one.xOverR)}, ${one.winding}`,
    })),
    {
      label: 'Loss from inverters to the POI',
      value: `${figure(design.acLossFraction * 100, 1)} %`,
      note: 'taken as a constant fraction',
    },
    {
      label: 'Losses of the array',
      value: `${figure(f.dcLossFraction * 100, 1)} %`,
      note: design.dcLosses
        .map((loss) => `${loss.name} ${trimmed(loss.fraction * 100)} %`)
        .join(', '),
    },
    {
      label: 'Point of interconnection',
      value:
        data.terms.poiVoltageKv === null
          ? 'kV not given'
          : `${trimmed(data.terms.poiVoltageKv)} kV`,
      note: [data.terms.poi, data.operator.name].filter(Boolean).join('; '),
    },
  ]
}

function mountingWords({ mounting }: Design): { value: string; note: string } {
  if (mounting.kind === 'fixed')
    return {
      value: 'fixed tilt',
      note: `tilt ${trimmed(mounting.tiltDeg)}°, azimuth ${trimmed(mounting.azimuthDeg)}° from north`,
    }
  const back = mounting.backtrack ? 'with backtracking' : 'without backtracking'
  return {
    value: 'single-axis tracker',
    note: `axis ${trimmed(mounting.axisAzimuthDeg)}°, up to ±${trimmed(mounting.maxRotationDeg)}°, ground cover ratio ${trimmed(mounting.groundCoverRatio, 2)}, ${back}`,
  }
}

/** The answer: limits, both ratios, what each limit takes in a year, and what is left. */
export function resultRows({ design, result, data, weatherName }: ExhibitSource): ContentRow[] {
  const { annual, subHourly } = result
  const limitMw = design.exportLimitMw
  const { poiMw } = data.terms
  return [
    {
      label: 'Export limit at the POI',
      value: `${trimmed(limitMw, 1)} MWac`,
      note: [
        `kept by ${design.limitKeptBy}`,
        poiMw === null ? '' : `${trimmed(poiMw, 1)} MWac in the request`,
      ]
        .filter(Boolean)
        .join('; '),
    },
    ...ratioRows(design, annual),
    {
      label: 'Clipped by the export limit',
      value: `${percent(annual.curtailedFraction)} a year`,
      note: lostWords(annual.poiCurtailedKwh, annual.hoursAtPoiLimit),
    },
    {
      label: 'Clipped by the inverters',
      value: `${percent(annual.clippedFraction)} a year`,
      note: lostWords(annual.inverterClippedKwh, annual.hoursAtInverterLimit),
    },
    {
      label: 'Clipped by both limits',
      value: `${percent(annual.limitedFraction)} a year`,
      note: `of ${energyFigure(annual.acUnclippedKwh)} a year without any limit, before the loss to the POI; within the hour ${figure(subHourly.lowPoints, 1)} to ${figure(subHourly.highPoints, 1)} points more, see section 4`,
    },
    {
      label: 'Energy at the POI',
      value: `${energyFigure(annual.exportKwh)} a year`,
      note: `${figure(annual.exportKwh / 1000, 0)} MWh; one more MWdc would add ${figure(result.nextMwdcKwh / 1000, 0)} MWh`,
    },
    {
      label: 'Capacity factor',
      value: percent(annual.acCapacityFactor),
      note: `on ${trimmed(limitMw, 1)} MWac at the POI`,
    },
    {
      label: 'Irradiation on the modules',
      value: `${figure(annual.poaKwhPerM2, 0)} kWh/m²`,
      note: `a year, before the loss by incidence; ${weatherName}`,
    },
  ]
}

function ratioRows(design: Design, annual: ExhibitSource['result']['annual']): ContentRow[] {
  const f = figuresOf(design)
  const { count, ratedKva } = design.inverter
  const needed = f.needed.inverterKva / 1000
  const short = f.spareMva < 0 ? `, ${figure(-f.spareMva, 1)} MVA short` : ''
  return [
    {
      label: 'DC/AC ratio, array over export limit',
      value: figure(annual.dcPerPoiKw ?? f.dcPerPoi, 2),
      note: `${figure(f.dcMw, 2)} MWdc over ${figure(design.exportLimitMw, 2)} MWac`,
    },
    {
      label: 'DC/AC ratio, array over inverters',
      value: figure(annual.dcPerInverterKw, 2),
      note: `${figure(f.dcMw, 2)} MWdc over ${figure(f.inverterMw, 2)} MW`,
    },
    {
      label: `Apparent power for ${trimmed(design.powerFactorAtPoi, 2)} at the POI`,
      value: `${figure(needed, 1)} MVA`,
      note: `needed at the inverters at full export; ${count} × ${megaOf(ratedKva)} MVA give ${figure(f.inverterMva, 1)} MVA${short}`,
    },
  ]
}

function lostWords(kwh: number, hours: number): string {
  if (kwh <= 0) return 'in no hour of the year'
  return `${energyFigure(kwh)} in ${figure(hours, 0)} ${hours === 1 ? 'hour' : 'hours'}`
}

/** A share in percent: one decimal, two where one would hide it, `<0.01 %` where two would. */
export function percent(fraction: number): string {
  const value = fraction * 100
  if (value > 0 && value < 0.01) return '<0.01 %'
  return `${figure(value, value > 0 && value < 0.1 ? 2 : 1)} %`
}
