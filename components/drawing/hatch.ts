import { px, type Point } from '@/components/drawing/geometry'

/**
 * Hatching of a polygon by lines at 45 degrees, as one path. Drawn as lines and not as a pattern,
 * because a pattern needs an id and ids clash when a page holds two drawings.
 *
 * @param points corners of a simple polygon in px
 * @param spacingPx distance between lines, measured across them
 */
export function hatchPath(points: readonly Point[], spacingPx: number): string {
  // In the turned frame u = x + y is constant along a hatch line and v = y runs along it.
  const step = spacingPx * Math.SQRT2
  const sums = points.map((p) => p.x + p.y)
  const first = Math.ceil(Math.min(...sums) / step) * step
  const parts: string[] = []
  for (let u = first; u < Math.max(...sums); u += step) {
    const cuts = crossings(points, u)
    for (let i = 0; i + 1 < cuts.length; i += 2) {
      const [from, to] = [cuts[i] ?? 0, cuts[i + 1] ?? 0]
      parts.push(`M${px(u - from)} ${px(from)} L${px(u - to)} ${px(to)}`)
    }
  }
  return parts.join(' ')
}

function crossings(points: readonly Point[], u: number): number[] {
  const found: number[] = []
  points.forEach((a, i) => {
    const b = points[(i + 1) % points.length] ?? a
    const [ua, ub] = [a.x + a.y, b.x + b.y]
    if (ua <= u !== ub <= u) found.push(a.y + ((u - ua) / (ub - ua)) * (b.y - a.y))
  })
  return found.sort((a, b) => a - b)
}

/** Hatching of a rectangle. */
export function hatchRect(
  x: number,
  y: number,
  width: number,
  height: number,
  spacingPx: number,
): string {
  const corners = [
    { x, y },
    { x: x + width, y },
    { x: x + width, y: y + height },
    { x, y: y + height },
  ]
  return hatchPath(corners, spacingPx)
}
