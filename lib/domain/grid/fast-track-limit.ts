/**
 * Upper bounds of line voltage, kV, with the largest plant that fast track takes there, MW.
 * Source: FERC Order 792 (2013), pro forma SGIP section 2.1, table of fast track eligibility. Cell
 * values from memory; the tariff in force comes first.
 */
const rows = [
  { belowKv: 5, anywhereMw: 0.5, mainlineMw: 0.5 },
  { belowKv: 15, anywhereMw: 2, mainlineMw: 3 },
  { belowKv: 30, anywhereMw: 3, mainlineMw: 4 },
] as const
const top = { upToKv: 69, anywhereMw: 4, mainlineMw: 5 } as const

/**
 * The largest inverter-based plant, MWac, that the federal fast track takes at a line voltage in
 * kV; null above the voltages it reaches. `onMainline`: on a mainline and within 2.5 electrical
 * circuit miles of the substation.
 * @throws RangeError for a voltage that is not above 0 kV
 */
export function fastTrackLimitMw(kv: number, onMainline: boolean): number | null {
  if (!(kv > 0)) throw new RangeError(`Found ${kv} kV; a line voltage above 0 kV is needed.`)
  const row = rows.find((one) => kv < one.belowKv) ?? (kv <= top.upToKv ? top : null)
  if (!row) return null
  return onMainline ? row.mainlineMw : row.anywhereMw
}
