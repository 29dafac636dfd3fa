import { LossChainDown } from '@/components/chart/loss-chain-down'
import {
  describeLosses,
  drawnLosses,
  lossFigure,
  type LossChainProps,
  type LossPlace,
} from '@/components/chart/losses'
import { energyFigure } from '@/components/chart/scale'
import { px } from '@/components/drawing/geometry'
import type { Palette } from '@/components/drawing/palette'
import { Label, Sheet } from '@/components/drawing/sheet'
import { halfAlong, OneLineSymbol } from '@/components/drawing/symbols'
import { textWidth, wrapText, type Metrics } from '@/components/drawing/text'
import { Arrows } from '@/components/line/dimension-line'

const TEXT = 11
const LEAD = 13
const PAD = 44
const MIN_SPAN = 70
const AXIS_Y = 62
const DIMENSION_Y = 104

/**
 * Losses as a chain of dimensions along the one-line from array to POI: one dimension per loss, its
 * figure over it, its name under it. Runs downward on narrow sheets.
 */
export function LossChain(props: LossChainProps) {
  const { places, width, palette, metrics } = props
  const count = lossCount(places)
  const span = (width - 2 * PAD) / Math.max(1, count)
  const stops = placeStops(places, span)
  const crowded = span < MIN_SPAN || titlesMeet(places, stops, width, metrics)
  if (crowded) return <LossChainDown {...props} />
  const segments = segmentsOf(places, stops, span)
  const names = segments.map((s) => wrapText(s.label, 'sans400', TEXT, span - 8, metrics))
  const lines = Math.max(1, ...names.map((name) => name.length))
  const height = DIMENSION_Y + 12 + lines * LEAD + 6
  return (
    <Sheet
      width={width}
      height={height}
      title="Losses from array to POI"
      desc={describeLosses(places)}
    >
      <path d={conductor(places, stops)} stroke={palette.ink} strokeWidth={1.7} />
      {places.map((place, i) => (
        <Place key={place.title} place={place} x={stops[i] ?? 0} palette={palette} />
      ))}
      {segments.map((segment, i) => (
        <LossDimension
          key={`${i}-${segment.label}`}
          segment={segment}
          name={names[i] ?? []}
          palette={palette}
        />
      ))}
    </Sheet>
  )
}

/** Dimensions to draw; a link without losses still takes one length. */
function lossCount(places: readonly LossPlace[]): number {
  return places.slice(0, -1).reduce((sum, place) => sum + Math.max(1, place.losses.length), 0)
}

function placeStops(places: readonly LossPlace[], span: number): number[] {
  let x = PAD
  return places.map((place) => {
    const at = x
    x += Math.max(1, place.losses.length) * span
    return at
  })
}

/** True where words over neighboring places would meet, or leave the sheet. */
function titlesMeet(
  places: readonly LossPlace[],
  stops: readonly number[],
  width: number,
  metrics: Metrics,
): boolean {
  const halves = places.map((place) => {
    const energy = place.energyKwh === undefined ? '' : energyFigure(place.energyKwh)
    const title = textWidth(place.title, 'sans600', 12, metrics)
    return Math.max(title, textWidth(energy, 'mono400', TEXT, metrics)) / 2
  })
  return halves.some((half, i) => {
    const x = stops[i] ?? 0
    const before = i === 0 ? 2 : (stops[i - 1] ?? 0) + (halves[i - 1] ?? 0) + 8
    return x - half < before || x + half > width - 2
  })
}

interface Segment {
  x1: number
  x2: number
  label: string
  fraction: number
  clips: boolean
  /** True where the segment begins or ends at a place. */
  opens: boolean
  closes: boolean
}

function segmentsOf(
  places: readonly LossPlace[],
  stops: readonly number[],
  span: number,
): Segment[] {
  return places.flatMap((_, i) => {
    const losses = drawnLosses(places, i)
    return losses.map((loss, k) => ({
      x1: (stops[i] ?? 0) + k * span,
      x2: (stops[i] ?? 0) + (k + 1) * span,
      label: loss.label,
      fraction: loss.fraction,
      clips: loss.clips === true,
      opens: k === 0,
      closes: k === losses.length - 1,
    }))
  })
}

function conductor(places: readonly LossPlace[], stops: readonly number[]): string {
  return places
    .slice(0, -1)
    .map((place, i) => {
      const next = places[i + 1]
      const to = (stops[i + 1] ?? 0) - (next === undefined ? 0 : halfAlong(next.kind))
      return `M${px((stops[i] ?? 0) + halfAlong(place.kind))} ${AXIS_Y} H${px(to)}`
    })
    .join(' ')
}

function Place({ place, x, palette }: { place: LossPlace; x: number; palette: Palette }) {
  return (
    <g>
      <Label
        x={x}
        y={12}
        text={place.title}
        face="sans600"
        size={12}
        fill={palette.ink}
        palette={palette}
        anchor="middle"
      />
      {place.energyKwh === undefined ? null : (
        <Label
          x={x}
          y={27}
          text={energyFigure(place.energyKwh)}
          face="mono400"
          size={TEXT}
          fill={palette.ink2}
          palette={palette}
          anchor="middle"
        />
      )}
      <OneLineSymbol kind={place.kind} x={x} y={AXIS_Y} palette={palette} />
    </g>
  )
}

interface LossDimensionProps {
  segment: Segment
  name: readonly string[]
  palette: Palette
}

function LossDimension({ segment, name, palette }: LossDimensionProps) {
  const { x1, x2, fraction, clips, opens, closes } = segment
  const middle = (x1 + x2) / 2
  const color = clips ? palette.copper : palette.ink
  const from = (atPlace: boolean) => (atPlace ? AXIS_Y + 23 : DIMENSION_Y - 8)
  return (
    <g>
      <path
        d={`M${px(x1)} ${from(opens)} V${DIMENSION_Y + 5} M${px(x2)} ${from(closes)} V${DIMENSION_Y + 5}`}
        stroke={palette.ink3}
        strokeWidth={0.9}
        fill="none"
      />
      <Arrows x1={x1} x2={x2} y={DIMENSION_Y} stroke={color} strokeWidth={1.1} />
      <Label
        x={middle}
        y={DIMENSION_Y - 6}
        text={lossFigure(fraction)}
        face="mono400"
        size={TEXT}
        fill={color}
        palette={palette}
        anchor="middle"
      />
      {name.map((line, i) => (
        <Label
          key={line}
          x={middle}
          y={DIMENSION_Y + 16 + i * LEAD}
          text={line}
          face="sans400"
          size={TEXT}
          fill={clips ? palette.copper : palette.ink2}
          palette={palette}
          anchor="middle"
        />
      ))}
    </g>
  )
}
