/** One point of a duration curve: `kw` is reached or passed in `hours` hours a year. */
export interface DurationPoint {
  hours: number
  kw: number
}

const POINTS = 240

/**
 * Duration curve from hourly power in ascending order: highest hour first, about 240 points over
 * the hours with output, the first ten hours one by one.
 */
export function durationCurve(ascending: Float64Array): DurationPoint[] {
  let positive = 0
  while (positive < ascending.length && ascending[ascending.length - 1 - positive]! > 0) positive++
  const points: DurationPoint[] = []
  let last = 0
  for (let k = 0; k <= POINTS && positive > 0; k++) {
    const hours = k < 10 ? k + 1 : Math.round(10 + ((k - 10) * (positive - 10)) / (POINTS - 10))
    if (hours <= last || hours > positive) continue
    points.push({ hours, kw: ascending[ascending.length - hours]! })
    last = hours
  }
  if (last < positive) points.push({ hours: positive, kw: ascending[ascending.length - positive]! })
  return points
}

/**
 * Percentile between 0 and 1 by linear interpolation between order statistics (type 7), of
 * `ascending` values preceded by `zeros` further zeros.
 */
export function percentile(ascending: Float64Array, share: number, zeros = 0): number {
  const count = ascending.length + zeros
  if (count === 0) return 0
  const rank = share * (count - 1)
  const below = Math.floor(rank)
  const at = (index: number) => (index < zeros ? 0 : ascending[Math.min(index, count - 1) - zeros]!)
  return at(below) + (rank - below) * (at(below + 1 < count ? below + 1 : below) - at(below))
}
