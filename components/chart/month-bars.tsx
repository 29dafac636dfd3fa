import { axisRoom, Frame } from '@/components/chart/frame'
import { energyFigure, figure, linear, niceTicks, tickFigure } from '@/components/chart/scale'
import { px } from '@/components/drawing/geometry'
import { hatchRect } from '@/components/drawing/hatch'
import type { Palette } from '@/components/drawing/palette'
import { Label, Sheet } from '@/components/drawing/sheet'
import { textWidth, type Metrics } from '@/components/drawing/text'

export interface MonthEnergy {
  /** 1 to 12. */
  month: number
  exportKwh: number
  clippedKwh: number
}

interface MonthBarsProps {
  months: readonly MonthEnergy[]
  width: number
  height: number
  palette: Palette
  metrics: Metrics
}

const NAMES = ['Jan', 'Feb', 'Mar', 'Apr', 'May', 'Jun', 'Jul', 'Aug', 'Sep', 'Oct', 'Nov', 'Dec']
const SIZE = 11

/** Energy at the POI by month, with what was clipped hatched on top. */
export function MonthBars({ months, width, height, palette, metrics }: MonthBarsProps) {
  const { plot, pitch, unit, ticks, y } = scaleOf(months, width, height, metrics)
  const short = (month: number) => (pitch < 30 ? nameOf(month).slice(0, 1) : nameOf(month))
  const figures = months.map((m) => figure(m.exportKwh / unit.kwh, unit.digits))
  const widest = Math.max(0, ...figures.map((text) => textWidth(text, 'mono400', SIZE, metrics)))
  return (
    <Sheet
      width={width}
      height={height}
      title="Energy at the POI by month"
      desc={months.map((m) => describeMonth(nameOf(m.month), m)).join('; ')}
    >
      <Frame
        plot={plot}
        xTicks={months.map((m, i) => ({ at: plot.x + (i + 0.5) * pitch, text: short(m.month) }))}
        yTicks={ticks.map((v) => ({ at: y(v * unit.kwh), text: tickFigure(v, ticks) }))}
        yTitle={`${unit.name}, clipped hatched`}
        palette={palette}
        metrics={metrics}
      />
      {months.map((month, i) => (
        <MonthBar
          key={month.month}
          month={month}
          x={plot.x + (i + 0.2) * pitch}
          width={pitch * 0.6}
          y={y}
          text={widest + 4 <= pitch ? (figures[i] ?? '') : ''}
          palette={palette}
        />
      ))}
    </Sheet>
  )
}

function nameOf(month: number): string {
  return NAMES[month - 1] ?? String(month)
}

function scaleOf(months: readonly MonthEnergy[], width: number, height: number, metrics: Metrics) {
  const most = Math.max(1, ...months.map((m) => m.exportKwh + m.clippedKwh))
  const large = most >= 10_000_000
  const unit = large ? { name: 'GWh', kwh: 1e6, digits: 1 } : { name: 'MWh', kwh: 1e3, digits: 0 }
  const ticks = niceTicks(most / unit.kwh, 4)
  const left = axisRoom(
    ticks.map((v) => tickFigure(v, ticks)),
    metrics,
  )
  const plot = { x: left, y: 38, width: width - left - 6, height: height - 38 - 26 }
  const y = linear(0, (ticks.at(-1) ?? 1) * unit.kwh, plot.y + plot.height, plot.y)
  return { plot, pitch: plot.width / Math.max(1, months.length), unit, ticks, y }
}

function describeMonth(name: string, month: MonthEnergy): string {
  const clipped = month.clippedKwh > 0 ? `, ${energyFigure(month.clippedKwh)} clipped` : ''
  return `${name} ${energyFigure(month.exportKwh)}${clipped}`
}

interface MonthBarProps {
  month: MonthEnergy
  x: number
  width: number
  y: (kwh: number) => number
  text: string
  palette: Palette
}

function MonthBar({ month, x, width, y, text, palette }: MonthBarProps) {
  const [base, top] = [y(0), y(month.exportKwh)]
  const cap = y(month.exportKwh + month.clippedKwh)
  const box = { x: px(x), width: px(width) }
  return (
    <g>
      <rect
        {...box}
        y={px(top)}
        height={px(base - top)}
        fill={palette.sheet}
        stroke={palette.ink}
        strokeWidth={1.3}
      />
      {top - cap < 0.3 ? null : (
        <g stroke={palette.copper} fill="none" strokeWidth={1}>
          <path d={hatchRect(x, cap, width, top - cap, 3.6)} />
          <rect {...box} y={px(cap)} height={px(top - cap)} strokeWidth={1.2} />
        </g>
      )}
      {text === '' ? null : (
        <Label
          x={x + width / 2}
          y={cap - 6}
          text={text}
          face="mono400"
          size={SIZE}
          fill={palette.ink}
          palette={palette}
          halo={palette.page}
          anchor="middle"
        />
      )}
    </g>
  )
}
