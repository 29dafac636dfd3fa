import { existsSync, readFileSync } from 'node:fs'
import { join } from 'node:path'
import type { Plant } from '@/lib/domain/plant/plant'
import { readWeather } from '@/lib/domain/plant/weather'
import type { WeatherReport, WeatherYear } from '@/lib/domain/plant/weather-year'

/** Reference folder beside the repository; a test without it skips and says so. */
const SHARED = join(import.meta.dirname, '../../../../shared/reference')

export const REFERENCE_JSON = join(SHARED, 'pv-reference.json')
export const weatherPath = (file: string) => join(SHARED, 'weather', file)
export const isMissing = (...paths: string[]) => paths.some((path) => !existsSync(path))
export const MISSING_NOTE = '(skips when ../shared/reference is absent)'

export const STATIONS = ['723170', '722740', '725090'] as const
export type StationId = (typeof STATIONS)[number]
export const STATION_FILES = STATIONS.map((id) => weatherPath(`${id}TYA.CSV`))

export interface ReferenceHour {
  end_time_local: string
  apparent_zenith: number
  azimuth: number
  aoi: number
  tracker_theta: number | null
  poa_perez: number
  poa_haydavies: number
  poa_isotropic: number
  poa_beam: number
  effective: number
  cell_temp: number
  dc_kw_per_kwdc: number
  ac_unclipped_1_4: number
  ac_clipped_1_4: number
}

export interface ReferenceVariant {
  poa_kwh_m2: number
  poa_beam: number
  poa_sky: number
  poa_ground: number
  effective_kwh_m2: number
  dc_kwh_per_kwdc: number
  dc_p99_all8760: number
  dc_p999_all8760: number
  dc_p100: number
  loss_curve: {
    dc_ac: number
    ac_unclipped_kwh_per_kwdc: number
    ac_clipped_kwh_per_kwdc: number
    clip_loss_pct: number
    hours_at_limit: number
  }[]
  monthly_clip_loss_at_1_4?: { month: number; unclipped: number; loss_pct: number }[]
}

export interface PoiCase {
  case: string
  inverter_total_kwac: number
  ac_loss_fraction: number
  poi_limit_kw: number
  dc_to_poi_ratio: number
  ac_unclipped: number
  ac_after_inverter: number
  at_poi_before_limit: number
  export: number
  inverter_clip_kwh: number
  poi_curtail_kwh: number
  poi_curtail_pct_of_at_poi: number
  hours_at_poi_limit: number
}

export type MountingName = 'fixed' | 'tracker'

export interface ReferenceSystem {
  [variant: string]: unknown
  poi_cases_base: PoiCase[]
  hourly_days: Record<string, { date: string; rows: ReferenceHour[] }>
}

export interface Reference {
  stations: Record<StationId, { systems: Record<MountingName, ReferenceSystem> }>
  epw_check: { systems: Record<MountingName, { base_perez_ashrae_faiman: ReferenceVariant }> }
  error_signatures: { cases: Record<string, Record<string, number[]>> }
  solar_position_check: {
    instants: {
      utc: string
      lat: number
      lon: number
      elev_m: number
      pressure_mbar: number
      temp_c: number
      delta_t_s: number
      true_zenith: number
      apparent_zenith: number
      azimuth: number
    }[]
  }
}

export function loadReference(): Reference {
  return JSON.parse(readFileSync(REFERENCE_JSON, 'utf8')) as Reference
}

/** Base case of pv-reference.md, per kW of modules, DC/AC 1.4. */
export const BASE: Omit<Plant, 'mounting'> = {
  dcKw: 1,
  inverterAcKw: 1 / 1.4,
  inverterEfficiency: 0.96,
  dcLossFraction: 0.14,
  gammaPerC: -0.0035,
  albedo: 0.2,
  transposition: 'perez_1990',
  incidence: 'ashrae',
  cellTemperature: { model: 'faiman', u0: 25, u1: 6.84 },
}

export const MOUNTINGS: Record<MountingName, Plant['mounting']> = {
  fixed: { kind: 'fixed', tiltDeg: 25, azimuthDeg: 180 },
  tracker: {
    kind: 'single_axis_tracker',
    axisAzimuthDeg: 180,
    maxRotationDeg: 60,
    groundCoverRatio: 0.35,
    backtrack: true,
  },
}

export const basePlant = (mounting: MountingName): Plant => ({
  ...BASE,
  mounting: MOUNTINGS[mounting],
})

const read = new Map<string, { year: WeatherYear; report: WeatherReport }>()

/** A weather file of the reference folder, read once per test file. */
export function loadWeather(file: string): { year: WeatherYear; report: WeatherReport } {
  const known = read.get(file)
  if (known !== undefined) return known
  const result = readWeather(readFileSync(weatherPath(file), 'utf8'))
  if (!result.ok) throw new Error(result.errors.map((issue) => issue.message).join('\n'))
  read.set(file, result)
  return result
}
