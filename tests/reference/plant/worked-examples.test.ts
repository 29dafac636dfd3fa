import { describe, expect, it } from 'vitest'
import { faimanCellC, sapmCellC, sapmModuleC } from '@/lib/domain/plant/cell-temperature'
import { dcPerUnit, dcPowerKw } from '@/lib/domain/plant/dc'
import { ashraeModifier, physicalModifier } from '@/lib/domain/plant/incidence'
import { inverterAcKw, inverterUnclippedKw } from '@/lib/domain/plant/inverter'
import {
  airMass,
  extraterrestrialNormal,
  groundReflected,
  hayDaviesSky,
  isotropicSky,
  perezSky,
} from '@/lib/domain/plant/irradiance'
import { incidenceAngleDeg, trackerPlane, trackerRotationDeg } from '@/lib/domain/plant/tracker'

// Check values of pv-worked-examples.md; the published source stands beside each table.
const RAD = Math.PI / 180
const cos = (degrees: number) => Math.cos(degrees * RAD)
const sin = (degrees: number) => Math.sin(degrees * RAD)

/** Solar zenith and azimuth (from north) by latitude, declination and hour angle, degrees. */
function solarAngles(latitude: number, declination: number, hourAngle: number) {
  const up = cos(latitude) * cos(declination) * cos(hourAngle) + sin(latitude) * sin(declination)
  const west = cos(declination) * sin(hourAngle)
  const south = sin(latitude) * cos(declination) * cos(hourAngle) - cos(latitude) * sin(declination)
  return { zenith: Math.acos(up) / RAD, azimuth: Math.atan2(west, south) / RAD + 180 }
}

describe('extraterrestrial normal irradiance, Spencer (1971), 1,366.1 W/m2', () => {
  it.each([
    [1, 1413.9818],
    [4, 1414.0153],
    [80, 1376.8924],
    [172, 1321.6236],
    [185, 1320.4577],
    [266, 1356.5997],
    [355, 1412.7086],
  ])('day %i is %d W/m2', (day, expected) => {
    expect(Math.abs(extraterrestrialNormal(day) - expected)).toBeLessThan(1e-4)
  })
})

describe('relative air mass, Kasten & Young (1989)', () => {
  it.each([
    [0, 0.9997],
    [30, 1.154],
    [45, 1.4126],
    [60, 1.9943],
    [75, 3.8129],
    [80, 5.586],
    [85, 10.3058],
    [87, 15.1477],
    [89, 26.3106],
    [90, 37.9196],
  ])('zenith %i gives %d', (zenith, expected) => {
    expect(airMass(zenith * RAD)).toBeCloseTo(expected, 4)
  })
})

describe('incidence-angle modifiers', () => {
  // ASHRAE 93-77 / Souka & Safwat (1966), b0 0.05; De Soto et al. (2006), n 1.526, K 4, L 2 mm.
  it.each([
    [0, 1, 1],
    [20, 0.996791, 0.999503],
    [40, 0.98473, 0.993007],
    [50, 0.972214, 0.979842],
    [60, 0.95, 0.946003],
    [70, 0.90381, 0.85972],
    [75, 0.856815, 0.774061],
    [80, 0.762061, 0.634117],
    [85, 0.476314, 0.400879],
    [87, 0.094634, 0.26673],
  ])('at %i degrees ASHRAE gives %d and the glass model %d', (angle, ashrae, physical) => {
    expect(ashraeModifier(cos(angle))).toBeCloseTo(ashrae, 6)
    expect(physicalModifier(cos(angle))).toBeCloseTo(physical, 6)
  })

  it('ASHRAE is exactly 0 from acos(1/21) on, and both are 0 from behind', () => {
    expect(ashraeModifier(1 / 21)).toBeCloseTo(0, 12)
    expect(ashraeModifier(cos(87.28))).toBe(0)
    expect(ashraeModifier(cos(90.5))).toBe(0)
    expect(physicalModifier(cos(90.5))).toBe(0)
  })
})

describe('transposition of single instants, Perez (1990), Hay & Davies (1980), Liu & Jordan (1963)', () => {
  const instants = [
    {
      tilt: 25,
      surface: 180,
      dni: 800,
      dhi: 110,
      ghi: 765.3216,
      zenith: 35,
      azimuth: 150,
      day: 172,
      aoi: 17.76203,
      beam: 761.8654,
      iso: 104.8469,
      hayDavies: 118.7917,
      perez: 124.0637,
      ground: 7.1705,
    },
    {
      tilt: 25,
      surface: 180,
      dni: 50,
      dhi: 250,
      ghi: 278.6788,
      zenith: 55,
      azimuth: 220,
      day: 80,
      aoi: 38.2763,
      beam: 39.2516,
      iso: 238.2885,
      hayDavies: 242.0606,
      perez: 256.4036,
      ground: 2.611,
    },
    {
      tilt: 40,
      surface: 200,
      dni: 700,
      dhi: 120,
      ghi: 359.4141,
      zenith: 70,
      azimuth: 130,
      day: 355,
      aoi: 62.05715,
      beam: 328.0134,
      iso: 105.9627,
      hayDavies: 134.9225,
      perez: 136.7129,
      ground: 8.4087,
    },
  ]

  it.each(instants)('tilt $tilt, zenith $zenith: beam, sky and ground', (row) => {
    const angle = incidenceAngleDeg(row.zenith, row.azimuth, row.tilt, row.surface)
    expect(angle).toBeCloseTo(row.aoi, 5)
    const normal = extraterrestrialNormal(row.day)
    const args = [row.dhi, row.dni, normal, cos(row.zenith), cos(angle), cos(row.tilt)] as const
    expect(row.dni * cos(angle)).toBeCloseTo(row.beam, 4)
    expect(isotropicSky(row.dhi, cos(row.tilt))).toBeCloseTo(row.iso, 4)
    expect(hayDaviesSky(...args)).toBeCloseTo(row.hayDavies, 4)
    expect(perezSky(...args, sin(row.tilt))).toBeCloseTo(row.perez, 4)
    expect(groundReflected(row.ghi, 0.2, cos(row.tilt))).toBeCloseTo(row.ground, 4)
  })

  it('Perez gives nothing without diffuse irradiance', () => {
    expect(perezSky(0, 900, 1367, cos(30), cos(10), cos(25), sin(25))).toBe(0)
  })

  // Own numbers in the style of Duffie & Beckman, recomputed: 43 N, n = 51, slope 60, MJ/m2.
  it('an hour at 43 N on slope 60 gives the isotropic and the Hay-Davies totals', () => {
    const { zenith, azimuth } = solarAngles(43, -11.579, -37.5)
    const cosIncidence = cos(incidenceAngleDeg(zenith, azimuth, 60, 180))
    expect(cosIncidence).toBeCloseTo(0.801932, 5)
    expect(cos(zenith)).toBeCloseTo(0.431523, 5)
    const dni = 0.29 / cos(zenith)
    const beam = dni * cosIncidence
    const ground = groundReflected(1.04, 0.6, cos(60))
    const normal = 2.160226 / cos(zenith)
    expect(beam + isotropicSky(0.75, cos(60)) + ground).toBeCloseTo(1.257429, 4)
    const sky = hayDaviesSky(0.75, dni, normal, cos(zenith), cosIncidence, cos(60))
    expect(beam + sky + ground).toBeCloseTo(1.369024, 4)
  })
})

describe('incidence on a sloped plane, Duffie & Beckman (figures quoted from memory)', () => {
  it('example 1.6.1: 43 N, 13 February 10:30 solar, slope 45, 15 west of south: 35 degrees', () => {
    const { zenith, azimuth } = solarAngles(43, -13.946, -22.5)
    expect(incidenceAngleDeg(zenith, azimuth, 45, 195)).toBeCloseTo(35.159, 2)
  })

  it('example 1.8.1: beam ratio 1.66 for the same surface, declination -14', () => {
    const { zenith, azimuth } = solarAngles(43, -14, -22.5)
    const ratio = cos(incidenceAngleDeg(zenith, azimuth, 45, 195)) / cos(zenith)
    expect(ratio).toBeCloseTo(1.666, 3)
  })
})

describe('single-axis tracker, Anderson & Mikofski (2020), N-S, 60 degrees, GCR 0.35', () => {
  const tracker = { axisAzimuthDeg: 180, maxRotationDeg: 60, groundCoverRatio: 0.35 }

  it.each([
    [60, 90, -60, -60, 0],
    [80, 90, -19.7448, -60, 60.2552],
    [70, 120, -60, -60, 28.8626],
    [30, 200, 11.1702, 11.1702, 28.0243],
    [75, 250, 35.6644, 60, 42.3126],
    [85, 270, 9.4193, 60, 75.5807],
    [20, 180, 0, 0, 20],
  ])(
    'zenith %i azimuth %i: %d with backtracking, %d without',
    (zenith, azimuth, back, plain, aoi) => {
      const rotation = trackerRotationDeg(zenith, azimuth, { ...tracker, backtrack: true })
      expect(rotation).toBeCloseTo(back, 4)
      expect(trackerRotationDeg(zenith, azimuth, { ...tracker, backtrack: false })).toBeCloseTo(
        plain,
        4,
      )
      const plane = trackerPlane(rotation, 180)
      expect(incidenceAngleDeg(zenith, azimuth, plane.tiltDeg, plane.azimuthDeg)).toBeCloseTo(
        aoi,
        3,
      )
    },
  )

  it('backtracking starts at a true rotation of 69.5127 degrees', () => {
    const at = (zenith: number) =>
      trackerRotationDeg(zenith, 270, { ...tracker, maxRotationDeg: 90, backtrack: true })
    expect(at(69.51)).toBeCloseTo(69.51, 6)
    expect(at(69.6)).toBeLessThan(69.51)
  })
})

describe('cell temperature', () => {
  // Faiman (2008), u0 25, u1 6.84.
  it.each([
    [1000, 20, 1, 51.40704],
    [800, 25, 3, 42.57469],
    [800, 20, 1, 45.12563],
    [0, 10, 5, 10],
  ])('Faiman: %i W/m2, %i C, %i m/s gives %d C', (poa, air, wind, expected) => {
    expect(faimanCellC(poa, air, wind)).toBeCloseTo(expected, 5)
  })

  // King et al. (2004), SAND2004-3535, open rack.
  it('SAPM: glass/polymer 1,000 W/m2, 20 C, 1 m/s gives module 46.38 and cell 49.38 C', () => {
    expect(sapmModuleC(1000, 20, 1, -3.56, -0.075)).toBeCloseTo(46.38393, 5)
    expect(sapmCellC(1000, 20, 1, -3.56, -0.075, 3)).toBeCloseTo(49.38393, 5)
  })

  it.each([
    [1000, 20, 1, 52.3225],
    [800, 25, 3, 48.23036],
    [900, 20, 5, 43.50919],
  ])('SAPM: glass/glass %i W/m2, %i C, %i m/s gives %d C', (poa, air, wind, expected) => {
    expect(sapmCellC(poa, air, wind, -3.47, -0.0594, 3)).toBeCloseTo(expected, 4)
  })
})

describe('DC power and inverter, Dobos (2014), NREL/TP-6A20-62641', () => {
  it('100 kW at 900 W/m2 and 30 C with -0.3 %/C gives 88.65 kW', () => {
    expect(100 * dcPerUnit(900, 30, -0.003)).toBeCloseTo(88.65, 10)
  })

  it('1 kW at 800 W/m2 and 45 C with -0.35 %/C and 14 % losses gives 0.63984 kW', () => {
    expect(dcPowerKw(1, 800, 45, -0.0035, 0.14)).toBeCloseTo(0.63984, 10)
  })

  it.each([
    [0.02, 0.687825, 0.01433],
    [0.05, 0.863661, 0.044982],
    [0.1, 0.921628, 0.096003],
    [0.2, 0.949401, 0.197792],
    [0.3, 0.957583, 0.299245],
    [0.5, 0.962192, 0.501141],
    [0.75, 0.962075, 0.751621],
    [1, 0.96, 1],
  ])('at load %d the efficiency is %d', (load, efficiency, ac) => {
    const dc = load / 0.96
    expect(inverterUnclippedKw(dc, 1, 0.96) / dc).toBeCloseTo(efficiency, 6)
    expect(inverterUnclippedKw(dc, 1, 0.96)).toBeCloseTo(ac, 6)
  })

  it('gives nothing below 0.5986 % load and its rating above 100 %', () => {
    expect(inverterUnclippedKw(0.00598 / 0.96, 1, 0.96)).toBe(0)
    expect(inverterUnclippedKw(0.00599 / 0.96, 1, 0.96)).toBeGreaterThan(0)
    expect(inverterAcKw(1.3 / 0.96, 1, 0.96)).toBe(1)
  })
})
