/** Efficiency of the reference inverter of the curve at rated power. */
const REFERENCE_EFFICIENCY = 0.9637

/**
 * AC power of an inverter before its limit, kW: the part-load curve, continued above rated load.
 * `acRatedKw` is the AC rating, `efficiency` the nominal efficiency; DC rating is their quotient.
 * Never below 0. Source: Dobos (2014), NREL/TP-6A20-62641.
 */
export function inverterUnclippedKw(dcKw: number, acRatedKw: number, efficiency: number): number {
  if (dcKw <= 0 || acRatedKw <= 0) return 0
  const dcRatedKw = acRatedKw / efficiency
  const load = dcKw / dcRatedKw
  const ac = (efficiency / REFERENCE_EFFICIENCY) * (-0.0162 * load * load + 0.9858 * load - 0.0059)
  return ac > 0 ? ac * dcRatedKw : 0
}

/** AC power of an inverter held at its rating, kW. */
export function inverterAcKw(dcKw: number, acRatedKw: number, efficiency: number): number {
  return Math.min(inverterUnclippedKw(dcKw, acRatedKw, efficiency), acRatedKw)
}
