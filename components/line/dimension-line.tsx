import { px } from '@/components/drawing/geometry'
import type { Palette } from '@/components/drawing/palette'
import { Label } from '@/components/drawing/sheet'
import { toneColor } from '@/components/line/dimension-tick'
import {
  FIGURE_LEAD,
  FIGURE_SIZE,
  NOTE_SIZE,
  type DimensionLayout,
} from '@/components/line/layout-dimension'
import type { LineTone } from '@/components/line/model'

interface DimensionLineProps {
  layout: DimensionLayout
  tone: LineTone
  /** Where the extension lines end, px. */
  downTo: number
  palette: Palette
}

/** A duration as a drawing shows a length: two extension lines, arrowheads, the figure beside it. */
export function DimensionLine({ layout, tone, downTo, palette }: DimensionLineProps) {
  const { x1, x2, y, top } = layout
  const color = toneColor(tone, palette)
  return (
    <g>
      {[x1, x2].map((x, i) => (
        <path
          key={i}
          d={`M${px(x)} ${px(top)} V${px(downTo)}`}
          stroke={color}
          strokeWidth={0.9}
          fill="none"
        />
      ))}
      <Arrows x1={x1} x2={x2} y={y} stroke={color} />
      <Figure layout={layout} color={color} palette={palette} />
    </g>
  )
}

interface ArrowsProps {
  x1: number
  x2: number
  y: number
  stroke: string
  strokeWidth?: number
}

/** A line with arrowheads at both ends; from outside where it is too short to hold them. */
export function Arrows({ x1, x2, y, stroke, strokeWidth = 1.5 }: ArrowsProps) {
  const tight = x2 - x1 < 18
  const [a, b] = tight ? [-1, 1] : [1, -1]
  const head = (x: number, way: number) => `M${px(x)} ${px(y)} l${way * 7} -3 v6 Z`
  const line = tight
    ? `M${px(x1 - 14)} ${px(y)} H${px(x1)} M${px(x2)} ${px(y)} h8`
    : `M${px(x1 + 5)} ${px(y)} H${px(x2 - 5)}`
  return (
    <g stroke="none">
      <path d={line} stroke={stroke} strokeWidth={strokeWidth} fill="none" />
      <path d={`${head(x1, a)} ${head(x2, b)}`} fill={stroke} />
    </g>
  )
}

interface FigureProps {
  layout: DimensionLayout
  color: string
  palette: Palette
}

function Figure({ layout, color, palette }: FigureProps) {
  const { box, anchor, label, note } = layout
  const x = anchor === 'start' ? box.x : box.x + box.width
  const lines = [
    ...label.map((text) => ({ text, face: 'sans600' as const, size: FIGURE_SIZE, fill: color })),
    ...note.map((text) => ({
      text,
      face: 'sans400' as const,
      size: NOTE_SIZE,
      fill: palette.ink2,
    })),
  ]
  return lines.map((line, i) => (
    <Label
      key={`${i}-${line.text}`}
      {...line}
      x={x}
      y={box.y + i * FIGURE_LEAD + 12}
      anchor={anchor}
      palette={palette}
    />
  ))
}
