import { clamp, type Box } from '@/components/drawing/geometry'
import { widestLine, wrapText, type Metrics } from '@/components/drawing/text'
import type { LineClock } from '@/components/line/model'

export interface DimensionLayout {
  x1: number
  x2: number
  /** Height of the dimension line. */
  y: number
  /** Where the extension lines begin. */
  top: number
  bottom: number
  /** The figure and its note beside the line. */
  box: Box
  anchor: 'start' | 'end'
  label: string[]
  note: string[]
}

export const FIGURE_SIZE = 13
export const NOTE_SIZE = 12
export const FIGURE_LEAD = 16
const OFF = 11
const MIN_ROOM = 170

/**
 * The dimension line of the running clock in a band above all labels, its figure beside it, or over
 * it where neither side has room.
 */
export function layoutDimension(
  clock: LineClock,
  [x1, x2]: readonly [number, number],
  field: { left: number; right: number; top: number },
  metrics: Metrics,
): DimensionLayout {
  const rightRoom = field.right - x2 - OFF
  const leftRoom = x1 - OFF - field.left
  const beside = Math.max(rightRoom, leftRoom) >= MIN_ROOM
  const oneLine = Math.max(
    widestLine([clock.label], 'sans600', FIGURE_SIZE, metrics),
    widestLine([clock.note ?? ''], 'sans400', NOTE_SIZE, metrics),
  )
  const right = oneLine <= rightRoom || (oneLine > leftRoom && rightRoom >= leftRoom)
  const room = Math.min(560, !beside ? field.right - field.left : right ? rightRoom : leftRoom)
  const label = wrapText(clock.label, 'sans600', FIGURE_SIZE, room, metrics)
  const note =
    clock.note === undefined ? [] : wrapText(clock.note, 'sans400', NOTE_SIZE, room, metrics)
  const width = Math.max(
    widestLine(label, 'sans600', FIGURE_SIZE, metrics),
    widestLine(note, 'sans400', NOTE_SIZE, metrics),
  )
  const height = (label.length + note.length) * FIGURE_LEAD + 2
  const over = clamp((x1 + x2 - width) / 2, field.left, field.right - width)
  const x = !beside ? over : right ? x2 + OFF : x1 - OFF - width
  const y = beside ? field.top + 16 : field.top + height + 8
  return {
    x1,
    x2,
    y,
    top: beside ? field.top : y - 6,
    bottom: Math.max(y + 14, field.top + height),
    box: { x, y: field.top, width, height },
    anchor: beside && !right ? 'end' : 'start',
    label,
    note,
  }
}
