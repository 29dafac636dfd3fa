import { px } from '@/components/drawing/geometry'
import type { Palette } from '@/components/drawing/palette'
import { Label } from '@/components/drawing/sheet'
import { textWidth, type Metrics } from '@/components/drawing/text'
import type { Plot } from '@/components/chart/scale'

export const AXIS_SIZE = 12

export interface AxisTick {
  /** Px along the axis. */
  at: number
  text: string
}

interface FrameProps {
  plot: Plot
  xTicks: readonly AxisTick[]
  yTicks: readonly AxisTick[]
  xTitle?: string
  yTitle?: string
  palette: Palette
  metrics: Metrics
}

/** Axes of a chart: light rules across, figures outside, the base line in ink. */
export function Frame({ plot, xTicks, yTicks, xTitle, yTitle, palette, metrics }: FrameProps) {
  const base = plot.y + plot.height
  const text = { face: 'sans400' as const, size: AXIS_SIZE, fill: palette.ink2, palette }
  return (
    <g>
      {yTicks.map((tick) => (
        <g key={tick.at}>
          <path
            d={`M${px(plot.x)} ${px(tick.at)} h${px(plot.width)}`}
            stroke={palette.rule}
            strokeWidth={0.8}
          />
          <Label x={plot.x - 8} y={tick.at + 4} text={tick.text} anchor="end" {...text} />
        </g>
      ))}
      <path
        d={`M${px(plot.x)} ${px(base)} h${px(plot.width)}`}
        stroke={palette.ink}
        strokeWidth={1}
      />
      {fittingTicks(xTicks, metrics).map((tick) => (
        <g key={tick.at}>
          <path d={`M${px(tick.at)} ${px(base)} v4`} stroke={palette.ink} strokeWidth={1} />
          <Label x={tick.at} y={base + 17} text={tick.text} anchor="middle" {...text} />
        </g>
      ))}
      {xTitle === undefined ? null : (
        <Label x={plot.x + plot.width} y={base + 34} text={xTitle} anchor="end" {...text} />
      )}
      {yTitle === undefined ? null : <Label x={2} y={plot.y - 12} text={yTitle} {...text} />}
    </g>
  )
}

/** Every tick where all fit, every second or further one where they do not. */
function fittingTicks(ticks: readonly AxisTick[], metrics: Metrics): readonly AxisTick[] {
  const widest = Math.max(0, ...ticks.map((t) => textWidth(t.text, 'sans400', AXIS_SIZE, metrics)))
  const pitch = Math.abs((ticks[1]?.at ?? Infinity) - (ticks[0]?.at ?? 0))
  const every = Math.max(1, Math.ceil((widest + 10) / Math.max(1, pitch)))
  return ticks.filter((_, i) => i % every === 0)
}

/** Room for the figures left of the plot, px. */
export function axisRoom(ticks: readonly string[], metrics: Metrics): number {
  return Math.ceil(
    12 + Math.max(0, ...ticks.map((text) => textWidth(text, 'sans400', AXIS_SIZE, metrics))),
  )
}

interface UprightProps {
  x: number
  y1: number
  y2: number
  stroke: string
}

/** An upright dimension between two heights, with arrowheads; from outside where it is short. */
export function UprightDimension({ x, y1, y2, stroke }: UprightProps) {
  const [top, bottom] = [Math.min(y1, y2), Math.max(y1, y2)]
  const tight = bottom - top < 15
  const way = tight ? -1 : 1
  const head = (y: number, down: number) => `M${px(x)} ${px(y)} l-3 ${down * 6} h6 Z`
  const line = tight
    ? `M${px(x)} ${px(top - 11)} V${px(top)} M${px(x)} ${px(bottom)} v11`
    : `M${px(x)} ${px(top + 4)} V${px(bottom - 4)}`
  return (
    <g stroke="none">
      <path d={line} stroke={stroke} strokeWidth={1.2} fill="none" />
      <path d={`${head(top, way)} ${head(bottom, -way)}`} fill={stroke} />
    </g>
  )
}
