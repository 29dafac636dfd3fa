import { expOf } from '@/lib/domain/plant/elementary'

/** Cell temperature model and its coefficients. */
export type CellTemperatureModel =
  | { model: 'faiman'; u0: number; u1: number }
  | { model: 'sapm'; a: number; b: number; deltaT: number }

/**
 * Cell temperature, C, from plane-of-array irradiance before incidence loss (W/m2), dry bulb (C)
 * and wind (m/s). u0 in W/m2/K, u1 in W/m2/K per m/s. Source: Faiman (2008).
 */
export function faimanCellC(
  poa: number,
  dryBulbC: number,
  windMPerS: number,
  u0 = 25,
  u1 = 6.84,
): number {
  return dryBulbC + poa / (u0 + u1 * windMPerS)
}

/** Back-of-module temperature, C. Source: King et al. (2004), SAND2004-3535. */
export function sapmModuleC(
  poa: number,
  dryBulbC: number,
  windMPerS: number,
  a: number,
  b: number,
): number {
  return dryBulbC + poa * expOf(a + b * windMPerS)
}

/** Cell temperature, C, `deltaT` being the rise over the back at 1,000 W/m2. Source: as above. */
export function sapmCellC(
  poa: number,
  dryBulbC: number,
  windMPerS: number,
  a: number,
  b: number,
  deltaT: number,
): number {
  return sapmModuleC(poa, dryBulbC, windMPerS, a, b) + (deltaT * poa) / 1000
}

/** Cell temperature, C, by whichever model the plant names. */
export function cellTemperatureC(
  model: CellTemperatureModel,
  poa: number,
  dryBulbC: number,
  windMPerS: number,
): number {
  return model.model === 'faiman'
    ? faimanCellC(poa, dryBulbC, windMPerS, model.u0, model.u1)
    : sapmCellC(poa, dryBulbC, windMPerS, model.a, model.b, model.deltaT)
}
