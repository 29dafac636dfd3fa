import { getSolarPosition } from 'sunrise-sunset-js'
import { describe, expect, it } from 'vitest'
import { geocentricSun } from '@/lib/domain/plant/sun-geocentric'
import { pressureAt, sunPosition, sunYear } from '@/lib/domain/plant/sun'
import { julianDay } from '@/lib/domain/plant/calendar-day'
import { incidenceAngleDeg } from '@/lib/domain/plant/tracker'
import { stampOf, type WeatherYear } from '@/lib/domain/plant/weather-year'
import { synthetic } from '../../unit/plant/weather-texts'
import { isMissing, loadReference, MISSING_NOTE, REFERENCE_JSON } from './reference-files'

const RAD = Math.PI / 180

/** Julian day of an ISO instant in UTC. */
function jdOf(utc: string): number {
  const [, year, month, day, hour, minute, second] = /^(\d+)-(\d+)-(\d+)T(\d+):(\d+):(\d+)Z$/
    .exec(utc)!
    .map(Number) as [number, number, number, number, number, number, number]
  return julianDay(year, month, day, hour + minute / 60 + second / 3600)
}

/** Distance on the sphere that an azimuth difference makes, degrees. */
function azimuthGap(a: number, b: number, zenithDeg: number): number {
  const gap = Math.abs(((a - b + 540) % 360) - 180)
  return gap * Math.sin(zenithDeg * RAD)
}

describe('the published example of the Solar Position Algorithm', () => {
  // Source: Reda & Andreas, NREL/TP-560-34302 (2008), Table A5.1 and section A.5.
  const jd = julianDay(2003, 10, 17, 19 + 30 / 60 + 30 / 3600)
  const site = {
    latitudeDeg: 39.742476,
    longitudeDeg: -105.1786,
    elevationM: 1830.14,
    pressurePa: 82_000,
    temperatureC: 11,
  }

  it('gives the printed zenith, azimuth and distance', () => {
    const sun = sunPosition(jd, site, 67)
    expect(sun.apparentZenithDeg).toBeCloseTo(50.11162, 5)
    expect(sun.azimuthDeg).toBeCloseTo(194.34024, 5)
    expect(geocentricSun(jd, 67).radiusAu).toBeCloseTo(0.9965422974, 9)
  })

  it('gives the true zenith recomputed without refraction', () => {
    expect(sunPosition(jd, site, 67).trueZenithDeg).toBeCloseTo(50.127954, 5)
  })

  it('gives the printed incidence on a plane of slope 30 turned 10 degrees east of south', () => {
    const sun = sunPosition(jd, site, 67)
    const angle = incidenceAngleDeg(sun.apparentZenithDeg, sun.azimuthDeg, 30, 170)
    expect(angle).toBeCloseTo(25.187, 4)
  })
})

describe('standard pressure by elevation', () => {
  // Source: pv-reference.md section 1.
  it.each([
    { elevationM: 273, pa: 98088.16 },
    { elevationM: 777, pa: 92332.52 },
    { elevationM: 6, pa: 101252.94 },
  ])('is $pa Pa at $elevationM m', ({ elevationM, pa }) => {
    expect(pressureAt(elevationM)).toBeCloseTo(pa, 2)
  })
})

const absent = isMissing(REFERENCE_JSON)

describe.skipIf(absent)(`twenty instants from 1980 to 2030 ${MISSING_NOTE}`, () => {
  const instants = absent ? [] : loadReference().solar_position_check.instants

  // Source: pv-reference.json `solar_position_check`, printed with five decimals.
  it.each(instants)('$utc at $lat, $lon agrees with the reference values', (row) => {
    const sun = sunPosition(jdOf(row.utc), siteOf(row), row.delta_t_s)
    expect(Math.abs(sun.trueZenithDeg - row.true_zenith)).toBeLessThan(2e-5)
    expect(Math.abs(sun.apparentZenithDeg - row.apparent_zenith)).toBeLessThan(2e-5)
    expect(azimuthGap(sun.azimuthDeg, row.azimuth, row.true_zenith)).toBeLessThan(2e-5)
  })

  // Source: npm package sunrise-sunset-js 3.2.1 (an independent implementation of the algorithm),
  // elevation, pressure, temperature and delta T passed.
  it.each(instants)('$utc at $lat, $lon agrees with a second implementation', (row) => {
    const sun = sunPosition(jdOf(row.utc), siteOf(row), row.delta_t_s)
    const other = getSolarPosition(row.lat, row.lon, new Date(row.utc), {
      elevation: row.elev_m,
      pressure: row.pressure_mbar,
      temperature: row.temp_c,
      deltaT: row.delta_t_s,
    })
    expect(Math.abs(sun.apparentZenithDeg - other!.zenith)).toBeLessThan(1e-6)
    expect(azimuthGap(sun.azimuthDeg, other!.azimuth, other!.zenith)).toBeLessThan(1e-6)
  })
})

function siteOf(row: {
  lat: number
  lon: number
  elev_m: number
  pressure_mbar: number
  temp_c: number
}) {
  return {
    latitudeDeg: row.lat,
    longitudeDeg: row.lon,
    elevationM: row.elev_m,
    pressurePa: row.pressure_mbar * 100,
    temperatureC: row.temp_c,
  }
}

describe('places interpolated between days', () => {
  it('stay within 1e-5 degree of the full algorithm through a year', () => {
    const year = synthetic()
    const sun = sunYear(year, { everyHour: true })
    let worst = 0
    for (let i = 0; i < 8760; i += 11) worst = Math.max(worst, gapAt(year, sun, i))
    expect(worst).toBeLessThan(1e-5)
  })

  it('follow the year printed in each row, also where months change years', () => {
    const year = synthetic()
    year.year.forEach((_, i) => (year.year[i] = 1976 + ((year.month[i]! * 7) % 29)))
    const sun = sunYear(year, { everyHour: true })
    for (let i = 0; i < 8760; i += 97) expect(gapAt(year, sun, i)).toBeLessThan(1e-5)
  })
})

function gapAt(year: WeatherYear, sun: ReturnType<typeof sunYear>, i: number): number {
  const { meta } = year
  const ut = year.hour[i]! - 0.5 - meta.utcOffsetHours
  const full = sunPosition(julianDay(year.year[i]!, year.month[i]!, year.day[i]!, ut), meta)
  const east = Math.sin(full.apparentZenithDeg * RAD) * Math.sin(full.azimuthDeg * RAD)
  const north = Math.sin(full.apparentZenithDeg * RAD) * Math.cos(full.azimuthDeg * RAD)
  const up = Math.cos(full.apparentZenithDeg * RAD)
  const gap = Math.hypot(sun.east[i]! - east, sun.north[i]! - north, sun.up[i]! - up) / RAD
  if (Number.isNaN(gap)) throw new Error(stampOf(year, i))
  return gap
}
