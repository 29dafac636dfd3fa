/**
 * DC power per kW of rating at standard test conditions, before losses, never below 0.
 * Effective irradiance in W/m2, cell in C, gamma per C. Source: Dobos (2014), NREL/TP-6A20-62641.
 */
export function dcPerUnit(effective: number, cellC: number, gammaPerC: number): number {
  return Math.max((effective / 1000) * (1 + gammaPerC * (cellC - 25)), 0)
}

/** DC power, kW, after the DC loss fraction (taken before the inverter). Source: as above. */
export function dcPowerKw(
  dcKw: number,
  effective: number,
  cellC: number,
  gammaPerC: number,
  dcLossFraction: number,
): number {
  return dcKw * (1 - dcLossFraction) * dcPerUnit(effective, cellC, gammaPerC)
}
