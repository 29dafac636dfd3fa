import { clamp } from '@/components/drawing/geometry'
import { isClosed, type LineStep } from '@/components/line/model'

/** Whole days from 1970-01-01 to a civil date. */
export function dayNumber(on: string): number {
  return Math.round(Date.parse(`${on}T00:00:00Z`) / 86_400_000)
}

/** First days of the months from the month of `fromDay` to beyond `toDay`. */
export function monthStarts(
  fromDay: number,
  toDay: number,
): { day: number; year: number; month: number }[] {
  const first = new Date(fromDay * 86_400_000)
  const starts = []
  for (let i = 0; i < 1200; i++) {
    const at = Date.UTC(first.getUTCFullYear(), first.getUTCMonth() + i, 1)
    const start = new Date(at)
    const day = at / 86_400_000
    starts.push({ day, year: start.getUTCFullYear(), month: start.getUTCMonth() })
    if (day > toDay) break
  }
  return starts
}

export interface ScalePoint {
  day: number
  x: number
}

/** Days to px through rising points, straight between them and clamped outside. */
export function scaleThrough(points: readonly ScalePoint[]): (day: number) => number {
  return (day) => {
    const after = points.findIndex((point) => point.day > day)
    if (after === 0) return points[0]?.x ?? 0
    const b = after === -1 ? points.at(-1) : points[after]
    const a = after === -1 ? b : points[after - 1]
    if (a === undefined || b === undefined) return 0
    if (b.day === a.day) return b.x
    return a.x + ((day - a.day) / (b.day - a.day)) * (b.x - a.x)
  }
}

const NEAR_PAST_DAYS = 330
const NEAR_AHEAD_DAYS = 285
const FAR_DAYS = 130

/** Where the axis is broken: days between which the scale is tighter than around today. */
export interface TimeWindow {
  fromDay: number
  toDay: number
  nearFromDay: number
  nearToDay: number
}

/** The stretch of time to draw and the near part of it that gets the full scale. */
export function timeWindow(days: readonly number[], today: number): TimeWindow {
  const first = Math.min(today, ...days)
  const last = Math.max(today, ...days)
  const starts = monthStarts(first, last + 1)
  const fromDay = starts[0]?.day ?? first
  const toDay = starts.at(-1)?.day ?? last
  const farPast = today - NEAR_PAST_DAYS - fromDay > FAR_DAYS
  const farAhead = toDay - (today + NEAR_AHEAD_DAYS) > FAR_DAYS
  return {
    fromDay,
    toDay,
    nearFromDay: farPast ? monthAt(today - NEAR_PAST_DAYS) : fromDay,
    nearToDay: farAhead ? monthAt(today + NEAR_AHEAD_DAYS) : toDay,
  }
}

function monthAt(day: number): number {
  return monthStarts(day, day)[0]?.day ?? day
}

/** The scale before steps are spread: full around today, tighter beyond the breaks. */
export function baseScale(window: TimeWindow, x1: number, x2: number): ScalePoint[] {
  const past = (window.nearFromDay - window.fromDay) / 365
  const ahead = (window.toDay - window.nearToDay) / 365
  const share = (years: number) => (years === 0 ? 0 : clamp(0.07 + 0.04 * years, 0.1, 0.2))
  const [a, b] = [share(past), share(ahead)]
  const width = x2 - x1
  const points = [
    { day: window.fromDay, x: x1 },
    { day: window.nearFromDay, x: x1 + a * width },
    { day: window.nearToDay, x: x2 - b * width },
    { day: window.toDay, x: x2 },
  ]
  return points.filter((point, i) => i === 0 || point.day > (points[i - 1]?.day ?? -Infinity))
}

/** A thing that needs its own place on the axis: a dated step, or today (`step` absent). */
export interface AxisItem {
  day: number
  step?: LineStep
  /** Room wanted to its left, px. */
  gap: number
}

/** Dated steps and today in the order of time; today stands after what is done on its day. */
export function orderItems(items: readonly AxisItem[]): AxisItem[] {
  const rank = (item: AxisItem) => (item.step === undefined ? 1 : isClosed(item.step.state) ? 0 : 2)
  return items
    .map((item, index) => ({ item, index }))
    .sort((a, b) => a.item.day - b.item.day || rank(a.item) - rank(b.item) || a.index - b.index)
    .map(({ item }) => item)
}

/**
 * Pushes places apart until each has its gap, moving them as little as a sweep to the right and one
 * back allow. Gaps shrink together when the sheet is too narrow for them.
 */
export function spread(
  wanted: readonly number[],
  gaps: readonly number[],
  low: number,
  high: number,
): number[] {
  const needed = gaps.reduce((sum, gap, i) => sum + (i === 0 ? 0 : gap), 0)
  const shrink = Math.min(1, (high - low) / Math.max(1, needed))
  const gapAt = (i: number) => (gaps[i] ?? 0) * shrink
  const xs = wanted.map((x) => clamp(x, low, high))
  for (let i = 1; i < xs.length; i++) xs[i] = Math.max(xs[i] ?? 0, (xs[i - 1] ?? 0) + gapAt(i))
  for (let i = xs.length - 1; i >= 0; i--) {
    const limit = i === xs.length - 1 ? high : (xs[i + 1] ?? high) - gapAt(i + 1)
    xs[i] = Math.min(xs[i] ?? 0, limit)
  }
  return xs
}
