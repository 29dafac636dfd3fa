import type { CellTemperatureModel } from '@/lib/domain/plant/cell-temperature'
import type { IncidenceModel } from '@/lib/domain/plant/incidence'
import type { TranspositionModel } from '@/lib/domain/plant/irradiance'
import type { TrackerGeometry } from '@/lib/domain/plant/tracker'

export type Mounting =
  | { kind: 'fixed'; tiltDeg: number; azimuthDeg: number }
  | ({ kind: 'single_axis_tracker' } & TrackerGeometry)

/** What decides the irradiance on the modules; a change here needs `prepareYear` again. */
export interface PlaneInputs {
  mounting: Mounting
  albedo: number
  transposition: TranspositionModel
  incidence: IncidenceModel
}

/** A plant as the energy chain sees it. Power in kW, fractions 0 to 1, gamma per degree C. */
export interface Plant extends PlaneInputs {
  dcKw: number
  inverterAcKw: number
  inverterEfficiency: number
  poiLimitKw?: number | undefined
  acLossFraction?: number | undefined
  dcLossFraction: number
  gammaPerC: number
  cellTemperature: CellTemperatureModel
}
