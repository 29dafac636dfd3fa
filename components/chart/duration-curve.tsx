import { axisRoom, Frame } from '@/components/chart/frame'
import { placeLimitLabels, type LimitLabel } from '@/components/chart/limit-labels'
import {
  energyFigure,
  figure,
  heightAt,
  linear,
  niceTicks,
  tickFigure,
  type Plot,
} from '@/components/chart/scale'
import { boxesOverlap, linePath, px, type Box, type Point } from '@/components/drawing/geometry'
import { hatchPath } from '@/components/drawing/hatch'
import type { Palette } from '@/components/drawing/palette'
import { Label, Sheet } from '@/components/drawing/sheet'
import { textWidth, type Metrics } from '@/components/drawing/text'

export interface PowerLimit {
  kw: number
  /** `48.0 MW export limit at the POI`. */
  label: string
  /** The limit that clips is drawn in copper and bounds the hatching. */
  clips: boolean
}

interface DurationCurveProps {
  /** Power reached or passed in so many hours; hours rise, power falls. */
  points: readonly { hours: number; kw: number }[]
  limits: readonly PowerLimit[]
  clippedKwh: number
  clippedHours: number
  width: number
  height: number
  palette: Palette
  metrics: Metrics
}

interface Geometry {
  plot: Plot
  line: Point[]
  x: (hours: number) => number
  y: (kw: number) => number
  labels: LimitLabel[]
  xTicks: number[]
  yTicks: number[]
}

const TEXT = 12
const HEAD = 40

/** Hours of the year at or above each output, with the limits and the clipped energy hatched. */
export function DurationCurve(props: DurationCurveProps) {
  const { width, height, palette, metrics, limits } = props
  const g = geometryOf(props)
  const clip = limits.filter((limit) => limit.clips).sort((a, b) => a.kw - b.kw)[0]
  const area = clip === undefined ? [] : clippedArea(g, clip.kw)
  return (
    <Sheet
      width={width}
      height={height}
      title="Hours a year at or above each output"
      desc={describe(props)}
    >
      <Frame
        plot={g.plot}
        xTicks={g.xTicks.map((v) => ({ at: g.x(v), text: figure(v, 0) }))}
        yTicks={g.yTicks.map((v) => ({ at: g.y(v * 1000), text: tickFigure(v, g.yTicks) }))}
        xTitle="hours a year"
        yTitle="MW"
        palette={palette}
        metrics={metrics}
      />
      {area.length < 3 ? null : (
        <path d={hatchPath(area, 4.5)} stroke={palette.copper} strokeWidth={1} fill="none" />
      )}
      {g.labels.map((label) => (
        <LimitLine key={label.text} label={label} plot={g.plot} palette={palette} />
      ))}
      <path d={linePath(g.line)} stroke={palette.ink} strokeWidth={2} fill="none" />
      {area.length < 3 ? null : <ClippedFigure g={g} area={area} {...props} />}
    </Sheet>
  )
}

function geometryOf(props: DurationCurveProps): Geometry {
  const { points, limits, width, height, metrics } = props
  const mostMw = Math.max(0.001, ...points.map((p) => p.kw), ...limits.map((l) => l.kw)) / 1000
  const yTicks = niceTicks(mostMw, height < 220 ? 3 : 4)
  const left = axisRoom(
    yTicks.map((v) => tickFigure(v, yTicks)),
    metrics,
  )
  const plot = { x: left, y: HEAD, width: width - left - 14, height: height - HEAD - 42 }
  const hours = Math.max(1, ...points.map((p) => p.hours))
  const x = linear(0, hours, plot.x, plot.x + plot.width)
  const y = linear(0, (yTicks.at(-1) ?? 1) * 1000, plot.y + plot.height, plot.y)
  const first = points[0]
  const head = first === undefined || first.hours === 0 ? [] : [{ ...first, hours: 0 }]
  const line = [...head, ...points].map((p) => ({ x: x(p.hours), y: y(p.kw) }))
  const wanted = limits.map((l) => ({ text: l.label, y: y(l.kw), clips: l.clips }))
  const labels = placeLimitLabels(wanted, plot, line, metrics)
  const xTicks = niceTicks(hours, width < 420 ? 3 : 5).filter((v) => v <= hours)
  return { plot, line, x, y, labels, xTicks, yTicks }
}

/** The polygon between the curve and the limit, as far as the curve stands above it. */
function clippedArea(g: Geometry, limitKw: number): Point[] {
  const limitY = g.y(limitKw)
  const above = g.line.filter((point) => point.y < limitY)
  const first = above[0]
  const last = above.at(-1)
  if (first === undefined || last === undefined) return []
  const after = g.line[above.length]
  const cut =
    after === undefined || after.y === last.y
      ? last.x
      : last.x + ((limitY - last.y) / (after.y - last.y)) * (after.x - last.x)
  return [{ x: first.x, y: limitY }, ...above, { x: cut, y: limitY }]
}

interface LimitLineProps {
  label: LimitLabel
  plot: Plot
  palette: Palette
}

function LimitLine({ label, plot, palette }: LimitLineProps) {
  const color = label.clips ? palette.copper : palette.ink2
  return (
    <g>
      <path
        d={`M${px(plot.x)} ${px(label.lineY)} h${px(plot.width)}`}
        stroke={color}
        strokeWidth={label.clips ? 2 : 1.2}
        strokeDasharray={label.clips ? undefined : '6 4'}
      />
      <Label
        x={label.box.x + label.box.width}
        y={label.box.y + 11}
        text={label.text}
        face={label.clips ? 'sans600' : 'sans400'}
        size={TEXT}
        fill={color}
        palette={palette}
        halo={palette.page}
        anchor="end"
      />
    </g>
  )
}

function clippedWords(props: DurationCurveProps): string {
  return `${energyFigure(props.clippedKwh)} clipped in ${figure(props.clippedHours, 0)} hours`
}

/** The clipped energy: right of its hatching where that is free, else over the chart on a leader. */
function ClippedFigure(props: DurationCurveProps & { g: Geometry; area: Point[] }) {
  const { g, area, palette, metrics } = props
  const words = clippedWords(props)
  const w = textWidth(words, 'sans600', TEXT, metrics)
  const end = area.at(-1) ?? { x: g.plot.x, y: g.plot.y }
  const beside = { x: end.x + 10, y: end.y - 18, width: w, height: 14 }
  const free = isFree(beside, g)
  const foot = { x: g.plot.x + (end.x - g.plot.x) * 0.3, y: 0 }
  const left = Math.min(foot.x + 14, g.plot.x + g.plot.width - w)
  const box = free ? beside : { x: left, y: HEAD - 34, width: w, height: 14 }
  foot.x = Math.min(foot.x, left - 10)
  foot.y = (heightAt(g.line, foot.x) + end.y) / 2
  return (
    <g>
      {free ? null : (
        <path
          d={`M${px(box.x - 4)} ${px(box.y + 8)} H${px(foot.x)} V${px(foot.y)}`}
          stroke={palette.copper}
          strokeWidth={1}
          fill="none"
        />
      )}
      <Label
        x={box.x}
        y={box.y + 11}
        text={words}
        face="sans600"
        size={TEXT}
        fill={palette.copper}
        palette={palette}
        halo={palette.page}
      />
    </g>
  )
}

function isFree(box: Box, g: Geometry): boolean {
  if (box.x + box.width > g.plot.x + g.plot.width) return false
  return g.labels.every((label) => {
    const line = { x: g.plot.x, y: label.lineY - 1, width: g.plot.width, height: 2 }
    return !boxesOverlap(box, label.box, 12, 2) && !boxesOverlap(box, line, 0, 1)
  })
}

function describe(props: DurationCurveProps): string {
  const limits = props.limits.map((limit) => limit.label)
  const most = props.points[0]
  const peak = most === undefined ? [] : [`Highest hour ${figure(most.kw / 1000, 1)} MW`]
  return [...peak, ...limits, clippedWords(props)].join('; ')
}
