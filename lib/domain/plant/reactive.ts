/** A transformer (or bank of equal ones) between inverters and POI. */
export interface SeriesTransformer {
  /** Base of the impedance: self-cooled rating of the bank together. */
  ratedKva: number
  impedancePct: number
  xOverR: number
  noLoadKw?: number | undefined
}

export interface NeededKvaInputs {
  limitKw: number
  /** 0 to 1; the plant has to export this much reactive power while at its limit. */
  powerFactorAtPoi: number
  /** Fraction of inverter output lost on the way; the transformers' own losses where left out. */
  acLossFraction?: number | undefined
  /** From the POI toward the inverters. */
  transformers: readonly SeriesTransformer[]
  /** Where the voltage is held at 1 per unit: at the POI, or at the low side of each transformer. */
  unityVoltageAt?: 'poi' | 'inverter' | undefined
}

export interface NeededKva {
  inverterKw: number
  inverterKvar: number
  inverterKva: number
  inverterPowerFactor: number
  poiKvar: number
  absorbedKvar: number
  account: string
  source: string
}

const SOURCE =
  'Series I²R and I²X of the transformers; engineering fact sheet section 4, items 16 to 24 (arithmetic)'

/**
 * Power at the inverters for an export limit at a power factor (kW, kvar, kVA).
 *
 * Simplification: one series circuit, collector charging and line reactance left out. With the POI
 * at 1 per unit the current is S/V there and the same through every series element, so each
 * transformer absorbs X% S²/(100 S rated) kvar of the POI's S: exact for such a circuit. With
 * `unityVoltageAt: 'inverter'` S is that of the low side of each transformer instead, which is the
 * more careful figure (item 24). A loss fraction beyond the transformers' own I²R counts as active
 * power only.
 */
export function neededInverterKva(inputs: NeededKvaInputs): NeededKva {
  const { limitKw, powerFactorAtPoi, acLossFraction, transformers } = inputs
  const poiKvar = limitKw * Math.tan(Math.acos(powerFactorAtPoi))
  const atPoi = { kw: limitKw, kvar: poiKvar }
  const poiKva = Math.hypot(limitKw, poiKvar)
  let flow = atPoi
  for (const transformer of transformers) {
    flow =
      inputs.unityVoltageAt === 'inverter'
        ? lowSideOf(flow, transformer)
        : added(flow, transformer, poiKva)
  }
  const withLoss = acLossFraction === undefined ? 0 : limitKw / (1 - acLossFraction)
  const inverterKw = Math.max(flow.kw, withLoss)
  const inverterKva = Math.hypot(inverterKw, flow.kvar)
  const needed = {
    inverterKw,
    inverterKvar: flow.kvar,
    inverterKva,
    inverterPowerFactor: inverterKva > 0 ? inverterKw / inverterKva : 1,
    poiKvar,
    absorbedKvar: flow.kvar - poiKvar,
  }
  return { ...needed, account: accountOf(inputs, needed), source: SOURCE }
}

interface Flow {
  kw: number
  kvar: number
}

/** R and X in percent from impedance and X/R: R = Z / sqrt(1 + (X/R)²). */
export function resistancePct(transformer: SeriesTransformer): number {
  return transformer.impedancePct / Math.sqrt(1 + transformer.xOverR ** 2)
}

/** Flow with the losses of a transformer added at the apparent power that passes through it. */
function added(highSide: Flow, transformer: SeriesTransformer, kva: number): Flow {
  const loading = (kva * kva) / (100 * transformer.ratedKva)
  const r = resistancePct(transformer)
  return {
    kw: highSide.kw + r * loading + (transformer.noLoadKw ?? 0),
    kvar: highSide.kvar + r * transformer.xOverR * loading,
  }
}

/** Low-side flow that leaves `highSide` after the losses at the low side's own apparent power. */
function lowSideOf(highSide: Flow, transformer: SeriesTransformer): Flow {
  let flow = highSide
  for (let round = 0; round < 100; round++) {
    const next = added(highSide, transformer, Math.hypot(flow.kw, flow.kvar))
    if (Math.abs(next.kvar - flow.kvar) < 1e-9) return next
    flow = next
  }
  return flow
}

function accountOf(inputs: NeededKvaInputs, needed: Omit<NeededKva, 'account' | 'source'>): string {
  const mega = (kilo: number) => (kilo / 1000).toFixed(1)
  const { limitKw, powerFactorAtPoi } = inputs
  return `${mega(needed.inverterKva)} MVA needed at the inverters for ${mega(limitKw)} MW at ${powerFactorAtPoi}: ${mega(needed.poiKvar)} Mvar at the POI and ${mega(needed.absorbedKvar)} Mvar absorbed by the transformers, with ${mega(needed.inverterKw)} MW.`
}
