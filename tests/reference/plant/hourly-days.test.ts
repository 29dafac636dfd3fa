import { describe, expect, it } from 'vitest'
import { faimanCellC } from '@/lib/domain/plant/cell-temperature'
import { limitHour } from '@/lib/domain/plant/limits'
import { prepareYear } from '@/lib/domain/plant/plane'
import { sunYear } from '@/lib/domain/plant/sun'
import { incidenceAngleDeg, trackerPlane, trackerRotationDeg } from '@/lib/domain/plant/tracker'
import { stampOf, type WeatherYear } from '@/lib/domain/plant/weather-year'
import { acSideOf, litDcKw, planeInputsOf } from '@/lib/domain/plant/year'
import {
  basePlant,
  isMissing,
  loadReference,
  loadWeather,
  MISSING_NOTE,
  MOUNTINGS,
  REFERENCE_JSON,
  STATION_FILES,
  STATIONS,
  type MountingName,
  type ReferenceHour,
} from './reference-files'

// Source: pv-reference.json `hourly_days`, 24 rows a day (pv-reference.md section 4), fixed tilt 25
// south and horizontal tracker. Tolerances: pv-reference.md section 7, like for like.
const ANGLE_DEG = 0.0005
const POA = { isotropic: 0.05, hay_davies_1980: 0.05, perez_1990: 0.3 } as const
const CELL_C = 0.02
const POWER_KW = 0.0005

const absent = isMissing(REFERENCE_JSON, ...STATION_FILES)
const RAD = Math.PI / 180
const days = STATIONS.flatMap((id) =>
  (['fixed', 'tracker'] as MountingName[]).flatMap((mounting) =>
    ['clear_summer', 'cloudy', 'clear_winter'].map((day) => ({ id, mounting, day })),
  ),
)

/** Indexes of the reference rows in the year, by stamp. */
function rowsOf(year: WeatherYear, rows: ReferenceHour[]): [number, ReferenceHour][] {
  const stamps = new Map<string, number>()
  for (let i = 0; i < 8760; i++) stamps.set(stampOf(year, i), i)
  const first = rows[0]!.end_time_local.slice(0, 10)
  return rows.map((row, k) => {
    const hour = String(k + 1).padStart(2, '0')
    return [stamps.get(`${first} ${hour}:00`)!, row]
  })
}

describe.skipIf(absent)(`days hour by hour against the reference ${MISSING_NOTE}`, () => {
  const reference = absent ? null : loadReference()
  const load = (row: (typeof days)[number]) => {
    const { year } = loadWeather(`${row.id}TYA.CSV`)
    const day = reference!.stations[row.id].systems[row.mounting].hourly_days[row.day]!
    return { year, rows: rowsOf(year, day.rows) }
  }

  it.each(days)('$id $mounting $day: zenith, azimuth, rotation and incidence agree', (row) => {
    const { year, rows } = load(row)
    const sun = sunYear(year, { everyHour: true })
    for (const [i, hour] of rows) {
      const zenith = Math.acos(sun.up[i]!) / RAD
      const azimuth = (Math.atan2(sun.east[i]!, sun.north[i]!) / RAD + 360) % 360
      expect(Math.abs(zenith - hour.apparent_zenith)).toBeLessThan(ANGLE_DEG)
      expect(Math.abs(azimuth - hour.azimuth)).toBeLessThan(ANGLE_DEG)
      if (zenith >= 90) continue
      expectIncidence(row.mounting, zenith, azimuth, hour)
    }
  })

  it.each(days)('$id $mounting $day: irradiance on the plane agrees in three models', (row) => {
    const { year, rows } = load(row)
    const keys = {
      perez_1990: 'poa_perez',
      hay_davies_1980: 'poa_haydavies',
      isotropic: 'poa_isotropic',
    } as const
    for (const model of ['perez_1990', 'hay_davies_1980', 'isotropic'] as const) {
      const plant = { ...basePlant(row.mounting), transposition: model }
      const prepared = prepareYear(year, planeInputsOf(plant))
      for (const [i, hour] of rows) {
        expect(Math.abs(prepared.poa[i]! - hour[keys[model]])).toBeLessThan(POA[model])
        expect(Math.abs(prepared.beam[i]! - hour.poa_beam)).toBeLessThan(0.05)
      }
    }
  })

  it.each(days)('$id $mounting $day: effective irradiance, cell, DC and AC agree', (row) => {
    const { year, rows } = load(row)
    const plant = basePlant(row.mounting)
    const prepared = prepareYear(year, planeInputsOf(plant))
    const dc = new Map([...litDcKw(prepared, plant)].map((kw, k) => [prepared.lit[k]!, kw]))
    for (const [i, hour] of rows) {
      const kw = dc.get(i) ?? 0
      const ac = limitHour(kw, acSideOf(plant))
      const cell = faimanCellC(prepared.poa[i]!, year.dryBulbC[i]!, year.windMPerS[i]!)
      expect(Math.abs(prepared.effective[i]! - hour.effective)).toBeLessThan(0.3)
      expect(Math.abs(cell - hour.cell_temp)).toBeLessThan(CELL_C)
      expect(Math.abs(kw - hour.dc_kw_per_kwdc)).toBeLessThan(POWER_KW)
      expect(Math.abs(ac.unclippedKw - hour.ac_unclipped_1_4)).toBeLessThan(POWER_KW)
      expect(Math.abs(ac.exportKw - hour.ac_clipped_1_4)).toBeLessThan(POWER_KW)
    }
  })
})

function expectIncidence(
  mounting: MountingName,
  zenith: number,
  azimuth: number,
  hour: ReferenceHour,
) {
  const plan = MOUNTINGS[mounting]
  if (plan.kind === 'fixed') {
    const angle = incidenceAngleDeg(zenith, azimuth, plan.tiltDeg, plan.azimuthDeg)
    expect(Math.abs(angle - hour.aoi)).toBeLessThan(0.001)
    return
  }
  const rotation = trackerRotationDeg(zenith, azimuth, plan)
  // Printed with four decimals; backtracking near the horizon multiplies the sun's difference.
  expect(Math.abs(rotation - hour.tracker_theta!)).toBeLessThan(0.005)
  const plane = trackerPlane(rotation, plan.axisAzimuthDeg)
  const angle = incidenceAngleDeg(zenith, azimuth, plane.tiltDeg, plane.azimuthDeg)
  expect(Math.abs(angle - hour.aoi)).toBeLessThan(0.005)
}
