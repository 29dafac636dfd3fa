import { px } from '@/components/drawing/geometry'
import type { Palette } from '@/components/drawing/palette'
import { textWidth, type Metrics } from '@/components/drawing/text'
import { Label, Sheet } from '@/components/drawing/sheet'
import type { LineTone } from '@/components/line/model'

/** The color a clock's words stand in. */
export function toneColor(tone: LineTone, palette: Palette): string {
  const colors = {
    soon: palette.soon,
    far: palette.ink2,
    missed: palette.late,
    theirs: palette.blue,
  }
  return colors[tone]
}

interface DimensionTickProps {
  /** The figure, `7 BD` or `missed yesterday`. */
  label: string
  tone: LineTone
  palette: Palette
  metrics: Metrics
  size?: number
}

/** A figure under a small dimension tick: the time left in a table row. */
export function DimensionTick({ label, tone, palette, metrics, size = 14 }: DimensionTickProps) {
  const width = Math.ceil(textWidth(label, 'sans600', size, metrics)) + 2
  const color = toneColor(tone, palette)
  return (
    <Sheet width={width} height={size + 11} title="Time left" desc={label}>
      <TickMark width={width} stroke={color} />
      <Label
        x={1}
        y={size + 6}
        text={label}
        face="sans600"
        size={size}
        fill={color}
        palette={palette}
      />
    </Sheet>
  )
}

interface TickRuleProps {
  tone: LineTone
  palette: Palette
  width: number
}

/** The tick alone, for a figure that the page sets as text of its own. */
export function TickRule({ tone, palette, width }: TickRuleProps) {
  return (
    <svg
      xmlns="http://www.w3.org/2000/svg"
      width={px(width)}
      height={7}
      viewBox={`0 0 ${px(width)} 7`}
      aria-hidden="true"
    >
      <TickMark width={width} stroke={toneColor(tone, palette)} />
    </svg>
  )
}

function TickMark({ width, stroke }: { width: number; stroke: string }) {
  const right = px(width - 0.8)
  return (
    <path d={`M0.8 0.5 v6 M0.8 3.5 H${right} M${right} 0.5 v6`} stroke={stroke} strokeWidth={1.4} />
  )
}
