import { NUTATION_TERMS } from '@/lib/domain/plant/nutation-terms'
import {
  EARTH_LATITUDE_TERMS,
  EARTH_LONGITUDE_TERMS,
  EARTH_RADIUS_TERMS,
  type SeriesTerm,
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
  const radiusAu = series(EARTH_RADIUS_TERMS, millennium)
  const heliocentricLongitude = series(EARTH_LONGITUDE_TERMS, millennium)
  const latitude = -series(EARTH_LATITUDE_TERMS, millennium)
  const nutation = nutationAt(century)
  const obliquity = meanObliquity(millennium) + nutation.obliquity
  const aberration = (-20.4898 / 3600 / radiusAu) * RAD
  const longitude = heliocentricLongitude + Math.PI + nutation.longitude + aberration
  const sinLongitude = Math.sin(longitude)
  const cosObliquity = Math.cos(obliquity)
  const sinObliquity = Math.sin(obliquity)
  return {
    rightAscension: Math.atan2(
      sinLongitude * cosObliquity - Math.tan(latitude) * sinObliquity,
      Math.cos(longitude),
    ),
    declination: Math.asin(
      Math.sin(latitude) * cosObliquity + Math.cos(latitude) * sinObliquity * sinLongitude,
    ),
    siderealCorrection: nutation.longitude * cosObliquity,
    radiusAu,
  }
}

/** Mean sidereal time at Greenwich, radians, not reduced (NREL/TP-560-34302 equation 28). */
export function meanSiderealTime(jd: number): number {
  const days = jd - 2451545
  const century = days / 36525
  const degrees =
    280.46061837 + 360.98564736629 * days + century * century * (0.000387933 - century / 38710000)
  return (degrees % 360) * RAD
}

function series(terms: readonly SeriesTerm[][], millennium: number): number {
  let sum = 0
  let power = 1
  for (const group of terms) {
    let part = 0
    for (const [a, b, c] of group) part += a * Math.cos(b + c * millennium)
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
  for (const [y0, y1, y2, y3, y4, a, b, c, d] of NUTATION_TERMS) {
    const argument = y0 * x0 + y1 * x1 + y2 * x2 + y3 * x3 + y4 * x4
    longitude += (a + b * t) * Math.sin(argument)
    if (c !== 0) obliquity += (c + d * t) * Math.cos(argument)
  }
  return { longitude: (longitude / 36000000) * RAD, obliquity: (obliquity / 36000000) * RAD }
}
