import { acosOf, cosOf, powOf, sinOf } from '@/lib/domain/plant/elementary'

const RAD = Math.PI / 180

export type TranspositionModel = 'perez_1990' | 'hay_davies_1980' | 'isotropic'

/**
 * Extraterrestrial normal irradiance on a day of the year, W/m2.
 * Source: Spencer (1971) series with the solar constant 1366.1 W/m2.
 */
export function extraterrestrialNormal(dayOfYear: number): number {
  const b = (2 * Math.PI * (dayOfYear - 1)) / 365
  const factor =
    1.00011 +
    0.034221 * cosOf(b) +
    0.00128 * sinOf(b) +
    0.000719 * cosOf(2 * b) +
    0.000077 * sinOf(2 * b)
  return 1366.1 * factor
}

/** Relative optical air mass at an apparent zenith in radians. Source: Kasten & Young (1989). */
export function airMass(zenithRad: number): number {
  return 1 / (cosOf(zenithRad) + 0.50572 * powOf(96.07995 - zenithRad / RAD, -1.6364))
}

/** Ground-reflected irradiance on the plane, W/m2. Source: Liu & Jordan (1963). */
export function groundReflected(ghi: number, albedo: number, cosTilt: number): number {
  return (ghi * albedo * (1 - cosTilt)) / 2
}

/** Isotropic sky diffuse on the plane, W/m2. Source: Liu & Jordan (1963). */
export function isotropicSky(dhi: number, cosTilt: number): number {
  return (dhi * (1 + cosTilt)) / 2
}

/**
 * Sky diffuse on the plane, W/m2, with circumsolar share DNI / extraterrestrial normal.
 * Source: Hay & Davies (1980); the horizon is held at 89 degrees (cosine 0.01745).
 */
export function hayDaviesSky(
  dhi: number,
  dni: number,
  extraterrestrial: number,
  cosZenith: number,
  cosIncidence: number,
  cosTilt: number,
): number {
  const anisotropy = dni / extraterrestrial
  const beamRatio = Math.max(cosIncidence, 0) / Math.max(cosZenith, 0.01745)
  return dhi * ((1 - anisotropy) * (1 + cosTilt) * 0.5 + anisotropy * beamRatio)
}

/** Upper bounds of sky clearness for the first seven of eight bins, Perez et al. (1990) Table 1. */
const CLEARNESS_BOUNDS = [1.065, 1.23, 1.5, 1.95, 2.8, 4.5, 6.2] as const

/** F11 F12 F13 F21 F22 F23 per bin, Perez et al. (1990), the set for all sites as printed. */
const PEREZ_COEFFICIENTS = new Float64Array([
  -0.008, 0.588, -0.062, -0.06, 0.072, -0.022, 0.13, 0.683, -0.151, -0.019, 0.066, -0.029, 0.33,
  0.487, -0.221, 0.055, -0.064, -0.026, 0.568, 0.187, -0.295, 0.109, -0.152, -0.014, 0.873, -0.392,
  -0.362, 0.226, -0.462, 0.001, 1.132, -1.237, -0.412, 0.288, -0.823, 0.056, 1.06, -1.6, -0.359,
  0.264, -1.127, 0.131, 0.678, -0.327, -0.25, 0.156, -1.377, 0.251,
])

const COS_85 = cosOf(85 * RAD)

/**
 * Sky diffuse on the plane, W/m2, never below 0.
 * Source: Perez et al. (1990), Solar Energy 44:271, with air mass of Kasten & Young (1989).
 */
export function perezSky(
  dhi: number,
  dni: number,
  extraterrestrial: number,
  cosZenith: number,
  cosIncidence: number,
  cosTilt: number,
  sinTilt: number,
): number {
  if (dhi <= 0) return 0
  const zenith = acosOf(cosZenith)
  const cubed = 1.041 * zenith * zenith * zenith
  const clearness = ((dhi + dni) / dhi + cubed) / (1 + cubed)
  const brightness = (dhi * airMass(zenith)) / extraterrestrial
  let bin = 0
  while (bin < 7 && clearness >= CLEARNESS_BOUNDS[bin]!) bin++
  const c = PEREZ_COEFFICIENTS
  const k = bin * 6
  const circumsolar = Math.max(c[k]! + c[k + 1]! * brightness + c[k + 2]! * zenith, 0)
  const horizon = c[k + 3]! + c[k + 4]! * brightness + c[k + 5]! * zenith
  const ratio = Math.max(cosIncidence, 0) / Math.max(cosZenith, COS_85)
  const sky = (1 - circumsolar) * (1 + cosTilt) * 0.5 + circumsolar * ratio + horizon * sinTilt
  return Math.max(dhi * sky, 0)
}
