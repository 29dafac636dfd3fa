import type { Plant } from '@/lib/domain/plant/plant'

/** A 48 MW plant of an invented site with a limit at the POI. */
export function plant(change: Partial<Plant> = {}): Plant {
  return {
    dcKw: 62_390,
    inverterAcKw: 50_400,
    inverterEfficiency: 0.987,
    poiLimitKw: 48_000,
    acLossFraction: 0.019,
    mounting: {
      kind: 'single_axis_tracker',
      axisAzimuthDeg: 180,
      maxRotationDeg: 60,
      groundCoverRatio: 0.35,
      backtrack: true,
    },
    dcLossFraction: 0.112,
    gammaPerC: -0.003,
    albedo: 0.2,
    transposition: 'perez_1990',
    incidence: 'ashrae',
    cellTemperature: { model: 'faiman', u0: 25, u1: 6.84 },
    ...change,
  }
}
