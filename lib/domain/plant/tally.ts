import type { Plant } from '@/lib/domain/plant/plant'

/** Running sums of one month. */
export interface Tally {
  poaWh: number
  dcKwh: number
  unclippedKwh: number
  acKwh: number
  atPoiKwh: number
  exportKwh: number
  inverterClippedKwh: number
  poiCurtailedKwh: number
  hoursAtInverterLimit: number
  hoursAtPoiLimit: number
}

interface Energies {
  poaKwhPerM2: number
  dcKwh: number
  acUnclippedKwh: number
  acKwh: number
  /** At the POI before its limit. */
  atPoiKwh: number
  exportKwh: number
  /** Inverter clipping over unclipped energy. */
  clippedFraction: number
  /** Curtailment over the energy at the POI before its limit. */
  curtailedFraction: number
  /** Both together over the unclipped energy after AC loss. */
  limitedFraction: number
  inverterClippedKwh: number
  poiCurtailedKwh: number
  hoursAtInverterLimit: number
  hoursAtPoiLimit: number
}

export interface Month extends Energies {
  month: number
}

export interface DcSpread {
  /** 99th and 99.9th percentile of DC power over all hours, and its maximum, kW. */
  dcP99Kw: number
  dcP999Kw: number
  dcMaxKw: number
}

export interface Annual extends Energies, DcSpread {
  dcPerInverterKw: number
  dcPerPoiKw?: number
  /** Mean export over the POI limit, or over the inverter rating where there is none. */
  acCapacityFactor: number
}

export function emptyTally(): Tally {
  return {
    poaWh: 0,
    dcKwh: 0,
    unclippedKwh: 0,
    acKwh: 0,
    atPoiKwh: 0,
    exportKwh: 0,
    inverterClippedKwh: 0,
    poiCurtailedKwh: 0,
    hoursAtInverterLimit: 0,
    hoursAtPoiLimit: 0,
  }
}

export function monthOf(tally: Tally, month: number, plant: Plant): Month {
  return { month, ...energiesOf(tally, plant) }
}

/** The year from its twelve months; `hours` is the length of the weather year. */
export function annualOf(months: Tally[], plant: Plant, hours: number, spread: DcSpread): Annual {
  const sum = emptyTally()
  for (const month of months) {
    for (const key of Object.keys(sum) as (keyof Tally)[]) sum[key] += month[key]
  }
  const base = plant.poiLimitKw ?? plant.inverterAcKw
  return {
    ...energiesOf(sum, plant),
    ...spread,
    dcPerInverterKw: quotient(plant.dcKw, plant.inverterAcKw),
    ...(plant.poiLimitKw === undefined
      ? {}
      : { dcPerPoiKw: quotient(plant.dcKw, plant.poiLimitKw) }),
    acCapacityFactor: quotient(sum.exportKwh, base * hours),
  }
}

function energiesOf(tally: Tally, plant: Plant): Energies {
  const keep = 1 - (plant.acLossFraction ?? 0)
  const limitedKwh = tally.inverterClippedKwh * keep + tally.poiCurtailedKwh
  return {
    poaKwhPerM2: tally.poaWh / 1000,
    dcKwh: tally.dcKwh,
    acUnclippedKwh: tally.unclippedKwh,
    acKwh: tally.acKwh,
    atPoiKwh: tally.atPoiKwh,
    exportKwh: tally.exportKwh,
    clippedFraction: quotient(tally.inverterClippedKwh, tally.unclippedKwh),
    curtailedFraction: quotient(tally.poiCurtailedKwh, tally.atPoiKwh),
    limitedFraction: quotient(limitedKwh, tally.unclippedKwh * keep),
    inverterClippedKwh: tally.inverterClippedKwh,
    poiCurtailedKwh: tally.poiCurtailedKwh,
    hoursAtInverterLimit: tally.hoursAtInverterLimit,
    hoursAtPoiLimit: tally.hoursAtPoiLimit,
  }
}

function quotient(part: number, whole: number): number {
  return whole > 0 ? part / whole : 0
}
