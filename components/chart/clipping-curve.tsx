import { axisRoom, Frame, UprightDimension } from '@/components/chart/frame'
import {
  figure,
  heightAt,
  highestBetween,
  linear,
  niceTicks,
  smoothLine,
  tickFigure,
  type Plot,
} from '@/components/chart/scale'
import { linePath, px, type Point } from '@/components/drawing/geometry'
import type { Palette } from '@/components/drawing/palette'
import { Label, Sheet } from '@/components/drawing/sheet'
import { textWidth, wrapText, type Metrics } from '@/components/drawing/text'

export interface RatioLoss {
  ratio: number
  /** Share of the energy lost, 0 to 1. */
  lostFraction: number
}

interface ClippingCurveProps {
  /** Two points or more with rising ratio. */
  points: readonly RatioLoss[]
  /** The plant's own ratio and what it loses; the curve is led through it. */
  at: RatioLoss
  /** What the ratio is of: `array over export limit`. */
  ratioName: string
  width: number
  height: number
  palette: Palette
  metrics: Metrics
}

interface Geometry {
  plot: Plot
  line: Point[]
  x: (ratio: number) => number
  y: (fraction: number) => number
  own: RatioLoss
  /** A tenth further, where the curve reaches so far. */
  next?: RatioLoss
  yTicks: number[]
}

const BOLD = 13
const TEXT = 12

/** Energy clipped a year against DC/AC ratio, with the plant's point and what a tenth more costs. */
export function ClippingCurve(props: ClippingCurveProps) {
  const { points, width, height, palette, metrics, ratioName } = props
  const g = geometryOf(props)
  const more = g.next === undefined ? undefined : nextWords(g.own, g.next)
  const room = g.next === undefined ? 0 : width - 6 - (g.x(g.next.ratio) + 24)
  const beside = more !== undefined && standsBeside(g, room)
  return (
    <Sheet
      width={width}
      height={height}
      title={`Clipped a year, against ${ratioName}`}
      desc={describe(points, g.own, more)}
    >
      <Frame
        plot={g.plot}
        xTicks={points.map((p) => ({ at: g.x(p.ratio), text: figure(p.ratio, 1) }))}
        yTicks={g.yTicks.map((v) => ({ at: g.y(v / 100), text: `${tickFigure(v, g.yTicks)} %` }))}
        xTitle={ratioName}
        palette={palette}
        metrics={metrics}
      />
      <path
        d={linePath(g.line)}
        stroke={palette.copper}
        strokeWidth={2.6}
        strokeLinejoin="round"
        fill="none"
      />
      {more !== undefined && beside ? (
        <NextTenth g={g} words={more} room={room} palette={palette} metrics={metrics} />
      ) : null}
      <OwnPoint
        g={g}
        second={beside ? undefined : more}
        width={width}
        palette={palette}
        metrics={metrics}
      />
    </Sheet>
  )
}

function geometryOf({ points, at, width, height, metrics }: ClippingCurveProps): Geometry {
  const most = 100 * Math.max(0.01, at.lostFraction, ...points.map((p) => p.lostFraction))
  const yTicks = niceTicks(most, height < 240 ? 3 : 5)
  const left = axisRoom(
    yTicks.map((v) => `${tickFigure(v, yTicks)} %`),
    metrics,
  )
  const plot = { x: left, y: 26, width: width - left - 14, height: height - 26 - 42 }
  const ratios = [...points.map((p) => p.ratio), at.ratio]
  const [first, last] = [Math.min(...ratios), Math.max(...ratios)]
  const x = linear(first, last, plot.x, plot.x + plot.width)
  const y = linear(0, (yTicks.at(-1) ?? 1) / 100, plot.y + plot.height, plot.y)
  const raw = [...points.filter((p) => Math.abs(p.ratio - at.ratio) > 0.004), at]
    .sort((a, b) => a.ratio - b.ratio)
    .map((p) => ({ x: p.ratio, y: p.lostFraction }))
  const curve = smoothLine(raw)
  const further = at.ratio + 0.1
  const next = { ratio: further, lostFraction: heightAt(curve, further) }
  return {
    plot,
    line: curve.map((p) => ({ x: x(p.x), y: y(p.y) })),
    x,
    y,
    own: at,
    ...(further <= last + 1e-9 ? { next } : {}),
    yTicks,
  }
}

function nextWords(own: RatioLoss, next: RatioLoss): string {
  const gained = 100 * (next.lostFraction - own.lostFraction)
  return `the next 0.1 clips ${figure(gained, 1)} points more`
}

/** The figure stands right of its dimension, under the curve, where that is free. */
function standsBeside(g: Geometry, room: number): boolean {
  if (g.next === undefined || room < 96) return false
  return g.y(g.next.lostFraction) < g.plot.y + g.plot.height - 24
}

interface NextTenthProps {
  g: Geometry
  words: string
  room: number
  palette: Palette
  metrics: Metrics
}

function NextTenth({ g, words, room, palette, metrics }: NextTenthProps) {
  if (g.next === undefined) return null
  const [x1, x2] = [g.x(g.own.ratio), g.x(g.next.ratio)]
  const [y1, y2] = [g.y(g.own.lostFraction), g.y(g.next.lostFraction)]
  const lines = wrapText(words, 'sans400', TEXT, room, metrics)
  const middle = (y1 + y2) / 2 + 4 - (lines.length - 1) * 7
  const first = Math.min(
    Math.max(middle, y2 + 14),
    g.plot.y + g.plot.height - 6 - (lines.length - 1) * 14,
  )
  return (
    <g>
      <path
        d={`M${px(x1)} ${px(y1)} H${px(x2 + 19)} M${px(x2)} ${px(y2)} h19`}
        stroke={palette.ink2}
        strokeWidth={0.9}
        strokeDasharray="3 3"
        fill="none"
      />
      <UprightDimension x={x2 + 14} y1={y1} y2={y2} stroke={palette.ink2} />
      {lines.map((line, i) => (
        <Label
          key={line}
          x={x2 + 24}
          y={first + i * 14}
          text={line}
          face="sans400"
          size={TEXT}
          fill={palette.ink2}
          palette={palette}
          halo={palette.page}
        />
      ))}
    </g>
  )
}

interface OwnPointProps {
  g: Geometry
  second: string | undefined
  width: number
  palette: Palette
  metrics: Metrics
}

function OwnPoint({ g, second, width, palette, metrics }: OwnPointProps) {
  const [x, y] = [g.x(g.own.ratio), g.y(g.own.lostFraction)]
  const words = ownWords(g.own)
  const w = Math.max(
    textWidth(words, 'sans600', BOLD, metrics),
    second === undefined ? 0 : textWidth(second, 'sans400', TEXT, metrics),
  )
  const left = Math.min(Math.max(g.plot.x + 4, x - 6 - w), width - w - 4)
  const above = highestBetween(g.line, left, left + w) - (second === undefined ? 11 : 26)
  const base = Math.max(12, Math.min(above, y - 12))
  return (
    <g>
      <path
        d={`M${px(x)} ${px(y)} V${px(g.plot.y + g.plot.height)}`}
        stroke={palette.ink}
        strokeWidth={1}
      />
      <circle cx={px(x)} cy={px(y)} r={5} fill={palette.ink} />
      <Label
        x={left}
        y={base}
        text={words}
        face="sans600"
        size={BOLD}
        fill={palette.ink}
        palette={palette}
        halo={palette.page}
      />
      {second === undefined ? null : (
        <Label
          x={left}
          y={base + 15}
          text={second}
          face="sans400"
          size={TEXT}
          fill={palette.ink2}
          palette={palette}
          halo={palette.page}
        />
      )}
    </g>
  )
}

function ownWords(own: RatioLoss): string {
  return `${figure(own.ratio, 2)} clips ${figure(100 * own.lostFraction, 1)} % a year`
}

function describe(points: readonly RatioLoss[], own: RatioLoss, more: string | undefined): string {
  const list = points.map((p) => `${figure(p.ratio, 1)}: ${figure(100 * p.lostFraction, 1)} %`)
  return [ownWords(own), ...(more === undefined ? [] : [more]), list.join(', ')].join('; ')
}
