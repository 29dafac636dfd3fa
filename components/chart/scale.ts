import type { Point } from '@/components/drawing/geometry'

/** The field of a chart inside its axes, px. */
export interface Plot {
  x: number
  y: number
  width: number
  height: number
}

/** Values from `low` to `high` onto px from `a` to `b`. */
export function linear(low: number, high: number, a: number, b: number): (value: number) => number {
  const span = high - low
  return (value) => (span === 0 ? a : a + ((value - low) / span) * (b - a))
}

/** Round ticks from 0 to `max` or just beyond it, about `count` of them, in steps of 1, 2, 2.5 or 5. */
export function niceTicks(max: number, count: number): number[] {
  if (!(max > 0)) return [0, 1]
  const rough = max / Math.max(1, count)
  const power = 10 ** Math.floor(Math.log10(rough))
  const step = ([1, 2, 2.5, 5, 10].find((unit) => unit * power >= rough - 1e-12) ?? 10) * power
  const ticks: number[] = []
  for (let i = 0; i === 0 || (ticks.at(-1) ?? 0) < max - 1e-9; i++) {
    ticks.push(Number((i * step).toPrecision(10)))
  }
  return ticks
}

/** A figure with thousands commas: `figure(1470.2, 0)` is `1,470`. */
export function figure(value: number, digits: number): string {
  const [whole = '0', fraction] = Math.abs(value).toFixed(digits).split('.')
  const grouped = whole.replace(/\B(?=(\d{3})+$)/g, ',')
  const text = fraction === undefined ? grouped : `${grouped}.${fraction}`
  return value < 0 && Number(text.replaceAll(',', '')) !== 0 ? `−${text}` : text
}

/** A tick's figure with no more digits than its step needs. */
export function tickFigure(value: number, ticks: readonly number[]): string {
  const step = Math.abs((ticks[1] ?? 1) - (ticks[0] ?? 0))
  const digits = step >= 1 && Number.isInteger(step) ? 0 : step >= 0.1 ? 1 : 2
  return figure(value, digits)
}

/** Energy in the unit that reads best: `830 MWh`, `112.4 GWh`. */
export function energyFigure(kwh: number): string {
  const mwh = kwh / 1000
  if (Math.abs(mwh) >= 10_000) return `${figure(mwh / 1000, 1)} GWh`
  return `${figure(mwh, Math.abs(mwh) < 10 ? 1 : 0)} MWh`
}

/** Height of a line through points with rising `x`, straight between them, at `x`. */
export function heightAt(points: readonly Point[], x: number): number {
  const after = points.findIndex((point) => point.x >= x)
  if (after === 0) return points[0]?.y ?? 0
  const b = after === -1 ? points.at(-1) : points[after]
  const a = after === -1 ? b : points[after - 1]
  if (a === undefined || b === undefined) return 0
  return b.x === a.x ? b.y : a.y + ((x - a.x) / (b.x - a.x)) * (b.y - a.y)
}

/** The uppermost height of a line between two places. */
export function highestBetween(points: readonly Point[], x1: number, x2: number): number {
  const inside = points.filter((point) => point.x > x1 && point.x < x2).map((point) => point.y)
  return Math.min(heightAt(points, x1), heightAt(points, x2), ...inside)
}

/**
 * A smooth line through points with rising `x` that never overshoots them, as short straight
 * pieces: cubic Hermite with limited slopes. Source: Fritsch and Carlson, SIAM J. Numer. Anal.
 * 17(2), 1980, with the harmonic mean of Fritsch and Butland (1984) as slope.
 */
export function smoothLine(points: readonly Point[], pieces = 10): Point[] {
  const slopes = limitedSlopes(points)
  return points.flatMap((a, i) => {
    const b = points[i + 1]
    if (b === undefined) return [a]
    const h = b.x - a.x
    return Array.from({ length: pieces }, (_, k) => {
      const t = k / pieces
      const [t2, t3] = [t * t, t * t * t]
      const y =
        (2 * t3 - 3 * t2 + 1) * a.y +
        (t3 - 2 * t2 + t) * h * (slopes[i] ?? 0) +
        (3 * t2 - 2 * t3) * b.y +
        (t3 - t2) * h * (slopes[i + 1] ?? 0)
      return { x: a.x + t * h, y }
    })
  })
}

function limitedSlopes(points: readonly Point[]): number[] {
  const secants = points.slice(1).map((b, i) => {
    const a = points[i] ?? b
    return b.x === a.x ? 0 : (b.y - a.y) / (b.x - a.x)
  })
  return points.map((_, i) => {
    const [before, after] = [secants[i - 1], secants[i]]
    if (before === undefined || after === undefined) return before ?? after ?? 0
    return before * after <= 0 ? 0 : (2 * before * after) / (before + after)
  })
}
