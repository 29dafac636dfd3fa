import { cellTemperatureC } from '@/lib/domain/plant/cell-temperature'
import { dcPowerKw } from '@/lib/domain/plant/dc'
import { durationCurve, percentile, type DurationPoint } from '@/lib/domain/plant/duration'
import {
  emptyHour,
  exportKwhAtScale,
  inverterRatio,
  limitHour,
  poiRatio,
  type AcSide,
  type InverterRatio,
  type PoiRatio,
} from '@/lib/domain/plant/limits'
import { methodsOf, type Method } from '@/lib/domain/plant/methods'
import { prepareYear, type PreparedYear } from '@/lib/domain/plant/plane'
import type { PlaneInputs, Plant } from '@/lib/domain/plant/plant'
import type { WeatherMeta, WeatherYear } from '@/lib/domain/plant/weather-year'
import { annualOf, emptyTally, monthOf, type Annual, type Month } from '@/lib/domain/plant/tally'

/** Stored with every frozen calculation; raised whenever a figure of the chain could change. */
export const ENGINE_VERSION = 'plant-1'

/** Ratios that a year is run for when none are named. */
export const DEFAULT_RATIOS = [1, 1.1, 1.2, 1.3, 1.4, 1.5, 1.6, 1.7, 1.8]

/** A year of a plant. Energies in kWh, fractions 0 to 1, `hour` rows 0 to 23 end at 1:00 to 24:00. */
export interface YearResult {
  weather: WeatherMeta
  annual: Annual
  monthly: Month[]
  ratios: InverterRatio[]
  /** Loss against array over export limit; empty without a limit at the POI. */
  poiRatios: PoiRatio[]
  /** Inverter clipping and POI curtailment together, kWh, [24 hours][12 months]. */
  clippedByHourAndMonth: number[][]
  /** The part of it curtailed at the POI, kWh. */
  curtailedByHourAndMonth: number[][]
  /** Power that would reach the POI without any limit, hours of the year at or above. */
  durationCurve: DurationPoint[]
  /** Energy that one more MW of modules would export, kWh, all else unchanged. */
  nextMwdcKwh: number
  methods: Method[]
  engineVersion: string
}

/**
 * Hourly energy of a plant over a weather year: weather, sun, irradiance on the plane, cell
 * temperature, DC, inverter, loss to the POI, export limit. Definitions as in the API description
 * and pv-reference.md sections 1 and 2. Pure: the same inputs give the same bits.
 */
export function estimateYear(
  weather: WeatherYear,
  plant: Plant,
  ratios: readonly number[] = DEFAULT_RATIOS,
): YearResult {
  return runYear(prepareYear(weather, planeInputsOf(plant)), plant, ratios)
}

/** The part of a plant that `prepareYear` depends on. */
export function planeInputsOf(plant: Plant): PlaneInputs {
  const { mounting, albedo, transposition, incidence } = plant
  return { mounting, albedo, transposition, incidence }
}

/** The chain after the plane: quick, for fields that do not turn the modules. */
export function runYear(
  prepared: PreparedYear,
  plant: Plant,
  ratios: readonly number[] = DEFAULT_RATIOS,
): YearResult {
  const dc = litDcKw(prepared, plant)
  const side = acSideOf(plant)
  const tallies = tallyHours(prepared, dc, side)
  const hours = prepared.weather.hour.length
  const sorted = dc.slice().sort()
  const dcSpread = dcSpreadOf(sorted, hours)
  const limited = plant.poiLimitKw !== undefined
  const annual = annualOf(tallies.months, plant, hours, dcSpread)
  const larger = plant.dcKw > 0 ? (plant.dcKw + 1000) / plant.dcKw : 1
  return {
    weather: prepared.weather.meta,
    annual,
    monthly: tallies.months.map((tally, index) => monthOf(tally, index + 1, plant)),
    ratios: ratios.map((ratio) => inverterRatio(dc, plant.dcKw, plant.inverterEfficiency, ratio)),
    poiRatios: limited ? ratios.map((ratio) => poiRatio(dc, plant.dcKw, side, ratio)) : [],
    clippedByHourAndMonth: tallies.clipped,
    curtailedByHourAndMonth: tallies.curtailed,
    durationCurve: durationCurve(availableKw(sorted, side)),
    nextMwdcKwh: exportKwhAtScale(dc, side, larger) - annual.exportKwh,
    methods: methodsOf(plant, prepared.weather.meta.kind),
    engineVersion: ENGINE_VERSION,
  }
}

/** DC power in each lit hour, kW, in the order of `prepared.lit`. */
export function litDcKw(prepared: PreparedYear, plant: Plant): Float64Array {
  const { lit, poa, effective, weather } = prepared
  const { dcKw, gammaPerC, dcLossFraction, cellTemperature } = plant
  const dc = new Float64Array(lit.length)
  for (let k = 0; k < lit.length; k++) {
    const i = lit[k]!
    const cell = cellTemperatureC(
      cellTemperature,
      poa[i]!,
      weather.dryBulbC[i]!,
      weather.windMPerS[i]!,
    )
    dc[k] = dcPowerKw(dcKw, effective[i]!, cell, gammaPerC, dcLossFraction)
  }
  return dc
}

/** The AC side of a plant, an absent loss as 0 and an absent limit as Infinity. */
export function acSideOf(plant: Plant): AcSide {
  return {
    inverterAcKw: plant.inverterAcKw,
    inverterEfficiency: plant.inverterEfficiency,
    acLossFraction: plant.acLossFraction ?? 0,
    poiLimitKw: plant.poiLimitKw ?? Number.POSITIVE_INFINITY,
  }
}

function tallyHours(prepared: PreparedYear, dc: Float64Array, side: AcSide) {
  const months = Array.from({ length: 12 }, emptyTally)
  const table = () => Array.from({ length: 24 }, () => new Array<number>(12).fill(0))
  const clipped = table()
  const curtailed = table()
  const hour = emptyHour()
  const { lit, poa, weather } = prepared
  for (let k = 0; k < lit.length; k++) {
    const i = lit[k]!
    limitHour(dc[k]!, side, hour)
    const month = weather.month[i]! - 1
    const tally = months[month]!
    tally.poaWh += poa[i]!
    tally.dcKwh += dc[k]!
    tally.unclippedKwh += hour.unclippedKw
    tally.acKwh += hour.afterInverterKw
    tally.atPoiKwh += hour.atPoiKw
    tally.exportKwh += hour.exportKw
    const lost = hour.inverterClippedKw + hour.poiCurtailedKw
    if (lost <= 0) continue
    tally.inverterClippedKwh += hour.inverterClippedKw
    tally.poiCurtailedKwh += hour.poiCurtailedKw
    if (hour.inverterClippedKw > 0) tally.hoursAtInverterLimit++
    if (hour.poiCurtailedKw > 0) tally.hoursAtPoiLimit++
    const row = weather.hour[i]! - 1
    clipped[row]![month]! += lost
    curtailed[row]![month]! += hour.poiCurtailedKw
  }
  return { months, clipped, curtailed }
}

function dcSpreadOf(sorted: Float64Array, hours: number) {
  return {
    dcP99Kw: percentile(sorted, 0.99, hours - sorted.length),
    dcP999Kw: percentile(sorted, 0.999, hours - sorted.length),
    dcMaxKw: sorted.length > 0 ? sorted[sorted.length - 1]! : 0,
  }
}

function availableKw(sortedDc: Float64Array, side: AcSide): Float64Array {
  const power = new Float64Array(sortedDc.length)
  const hour = emptyHour()
  for (let k = 0; k < power.length; k++) {
    power[k] = limitHour(sortedDc[k]!, side, hour).unclippedKw * (1 - side.acLossFraction)
  }
  return power
}
