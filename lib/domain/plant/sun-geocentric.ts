import { asinOf, atan2Of, cosOf, sinOf, tanOf } from '@/lib/domain/plant/elementary'
import { NUTATION_TERMS } from '@/lib/domain/plant/nutation-terms'
import {
  EARTH_LATITUDE_TERMS,
  EARTH_LONGITUDE_TERMS,
  EARTH_RADIUS_TERMS,
} from '@/lib/domain/plant/spa-terms'

const RAD = Math.PI / 180

/** Apparent place of the sun seen from the Earth's center. Angles in radians, distance in AU. */
export interface GeocentricSun {
  rightAscension: number
  declination: number
  /** Apparent less mean sidereal time: nutation in longitude times cosine of obliquity. */
  siderealCorrection: number
  radiusAu: number
}

/** Seconds between Terrestrial and Universal Time used for typical years (pv-reference.md). */
export const DELTA_T_SECONDS = 67

/**
 * Apparent geocentric sun at a Julian day (UT).
 * Source: Reda & Andreas, NREL/TP-560-34302, sections 3.1 to 3.10.
 */
export function geocentricSun(jd: number, deltaTSeconds = DELTA_T_SECONDS): GeocentricSun {
  const century = (jd + deltaTSeconds / 86400 - 2451545) / 36525
  const millennium = century / 10
  const radiusAu = series(RADIUS, millennium)
  const heliocentricLongitude = series(LONGITUDE, millennium)
  const latitude = -series(LATITUDE, millennium)
  const nutation = nutationAt(century)
  const obliquity = meanObliquity(millennium) + nutation.obliquity
  const aberration = (-20.4898 / 3600 / radiusAu) * RAD
  const longitude = heliocentricLongitude + Math.PI + nutation.longitude + aberration
  const sinLongitude = sinOf(longitude)
  const cosObliquity = cosOf(obliquity)
  const sinObliquity = sinOf(obliquity)
  return {
    rightAscension: atan2Of(
      sinLongitude * cosObliquity - tanOf(latitude) * sinObliquity,
      cosOf(longitude),
    ),
    declination: asinOf(
      sinOf(latitude) * cosObliquity + cosOf(latitude) * sinObliquity * sinLongitude,
    ),
    siderealCorrection: nutation.longitude * cosObliquity,
    radiusAu,
  }
}

/** Mean sidereal time at Greenwich, radians, turns not taken off (NREL/TP-560-34302 equation 28). */
export function meanSiderealTime(jd: number): number {
  const days = jd - 2451545
  const century = days / 36525
  const degrees =
    280.46061837 + 360.98564736629 * days + century * century * (0.000387933 - century / 38710000)
  return degrees * RAD
}

const LONGITUDE = EARTH_LONGITUDE_TERMS.map(flat)
const LATITUDE = EARTH_LATITUDE_TERMS.map(flat)
const RADIUS = EARTH_RADIUS_TERMS.map(flat)
const NUTATION = flat(NUTATION_TERMS)

/** Rows of a table end to end: the sums below run over them some hundred times a year. */
function flat(rows: readonly (readonly number[])[]): Float64Array {
  return Float64Array.from(rows.flat())
}

function series(groups: readonly Float64Array[], millennium: number): number {
  let sum = 0
  let power = 1
  for (const rows of groups) {
    let part = 0
    for (let k = 0; k < rows.length; k += 3) {
      part += rows[k]! * cosOf(rows[k + 1]! + rows[k + 2]! * millennium)
    }
    sum += part * power
    power *= millennium
  }
  return sum / 1e8
}

/** Mean obliquity of the ecliptic, radians (NREL/TP-560-34302 equation 24). */
function meanObliquity(millennium: number): number {
  const u = millennium / 10
  const coefficients = [2.45, 5.79, 27.87, 7.12, -39.05, -249.67, -51.38, 1999.25, -1.55, -4680.93]
  let sum = 0
  for (const coefficient of coefficients) sum = (sum + coefficient) * u
  return ((84381.448 + sum) / 3600) * RAD
}

/** Nutation in longitude and obliquity, radians (equations 15 to 22, Table A4.3). */
function nutationAt(t: number): { longitude: number; obliquity: number } {
  const x0 = (297.85036 + t * (445267.11148 + t * (-0.0019142 + t / 189474))) * RAD
  const x1 = (357.52772 + t * (35999.05034 + t * (-0.0001603 - t / 300000))) * RAD
  const x2 = (134.96298 + t * (477198.867398 + t * (0.0086972 + t / 56250))) * RAD
  const x3 = (93.27191 + t * (483202.017538 + t * (-0.0036825 + t / 327270))) * RAD
  const x4 = (125.04452 + t * (-1934.136261 + t * (0.0020708 + t / 450000))) * RAD
  let longitude = 0
  let obliquity = 0
  const n = NUTATION
  for (let k = 0; k < n.length; k += 9) {
    const argument = n[k]! * x0 + n[k + 1]! * x1 + n[k + 2]! * x2 + n[k + 3]! * x3 + n[k + 4]! * x4
    longitude += (n[k + 5]! + n[k + 6]! * t) * sinOf(argument)
    if (n[k + 7] !== 0) obliquity += (n[k + 7]! + n[k + 8]! * t) * cosOf(argument)
  }
  return { longitude: (longitude / 36000000) * RAD, obliquity: (obliquity / 36000000) * RAD }
}
