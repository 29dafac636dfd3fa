import {
  acosOf,
  asinOf,
  atan2Of,
  atanOf,
  cosOf,
  powOf,
  sinOf,
  tanOf,
} from '@/lib/domain/plant/elementary'
import { dayNumber, dayOfYear } from '@/lib/domain/plant/calendar-day'
import { extraterrestrialNormal } from '@/lib/domain/plant/irradiance'
import {
  geocentricSun,
  meanSiderealTime,
  type GeocentricSun,
} from '@/lib/domain/plant/sun-geocentric'
import { SunTrack } from '@/lib/domain/plant/sun-track'
import type { WeatherYear } from '@/lib/domain/plant/weather-year'

const RAD = Math.PI / 180
const UNIX_EPOCH_JD = 2440587.5
/** Refraction is applied down to here: half the sun's disk plus refraction at the horizon. */
const REFRACTION_FROM_DEG = -(0.26667 + 0.5667)
const REFRACTION_FROM_SIN = sinOf(REFRACTION_FROM_DEG * RAD)

export interface SunSite {
  latitudeDeg: number
  longitudeDeg: number
  elevationM: number
  /** Annual mean, Pa; from the elevation where left out. */
  pressurePa?: number
  /** Annual mean, degrees Celsius; 12 where left out. */
  temperatureC?: number
}

export interface SunPosition {
  trueZenithDeg: number
  /** With atmospheric refraction. */
  apparentZenithDeg: number
  /** Clockwise from north. */
  azimuthDeg: number
}

/** Direction to the sun, with refraction: unit vector (east, north, up). */
interface SunVector {
  east: number
  north: number
  up: number
  trueUp: number
}

/** What every instant at one site shares. */
interface Observer {
  longitude: number
  sinLatitude: number
  cosLatitude: number
  /** Observer's distance from the axis and the equator in Earth radii. */
  axial: number
  polar: number
  refractionFactor: number
}

/** Standard pressure at an elevation in m, Pa (pv-reference.md section 1). */
export function pressureAt(elevationM: number): number {
  return 100 * powOf((44331.514 - elevationM) / 11880.516, 1 / 0.1902632)
}

/**
 * Position of the sun at a Julian day of Universal Time.
 * Source: Reda & Andreas, Solar Position Algorithm, NREL/TP-560-34302 (2008), in full.
 */
export function sunPosition(jd: number, site: SunSite, deltaTSeconds?: number): SunPosition {
  const sun = geocentricSun(jd, deltaTSeconds)
  const vector: SunVector = { east: 0, north: 0, up: 0, trueUp: 0 }
  topocentric(meanSiderealTime(jd), sun, observerOf(site), vector)
  const azimuth = atan2Of(vector.east, vector.north) / RAD
  return {
    trueZenithDeg: acosOf(clampUnit(vector.trueUp)) / RAD,
    apparentZenithDeg: acosOf(clampUnit(vector.up)) / RAD,
    azimuthDeg: azimuth < 0 ? azimuth + 360 : azimuth,
  }
}

/** Sun at mid-hour of each row. `up` is the cosine of the apparent zenith. */
export interface SunYear {
  east: Float64Array
  north: Float64Array
  up: Float64Array
  /** Extraterrestrial normal irradiance on the row's local calendar day, W/m2. */
  extraterrestrial: Float64Array
}

/**
 * Sun of a weather year at mid-hour (stamp less 30 minutes, year as printed in each row).
 * Rows without irradiance are left 0 unless `everyHour`. `shiftHours` moves the instants, for the
 * closure check; `track` shares computed places between passes.
 */
export function sunYear(
  weather: WeatherYear,
  options: { everyHour?: boolean; shiftHours?: number; track?: SunTrack } = {},
): SunYear {
  const { meta, year, month, day, hour, ghi, dni, dhi } = weather
  const count = hour.length
  const up = new Float64Array(count)
  const result: SunYear = {
    east: new Float64Array(count),
    north: new Float64Array(count),
    up,
    extraterrestrial: new Float64Array(count),
  }
  const observer = observerOf(meta)
  const track = options.track ?? new SunTrack()
  const vector: SunVector = { east: 0, north: 0, up: 0, trueUp: 0 }
  const toUt = -0.5 - meta.utcOffsetHours + (options.shiftHours ?? 0)
  let civilDay = 0
  let normal = 0
  for (let i = 0; i < count; i++) {
    if (day[i] !== day[i - 1]) {
      civilDay = dayNumber(year[i]!, month[i]!, day[i]!)
      normal = extraterrestrialNormal(dayOfYear(year[i]!, month[i]!, day[i]!))
    }
    result.extraterrestrial[i] = normal
    if (!options.everyHour && ghi[i] === 0 && dni[i] === 0 && dhi[i] === 0) continue
    const jd = UNIX_EPOCH_JD + civilDay + (hour[i]! + toUt) / 24
    topocentric(meanSiderealTime(jd), track.at(jd), observer, vector)
    result.east[i] = vector.east
    result.north[i] = vector.north
    up[i] = vector.up
  }
  return result
}

function observerOf(site: SunSite): Observer {
  const latitude = site.latitudeDeg * RAD
  const u = atanOf(0.99664719 * tanOf(latitude))
  const height = site.elevationM / 6378140
  const pressurePa = site.pressurePa ?? pressureAt(site.elevationM)
  const kelvin = 273 + (site.temperatureC ?? 12)
  return {
    longitude: site.longitudeDeg * RAD,
    sinLatitude: sinOf(latitude),
    cosLatitude: cosOf(latitude),
    axial: cosOf(u) + height * cosOf(latitude),
    polar: 0.99664719 * sinOf(u) + height * sinOf(latitude),
    refractionFactor: ((pressurePa / 101000) * 283 * 1.02) / (kelvin * 60),
  }
}

/**
 * From the Earth's center to the observer, with parallax and refraction (sections 3.11 to 3.14 of
 * NREL/TP-560-34302; the parallax in right ascension and declination written as one vector).
 */
function topocentric(
  siderealTime: number,
  sun: GeocentricSun,
  observer: Observer,
  out: SunVector,
): void {
  const hourAngle = siderealTime + sun.siderealCorrection + observer.longitude - sun.rightAscension
  const parallax = sinOf((8.794 / 3600 / sun.radiusAu) * RAD)
  const cosDeclination = cosOf(sun.declination)
  const x = cosDeclination * cosOf(hourAngle) - observer.axial * parallax
  const y = cosDeclination * sinOf(hourAngle)
  const z = sinOf(sun.declination) - observer.polar * parallax
  const length = Math.sqrt(x * x + y * y + z * z)
  const south = (x * observer.sinLatitude - z * observer.cosLatitude) / length
  const west = y / length
  const trueUp = (z * observer.sinLatitude + x * observer.cosLatitude) / length
  const level = Math.sqrt(south * south + west * west)
  const lift = refraction(trueUp, observer.refractionFactor)
  const cosLift = cosOf(lift)
  const sinLift = sinOf(lift)
  const scale = level > 0 ? (level * cosLift - trueUp * sinLift) / level : 1
  out.east = -west * scale
  out.north = -south * scale
  out.up = trueUp * cosLift + level * sinLift
  out.trueUp = trueUp
}

/** Refraction, radians (equation 42 of NREL/TP-560-34302), 0 for a sun well below the horizon. */
function refraction(trueUp: number, factor: number): number {
  if (trueUp < REFRACTION_FROM_SIN) return 0
  const elevationDeg = asinOf(clampUnit(trueUp)) / RAD
  return (factor / tanOf((elevationDeg + 10.3 / (elevationDeg + 5.11)) * RAD)) * RAD
}

function clampUnit(value: number): number {
  return value > 1 ? 1 : value < -1 ? -1 : value
}
