import { inverterUnclippedKw } from '@/lib/domain/plant/inverter'

/** One plant's AC side: inverter rating, nominal efficiency, loss to the POI and limit there. */
export interface AcSide {
  inverterAcKw: number
  inverterEfficiency: number
  /** Fraction of inverter output lost on the way to the POI. */
  acLossFraction: number
  /** kW at the POI; Infinity where there is none. */
  poiLimitKw: number
}

/** One hour through the limits, kW (or kWh over the hour). */
export interface LimitedHour {
  unclippedKw: number
  afterInverterKw: number
  atPoiKw: number
  exportKw: number
  inverterClippedKw: number
  poiCurtailedKw: number
}

/**
 * One hour through inverter, AC loss and limit at the POI, losses booked in that order
 * (pv-reference.md section 2, item 13). Pass `out` to reuse an object.
 */
export function limitHour(dcKw: number, side: AcSide, out: LimitedHour = emptyHour()): LimitedHour {
  const unclipped = inverterUnclippedKw(dcKw, side.inverterAcKw, side.inverterEfficiency)
  const after = Math.min(unclipped, side.inverterAcKw)
  const atPoi = after * (1 - side.acLossFraction)
  out.unclippedKw = unclipped
  out.afterInverterKw = after
  out.atPoiKw = atPoi
  out.exportKw = Math.min(atPoi, side.poiLimitKw)
  out.inverterClippedKw = unclipped - after
  out.poiCurtailedKw = atPoi - out.exportKw
  return out
}

export function emptyHour(): LimitedHour {
  return {
    unclippedKw: 0,
    afterInverterKw: 0,
    atPoiKw: 0,
    exportKw: 0,
    inverterClippedKw: 0,
    poiCurtailedKw: 0,
  }
}

/** Loss against the ratio of array to inverters, POI limit left out. */
export interface InverterRatio {
  dcAc: number
  clippedFraction: number
  acKwh: number
  acUnclippedKwh: number
}

/**
 * Clipping at a DC/AC ratio with the array as it is and the inverter rating `dcKw / dcAc`.
 * `clippedFraction` = (unclipped - clipped) / unclipped over the year (section 2, item 12).
 */
export function inverterRatio(
  dc: Float64Array,
  dcKw: number,
  inverterEfficiency: number,
  dcAc: number,
): InverterRatio {
  const rated = dcKw / dcAc
  let unclipped = 0
  let clipped = 0
  for (let k = 0; k < dc.length; k++) {
    const kw = inverterUnclippedKw(dc[k]!, rated, inverterEfficiency)
    unclipped += kw
    clipped += kw < rated ? kw : rated
  }
  const clippedFraction = unclipped > 0 ? (unclipped - clipped) / unclipped : 0
  return { dcAc, clippedFraction, acKwh: clipped, acUnclippedKwh: unclipped }
}

/** Loss against the ratio of array to export limit, inverters as they are. */
export interface PoiRatio {
  dcPerPoi: number
  /** Inverter clipping and curtailment together over the unclipped energy after AC loss. */
  limitedFraction: number
  exportKwh: number
}

/** Both losses when the POI limit is `dcKw / dcPerPoi` and all else stays. */
export function poiRatio(dc: Float64Array, dcKw: number, side: AcSide, dcPerPoi: number): PoiRatio {
  const limit = dcKw / dcPerPoi
  const keep = 1 - side.acLossFraction
  let unclipped = 0
  let exported = 0
  for (let k = 0; k < dc.length; k++) {
    const kw = inverterUnclippedKw(dc[k]!, side.inverterAcKw, side.inverterEfficiency)
    unclipped += kw
    exported += Math.min(Math.min(kw, side.inverterAcKw) * keep, limit)
  }
  const available = unclipped * keep
  const limitedFraction = available > 0 ? Math.max(1 - exported / available, 0) : 0
  return { dcPerPoi, limitedFraction, exportKwh: exported }
}

/** Exported energy, kWh, with the array scaled by `scale` and the same AC side. */
export function exportKwhAtScale(dc: Float64Array, side: AcSide, scale: number): number {
  const hour = emptyHour()
  let sum = 0
  for (let k = 0; k < dc.length; k++) sum += limitHour(dc[k]! * scale, side, hour).exportKw
  return sum
}
