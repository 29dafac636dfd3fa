import type { Box, Point } from '@/components/drawing/geometry'
import { textWidth, widestLine, wrapText, type Metrics } from '@/components/drawing/text'
import { layoutDimension, type DimensionLayout } from '@/components/line/layout-dimension'
import { layoutTicks, type TickLayout } from '@/components/line/layout-ticks'
import { placeLabels, type PlacedLabel } from '@/components/line/label-placement'
import { isClosed, isLive, type LineModel, type LineStep } from '@/components/line/model'
import {
  baseScale,
  dayNumber,
  orderItems,
  scaleThrough,
  spread,
  timeWindow,
  type AxisItem,
} from '@/components/line/time-scale'

export const TITLE_SIZE = 13
export const DATE_SIZE = 11
export const TITLE_LEAD = 16
const DATE_LEAD = 14
const MAX_LABEL = 158
const PAD = 16
const SOURCE_X = 28

export interface LineStop {
  step: LineStep
  x: number
  /** Room to the left up to the stop before, px: blades are drawn inside it. */
  room: number
  energized: boolean
}

export interface LineLabel extends PlacedLabel {
  step: LineStep
  lines: string[]
  align: 'start' | 'middle' | 'end'
}

export interface LineLayout {
  width: number
  height: number
  axisY: number
  timeAxisY: number
  sourceX: number
  /** Half the height of a gate's bar. */
  gateHalf: number
  stops: LineStop[]
  labels: LineLabel[]
  ticks: TickLayout[]
  /** Where the time axis changes its scale, px. */
  breaks: number[]
  timeEndX: number
  today: { x: number; top: number; box: Box }
  dimension?: DimensionLayout
  /** The stretch for steps without a date. */
  zone?: { x1: number; x2: number; box: Box; text: string }
}

/**
 * Places everything of the large step line. Pure: the same model, width and metrics give the same
 * boxes. No two label boxes overlap and none leaves the sheet; the sheet grows downward as labels
 * stack.
 *
 * @param width sheet width in px, 600 or more; narrower sheets take the tall form
 */
export function layoutLine(model: LineModel, width: number, metrics: Metrics): LineLayout {
  const axis = layoutAxis(model, width)
  const gateHalf = gateHalfOf(model.steps)
  const ends = dimensionEnds(model, axis)
  const wishes = axis.stops.map((stop) => labelWish(stop, metrics))
  const uprights = [
    { x: axis.todayX, side: 'both' as const },
    ...(ends === undefined ? [] : ends.map((x) => ({ x, side: 'above' as const }))),
  ]
  const field = { left: PAD, right: width - PAD, base: gateHalf + 10, uprights }
  const placed = placeLabels(wishes, field)
  const top = Math.min(-gateHalf - 24, ...placed.map((label) => label.box.y))
  const bottom = Math.max(gateHalf + 16, ...placed.map((l) => l.box.y + l.box.height))
  const dimension =
    model.running === undefined || ends === undefined
      ? undefined
      : layoutDimension(model.running, ends, { left: PAD, right: width - PAD, top: 14 }, metrics)
  const bandBottom = dimension === undefined ? 14 : dimension.bottom + 10
  const axisY = Math.ceil(bandBottom - top)
  const timeAxisY = Math.ceil(axisY + bottom + 30)
  const labels = placed.map((label, i) => shifted(label, wishes[i], axisY))
  return {
    width,
    height: timeAxisY + 30,
    axisY,
    timeAxisY,
    sourceX: SOURCE_X,
    gateHalf,
    stops: axis.stops,
    labels,
    ticks: layoutTicks(axis, metrics),
    breaks: axis.breaks,
    timeEndX: axis.timeEndX,
    today: todayMark(axis.todayX, bandBottom, timeAxisY, width, metrics),
    ...(dimension === undefined ? {} : { dimension }),
    ...(axis.zone === undefined ? {} : { zone: zoneMark(axis.zone, timeAxisY, metrics) }),
  }
}

export interface AxisLayout {
  stops: LineStop[]
  todayX: number
  scale: (day: number) => number
  fromDay: number
  toDay: number
  nearFromDay: number
  nearToDay: number
  breaks: number[]
  timeEndX: number
  zone?: { x1: number; x2: number }
}

function gapBefore(step: LineStep): number {
  if (step.obligations !== undefined && step.obligations.length > 0) return 46
  return isClosed(step.state) ? 18 : 34
}

function layoutAxis(model: LineModel, width: number): AxisLayout {
  const dated = model.steps.filter((step) => step.on !== undefined)
  const undated = model.steps.filter((step) => step.on === undefined)
  const low = SOURCE_X + 16
  const high = width - PAD - 12
  const timeEndX = undated.length === 0 ? high : high - zoneWidth(dated, undated, high - low)
  const today = dayNumber(model.todayOn)
  const window = timeWindow(
    dated.map((step) => dayNumber(step.on ?? model.todayOn)),
    today,
  )
  const items = orderItems([
    { day: today, gap: 12 },
    ...dated.map((step) => ({ day: dayNumber(step.on ?? ''), step, gap: gapBefore(step) })),
  ])
  const base = scaleThrough(baseScale(window, low, timeEndX - 8))
  const wanted = items.map((item) => base(item.day))
  const xs = spread(
    wanted,
    items.map((item) => item.gap),
    low + 8,
    timeEndX - 8,
  )
  const scale = warpedScale(items, xs, window, low, timeEndX)
  const zoneXs = undated.map((_, i) => timeEndX + ((i + 1) * (high - timeEndX)) / undated.length)
  const places = [
    ...items.flatMap((item, i) => (item.step ? [{ step: item.step, x: xs[i] ?? low }] : [])),
    ...undated.map((step, i) => ({ step, x: zoneXs[i] ?? high })),
  ]
  const near = [window.nearFromDay, window.nearToDay]
  return {
    stops: asStops(places),
    todayX: xs[items.findIndex((item) => item.step === undefined)] ?? low,
    scale,
    ...window,
    breaks: near.filter((day) => day > window.fromDay && day < window.toDay).map(scale),
    timeEndX,
    ...(undated.length === 0 ? {} : { zone: { x1: timeEndX, x2: high } }),
  }
}

function zoneWidth(dated: LineStep[], undated: LineStep[], room: number): number {
  const share = dated.length === 0 ? 0.8 : 0.5 * Math.max(0.6, undated.length / (dated.length + 4))
  return Math.min(Math.max(96, undated.length * 62), room * Math.min(0.8, share))
}

/** Ticks follow the spread places, so that the axis stays true where steps crowd. */
function warpedScale(
  items: readonly AxisItem[],
  xs: readonly number[],
  window: { fromDay: number; toDay: number },
  low: number,
  end: number,
) {
  const points = items.map((item, i) => ({ day: item.day, x: xs[i] ?? low }))
  const head = { day: window.fromDay - 0.5, x: low }
  return scaleThrough([head, ...points, { day: window.toDay + 0.5, x: end }])
}

function asStops(places: readonly { step: LineStep; x: number }[]): LineStop[] {
  let from = SOURCE_X + 9
  let energized = true
  return places.map(({ step, x }) => {
    energized = energized && isClosed(step.state)
    const stop = { step, x, room: x - from, energized }
    from = x
    return stop
  })
}

function gateHalfOf(steps: readonly LineStep[]): number {
  const most = Math.max(0, ...steps.map((step) => step.obligations?.length ?? 0))
  return Math.max(26, Math.min(60, most * 7 + 2))
}

function dimensionEnds(model: LineModel, axis: AxisLayout): [number, number] | undefined {
  if (model.running === undefined) return undefined
  const { fromOn, toOn } = model.running
  const live = axis.stops.find((s) => isLive(s.step.state) && s.step.on === toOn)
  const to = live ?? axis.stops.find((stop) => stop.step.on === toOn)
  const from = axis.stops.find((stop) => stop.step.on === fromOn && stop !== to)
  const x1 = from?.x ?? axis.scale(dayNumber(fromOn))
  const x2 = to?.x ?? axis.scale(dayNumber(toOn))
  return x1 <= x2 ? [x1, x2] : [x2, x1]
}

function labelWish(stop: LineStop, metrics: Metrics) {
  const { step, x } = stop
  const title = step.shortTitle ?? step.title
  const lines = wrapText(title, 'sans600', TITLE_SIZE, MAX_LABEL, metrics)
  const date = step.onLabel ?? ''
  const width = Math.max(
    widestLine(lines, 'sans600', TITLE_SIZE, metrics),
    textWidth(date, 'mono400', DATE_SIZE, metrics),
  )
  const height = lines.length * TITLE_LEAD + (date === '' ? 0 : DATE_LEAD) + 2
  const side: 'above' | 'below' = step.party === 'theirs' ? 'above' : 'below'
  return { x, side, width: Math.ceil(width), height, step, lines }
}

function shifted(
  label: PlacedLabel,
  wish: ReturnType<typeof labelWish> | undefined,
  axisY: number,
): LineLabel {
  const box = { ...label.box, y: label.box.y + axisY }
  const leader = label.leader.map((point: Point) => ({ x: point.x, y: point.y + axisY }))
  const x = wish?.x ?? 0
  const middle = Math.abs(box.x + box.width / 2 - x) < box.width * 0.3
  const align = middle ? 'middle' : x < box.x + box.width / 2 ? 'start' : 'end'
  if (wish === undefined) throw new Error('a label was placed that no step asked for')
  return { box, leader, step: wish.step, lines: wish.lines, align }
}

function todayMark(x: number, top: number, timeAxisY: number, width: number, metrics: Metrics) {
  const w = Math.ceil(textWidth('today', 'sans600', 12, metrics))
  const left = Math.min(Math.max(PAD, x - w / 2), width - PAD - w)
  return { x, top, box: { x: left, y: timeAxisY - 20, width: w, height: 15 } }
}

function zoneMark(zone: { x1: number; x2: number }, timeAxisY: number, metrics: Metrics) {
  const text = 'no date yet'
  const width = Math.ceil(textWidth(text, 'sans400', 12, metrics))
  const x = Math.max(zone.x1 + 8, zone.x2 - width)
  return { ...zone, text, box: { x, y: timeAxisY + 6, width, height: 15 } }
}
