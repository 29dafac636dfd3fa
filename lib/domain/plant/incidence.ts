import { expOf } from '@/lib/domain/plant/elementary'

export type IncidenceModel = 'ashrae' | 'physical' | 'none'

const REFRACTIVE_INDEX = 1.526
const EXTINCTION_TIMES_THICKNESS = 4 * 0.002

/** Share of beam irradiance that passes the cover glass, by the cosine of incidence, 0 to 1. */
export function incidenceModifier(model: IncidenceModel, cosIncidence: number): number {
  if (model === 'ashrae') return ashraeModifier(cosIncidence)
  return model === 'physical' ? physicalModifier(cosIncidence) : 1
}

/** ASHRAE 93-77 after Souka & Safwat (1966): 1 - b0 (1/cos - 1), 0 where that is negative. */
export function ashraeModifier(cosIncidence: number, b0 = 0.05): number {
  if (cosIncidence <= 0) return 0
  return Math.max(1 - b0 * (1 / cosIncidence - 1), 0)
}

/**
 * Fresnel reflection and absorption in the glass (Bouguer), against normal incidence.
 * Source: Duffie & Beckman; De Soto et al. (2006); n 1.526, K 4 per m, thickness 2 mm.
 */
export function physicalModifier(cosIncidence: number): number {
  if (cosIncidence <= 0) return 0
  if (cosIncidence >= 1) return 1
  return glassTransmittance(cosIncidence) / NORMAL_TRANSMITTANCE
}

function glassTransmittance(cosIncidence: number): number {
  const sinRefracted = Math.sqrt(1 - cosIncidence * cosIncidence) / REFRACTIVE_INDEX
  const cosRefracted = Math.sqrt(1 - sinRefracted * sinRefracted)
  const n = REFRACTIVE_INDEX
  const s = (cosIncidence - n * cosRefracted) / (cosIncidence + n * cosRefracted)
  const p = (n * cosIncidence - cosRefracted) / (n * cosIncidence + cosRefracted)
  return expOf(-EXTINCTION_TIMES_THICKNESS / cosRefracted) * (1 - (s * s + p * p) / 2)
}

const NORMAL_TRANSMITTANCE = glassTransmittance(1)
