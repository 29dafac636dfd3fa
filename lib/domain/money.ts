/** Money as integer minor units (US cents). No amount is ever a float of dollars. */

/** `$114,900`, `$114,900.50`; cents only where there are some, a minus before the dollar sign. */
export function sayDollars(amountMinor: number): string {
  const cents = Math.abs(amountMinor)
  const dollars = String(Math.floor(cents / 100)).replace(/\B(?=(\d{3})+$)/g, ',')
  const rest = cents % 100
  const sign = amountMinor < 0 ? '-' : ''
  return `${sign}$${dollars}${rest === 0 ? '' : `.${String(rest).padStart(2, '0')}`}`
}

/** Watts of a figure in MW, exact for figures of up to six decimals. */
export function wattsOf(megawatts: number): bigint {
  return BigInt(Math.round(megawatts * 1e6))
}

type Rounding = 'up' | 'nearest'

/**
 * `amount × numerator / denominator` without a float on the way. A fraction of a cent rounds up
 * (what is posted is then never short) or to the nearest cent, a half up. For amounts and factors
 * that are not negative.
 */
export function scaled(
  amountMinor: number,
  numerator: bigint,
  denominator: bigint,
  rounding: Rounding = 'up',
): number {
  const product = BigInt(amountMinor) * numerator
  const extra = rounding === 'up' ? denominator - 1n : denominator / 2n
  return Number((product + extra) / denominator)
}

const partsPerPercent = 10_000
const partsInWhole = 1_000_000n

/** A percentage of an amount; the percentage may have up to four decimals. */
export function percentOf(amountMinor: number, percent: number, rounding: Rounding = 'up'): number {
  return scaled(amountMinor, BigInt(Math.round(percent * partsPerPercent)), partsInWhole, rounding)
}

/** Whether an amount rose by at least (`atLeast`) or by more than (`over`) a percentage. */
export function roseBy(
  fromMinor: number,
  toMinor: number,
  percent: number,
  edge: 'at_least' | 'over',
): boolean {
  const rise = (BigInt(toMinor) - BigInt(fromMinor)) * partsInWhole
  const bar = BigInt(fromMinor) * BigInt(Math.round(percent * partsPerPercent))
  return edge === 'over' ? rise > bar : rise >= bar && toMinor > fromMinor
}
