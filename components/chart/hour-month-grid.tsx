import { energyFigure, figure } from '@/components/chart/scale'
import { px } from '@/components/drawing/geometry'
import { hatchRect } from '@/components/drawing/hatch'
import type { Palette } from '@/components/drawing/palette'
import { Label, Sheet } from '@/components/drawing/sheet'
import { textWidth, type Metrics } from '@/components/drawing/text'

interface HourMonthGridProps {
  /** Energy in kWh, [24 hours][12 months]; row 0 ends at 1:00. */
  kwhByHourAndMonth: readonly (readonly number[])[]
  /** What the energy is, `Clipped energy`. */
  title: string
  width: number
  height: number
  palette: Palette
  metrics: Metrics
}

const LETTERS = ['J', 'F', 'M', 'A', 'M', 'J', 'J', 'A', 'S', 'O', 'N', 'D']
const NAMES = ['Jan', 'Feb', 'Mar', 'Apr', 'May', 'Jun', 'Jul', 'Aug', 'Sep', 'Oct', 'Nov', 'Dec']
const LEFT = 46
const TOP = 8
const FOOT = 54
const DENSEST = 2.8
const WIDEST = 15

/** Distance between hatch lines for a share of the largest cell, px. */
function spacingFor(share: number): number {
  return DENSEST / Math.max(share, DENSEST / WIDEST)
}

/** When in day and year the energy falls: the denser the hatching, the more MWh. */
export function HourMonthGrid(props: HourMonthGridProps) {
  const { kwhByHourAndMonth: cells, title, width, height, palette } = props
  const [from, to] = shownHours(cells)
  const cellWidth = (width - LEFT - 2) / 12
  const cellHeight = (height - FOOT - TOP) / (to - from + 1)
  const most = Math.max(0, ...cells.flat())
  const rows = cells.slice(from, to + 1)
  return (
    <Sheet width={width} height={height} title={title} desc={describe(cells)}>
      <path
        d={gridPath(rows.length, cellWidth, cellHeight)}
        stroke={palette.rule}
        strokeWidth={1}
      />
      <Cells rows={rows} most={most} width={cellWidth} height={cellHeight} palette={palette} />
      <Hours from={from} to={to} cellHeight={cellHeight} palette={palette} />
      <Months y={height - FOOT + 15} cellWidth={cellWidth} palette={palette} />
      <Key most={most} y={height - 22} {...props} />
    </Sheet>
  )
}

/** Rows to show: 5:00 to 20:00, and further where there is energy. */
function shownHours(cells: readonly (readonly number[])[]): [number, number] {
  const busy = cells.flatMap((row, hour) => (row.some((kwh) => kwh > 0) ? [hour] : []))
  return [Math.min(4, ...busy), Math.min(23, Math.max(19, ...busy))]
}

function gridPath(rows: number, cellWidth: number, cellHeight: number): string {
  const [right, bottom] = [px(LEFT + 12 * cellWidth), px(TOP + rows * cellHeight)]
  const across = Array.from(
    { length: rows + 1 },
    (_, i) => `M${LEFT} ${px(TOP + i * cellHeight)} H${right}`,
  )
  const down = Array.from(
    { length: 13 },
    (_, i) => `M${px(LEFT + i * cellWidth)} ${TOP} V${bottom}`,
  )
  return [...across, ...down].join(' ')
}

interface CellsProps {
  rows: readonly (readonly number[])[]
  most: number
  width: number
  height: number
  palette: Palette
}

function Cells({ rows, most, width, height, palette }: CellsProps) {
  const hatches = rows.flatMap((row, r) =>
    row.flatMap((kwh, m) => {
      if (kwh <= 0) return []
      const [x, y] = [LEFT + m * width, TOP + r * height]
      return [hatchRect(x, y, width, height, spacingFor(kwh / most))]
    }),
  )
  return <path d={hatches.join(' ')} stroke={palette.copper} strokeWidth={1} fill="none" />
}

interface MonthsProps {
  y: number
  cellWidth: number
  palette: Palette
}

function Months({ y, cellWidth, palette }: MonthsProps) {
  return LETTERS.map((letter, m) => (
    <Label
      key={m}
      x={LEFT + (m + 0.5) * cellWidth}
      y={y}
      text={letter}
      face="sans400"
      size={12}
      fill={palette.ink2}
      palette={palette}
      anchor="middle"
    />
  ))
}

interface HoursProps {
  from: number
  to: number
  cellHeight: number
  palette: Palette
}

/** The hour each third row ends at. */
function Hours({ from, to, cellHeight, palette }: HoursProps) {
  const hours = Array.from({ length: to - from + 1 }, (_, i) => from + i + 1)
  return hours
    .filter((hour) => hour % 3 === 0)
    .map((hour) => (
      <Label
        key={hour}
        x={LEFT - 7}
        y={TOP + (hour - from - 0.5) * cellHeight + 4}
        text={`${hour}:00`}
        face="sans400"
        size={12}
        fill={palette.ink2}
        palette={palette}
        anchor="end"
      />
    ))
}

/** What three densities mean. */
function Key(props: HourMonthGridProps & { most: number; y: number }) {
  const { most, y, palette, metrics } = props
  if (most === 0) return null
  let x = LEFT
  return [0.25, 0.5, 1].map((share) => {
    const text = energyFigure(most * share)
    const left = x
    x += 30 + textWidth(text, 'sans400', 12, metrics) + 16
    return (
      <g key={share}>
        <rect x={px(left)} y={y} width={24} height={14} stroke={palette.rule} fill="none" />
        <path
          d={hatchRect(left, y, 24, 14, spacingFor(share))}
          stroke={palette.copper}
          strokeWidth={1}
          fill="none"
        />
        <Label
          x={left + 30}
          y={y + 11}
          text={text}
          face="sans400"
          size={12}
          fill={palette.ink2}
          palette={palette}
        />
      </g>
    )
  })
}

function describe(cells: readonly (readonly number[])[]): string {
  const total = cells.flat().reduce((sum, kwh) => sum + kwh, 0)
  if (total === 0) return 'None in any hour'
  const months = NAMES.map((name, m) => {
    const kwh = cells.reduce((sum, row) => sum + (row[m] ?? 0), 0)
    return { name, kwh }
  })
  const hours = cells.map((row, hour) => ({ hour, kwh: row.reduce((sum, kwh) => sum + kwh, 0) }))
  const most = hours.reduce((a, b) => (b.kwh > a.kwh ? b : a))
  const list = months.filter((m) => m.kwh > 0).map((m) => `${m.name} ${energyFigure(m.kwh)}`)
  return `${energyFigure(total)} in all, most in the hour ending ${figure(most.hour + 1, 0)}:00. ${list.join(', ')}`
}
