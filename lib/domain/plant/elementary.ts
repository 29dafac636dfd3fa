/**
 * Elementary functions from additions, products, quotients and square roots alone. Those five are
 * rounded the same everywhere (IEEE 754), while `Math.sin` and its kin may differ in the last bit
 * between a browser and the server (ECMAScript leaves them to the engine). The chain uses these, so
 * that live and frozen figures are the same bits. Each is within a few units in the last place.
 * Series by Taylor; reduction by parts of the constant (Cody & Waite 1980).
 */

const QUADRANTS = 2 / Math.PI
const HALF_PI_1 = 1.5707963267341256
const HALF_PI_2 = 6.077100506303966e-11
const HALF_PI_3 = 2.0222662487959506e-21
const LN2_1 = 0.6931471803691238
const LN2_2 = 1.9082149292705877e-10
const PI = Math.PI

/** Sine of an angle in radians, up to about a million of them. */
export function sinOf(x: number): number {
  const k = Math.floor(x * QUADRANTS + 0.5)
  const r = k === 0 ? x : x - k * HALF_PI_1 - k * HALF_PI_2 - k * HALF_PI_3
  const value = (k & 1) === 0 ? sinSeries(r) : cosSeries(r)
  return (k & 2) === 0 ? value : -value
}

/** Cosine of an angle in radians, up to about a million of them. */
export function cosOf(x: number): number {
  const k = Math.floor(x * QUADRANTS + 0.5)
  const r = k === 0 ? x : x - k * HALF_PI_1 - k * HALF_PI_2 - k * HALF_PI_3
  const value = (k & 1) === 0 ? cosSeries(r) : sinSeries(r)
  return ((k + 1) & 2) === 0 ? value : -value
}

/** Tangent of an angle in radians. */
export function tanOf(x: number): number {
  return sinOf(x) / cosOf(x)
}

/** On at most an eighth of a turn. */
function sinSeries(x: number): number {
  const z = x * x
  let sum = 1 / 355687428096000
  sum = sum * z - 1 / 1307674368000
  sum = sum * z + 1 / 6227020800
  sum = sum * z - 1 / 39916800
  sum = sum * z + 1 / 362880
  sum = sum * z - 1 / 5040
  sum = sum * z + 1 / 120
  sum = sum * z - 1 / 6
  return x + x * z * sum
}

function cosSeries(x: number): number {
  const z = x * x
  let sum = 1 / 20922789888000
  sum = sum * z - 1 / 87178291200
  sum = sum * z + 1 / 479001600
  sum = sum * z - 1 / 3628800
  sum = sum * z + 1 / 40320
  sum = sum * z - 1 / 720
  sum = sum * z + 1 / 24
  return 1 - (z / 2 - z * z * sum)
}

/** Angle whose tangent is `x`, radians. */
export function atanOf(x: number): number {
  if (x < 0) return -atanOf(-x)
  if (x > 1) return PI / 2 - atanOf(1 / x)
  if (x > 0.4142135623730951) return PI / 4 + atanHalved((x - 1) / (x + 1))
  return atanHalved(x)
}

/** Halves an angle whose tangent is at most 0.42 for the series. */
function atanHalved(x: number): number {
  if (x > -0.2 && x < 0.2) return atanSeries(x)
  return 2 * atanSeries(x / (1 + Math.sqrt(1 + x * x)))
}

function atanSeries(x: number): number {
  const z = x * x
  let sum = -1 / 23
  sum = sum * z + 1 / 21
  sum = sum * z - 1 / 19
  sum = sum * z + 1 / 17
  sum = sum * z - 1 / 15
  sum = sum * z + 1 / 13
  sum = sum * z - 1 / 11
  sum = sum * z + 1 / 9
  sum = sum * z - 1 / 7
  sum = sum * z + 1 / 5
  sum = sum * z - 1 / 3
  return x + x * z * sum
}

/** Angle of the point (x, y), radians, from -pi to pi. */
export function atan2Of(y: number, x: number): number {
  if (x > 0) return atanOf(y / x)
  if (x < 0) return y >= 0 ? atanOf(y / x) + PI : atanOf(y / x) - PI
  if (x !== 0) return NaN
  if (y === 0) return 0
  return y > 0 ? PI / 2 : y < 0 ? -PI / 2 : NaN
}

/** Angle whose sine is `x`, radians; NaN outside -1 to 1. */
export function asinOf(x: number): number {
  return atan2Of(x, Math.sqrt((1 - x) * (1 + x)))
}

/** Angle whose cosine is `x`, radians; NaN outside -1 to 1. */
export function acosOf(x: number): number {
  return 2 * atan2Of(Math.sqrt(1 - x), Math.sqrt(1 + x))
}

/** e to the `x`. */
export function expOf(x: number): number {
  if (x > 709) return Infinity
  if (!(x > -708)) return x < 0 ? 0 : NaN
  const k = Math.floor(x / LN2_1 + 0.5)
  const r = x - k * LN2_1 - k * LN2_2
  let sum = 1 / 6227020800
  sum = sum * r + 1 / 479001600
  sum = sum * r + 1 / 39916800
  sum = sum * r + 1 / 3628800
  sum = sum * r + 1 / 362880
  sum = sum * r + 1 / 40320
  sum = sum * r + 1 / 5040
  sum = sum * r + 1 / 720
  sum = sum * r + 1 / 120
  sum = sum * r + 1 / 24
  sum = sum * r + 1 / 6
  sum = sum * r + 0.5
  return (1 + r + r * r * sum) * powerOfTwo(k)
}

/** Exact for the exponents of `expOf`. */
function powerOfTwo(exponent: number): number {
  let power = 1
  let base = exponent < 0 ? 0.5 : 2
  for (let left = Math.abs(exponent); left > 0; left = Math.floor(left / 2)) {
    if (left % 2 === 1) power *= base
    base *= base
  }
  return power
}

/** Natural logarithm; NaN below 0. */
export function logOf(x: number): number {
  if (x === 0) return -Infinity
  if (!(x > 0) || x === Infinity) return x > 0 ? x : NaN
  let k = 0
  let m = x
  while (m > 1.4142135623730951) {
    m /= 2
    k++
  }
  while (m < 0.7071067811865476) {
    m *= 2
    k--
  }
  const s = (m - 1) / (m + 1)
  const z = s * s
  let sum = 1 / 23
  for (let odd = 21; odd >= 3; odd -= 2) sum = sum * z + 1 / odd
  return k * LN2_1 + (2 * s + 2 * s * z * sum + k * LN2_2)
}

/** `base` to the `exponent` for a base of 0 or more. */
export function powOf(base: number, exponent: number): number {
  if (exponent === 0) return 1
  if (base === 0) return exponent > 0 ? 0 : Infinity
  return expOf(exponent * logOf(base))
}
