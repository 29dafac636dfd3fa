import { heightAt, type Plot } from '@/components/chart/scale'
import { boxesOverlap, type Box, type Point } from '@/components/drawing/geometry'
import { textWidth, type Metrics } from '@/components/drawing/text'

export interface LimitLabel {
  text: string
  clips: boolean
  lineY: number
  box: Box
}

interface WantedLabel {
  text: string
  y: number
  clips: boolean
}

const HEIGHT = 14

/**
 * Labels of level lines at the right end of a chart whose curve falls to the right: over their line
 * or under it, clear of each other, of the other lines and of the curve. Where all are taken, the
 * label moves up until it is free.
 */
export function placeLimitLabels(
  wanted: readonly WantedLabel[],
  plot: Plot,
  curve: readonly Point[],
  metrics: Metrics,
): LimitLabel[] {
  const placed: LimitLabel[] = []
  for (const want of [...wanted].sort((a, b) => a.y - b.y)) {
    const face = want.clips ? 'sans600' : 'sans400'
    const width = textWidth(want.text, face, 12, metrics)
    const x = plot.x + plot.width - width
    const at = (y: number): Box => ({ x, y, width, height: HEIGHT })
    const lines = wanted.map((w) => ({ x: plot.x, y: w.y - 1, width: plot.width, height: 2 }))
    const free = (box: Box) =>
      heightAt(curve, box.x) > box.y + HEIGHT + 1 &&
      [...placed.map((p) => p.box), ...lines].every((other) => !boxesOverlap(box, other))
    const tries = [want.y - HEIGHT - 4, want.y + 4]
    for (let up = 1; up < 12; up++) tries.push(want.y - HEIGHT - 4 - up * 6)
    const y = tries.find((top) => top >= 0 && free(at(top))) ?? want.y - HEIGHT - 4
    placed.push({ text: want.text, clips: want.clips, lineY: want.y, box: at(y) })
  }
  return placed
}
