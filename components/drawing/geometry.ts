/** A box in px; y grows downward. */
export interface Box {
  x: number
  y: number
  width: number
  height: number
}

export interface Point {
  x: number
  y: number
}

/** True when the boxes share area or come closer than the gaps, in px. */
export function boxesOverlap(a: Box, b: Box, gapX = 0, gapY = 0): boolean {
  return (
    a.x < b.x + b.width + gapX &&
    b.x < a.x + a.width + gapX &&
    a.y < b.y + b.height + gapY &&
    b.y < a.y + a.height + gapY
  )
}

/** True when a vertical line at `x` from `y1` to `y2` passes through the box or nearer than `gap`. */
export function verticalCrosses(x: number, y1: number, y2: number, box: Box, gap = 0): boolean {
  const [top, bottom] = y1 < y2 ? [y1, y2] : [y2, y1]
  const beside = x <= box.x - gap || x >= box.x + box.width + gap
  return !beside && top < box.y + box.height && bottom > box.y
}

/** Rounds to hundredths of a px, so that drawings are the same text on every machine. */
export function px(value: number): number {
  const rounded = Math.round(value * 100) / 100
  return rounded === 0 ? 0 : rounded
}

export function clamp(value: number, low: number, high: number): number {
  return Math.min(Math.max(value, low), high)
}

/** Path of an open or closed line through points. */
export function linePath(points: readonly Point[], closed = false): string {
  const body = points.map((p, i) => `${i === 0 ? 'M' : 'L'}${px(p.x)} ${px(p.y)}`).join(' ')
  return closed ? `${body} Z` : body
}
