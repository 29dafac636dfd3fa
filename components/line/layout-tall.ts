import type { Box } from '@/components/drawing/geometry'
import { textWidth, widestLine, wrapText, type Metrics } from '@/components/drawing/text'
import { DATE_SIZE, TITLE_LEAD, TITLE_SIZE, type LineStop } from '@/components/line/layout-line'
import { isClosed, isLive, type LineModel, type LineStep } from '@/components/line/model'

export const AXIS_X = 58
export const LABEL_X = 92
const DATE_LEAD = 15
const PART_LEAD = 16
const PAD = 12

/** A line of a tall label: title, date, obligation or clock. */
export interface TallText {
  text: string
  kind: 'title' | 'date' | 'part' | 'clock' | 'note'
}

export interface TallRow {
  step: LineStep
  /** The stop as the switches draw it; here `x` runs downward. */
  stop: LineStop
  lines: TallText[]
  box: Box
}

export interface TallLayout {
  width: number
  height: number
  rows: TallRow[]
  /** Height of today's rule, between the rows it divides. */
  todayY: number
  /** Heights of the running clock's ends. */
  clock?: { y1: number; y2: number }
}

const TOP = 40

/**
 * Places the step line running downward for narrow screens: one row per step, in the order of the
 * sequence and not to the scale of time.
 *
 * @param width sheet width in px, 260 or more
 */
export function layoutTall(model: LineModel, width: number, metrics: Metrics): TallLayout {
  const rows: TallRow[] = []
  const split = todayIndex(model)
  let [y, from, energized, todayY] = [TOP, TOP - 14, true, TOP - 6]
  model.steps.forEach((step, i) => {
    if (i === split) todayY = y + 4
    const above = i === split ? todayY + 6 : from
    const lines = tallLines(step, model, width - LABEL_X - PAD, metrics)
    const at = Math.max(y + 9, above + roomFor(step))
    energized = energized && isClosed(step.state)
    const height = lines.reduce((sum, line) => sum + leadOf(line), 0) + 2
    const box = { x: LABEL_X, y: at - 9, width: widestText(lines, metrics), height }
    rows.push({ step, stop: { step, x: at, room: at - from, energized }, lines, box })
    from = at
    y = at - 9 + height + 8
  })
  if (split === model.steps.length) todayY = y + 6
  const height = Math.ceil(Math.max(y, todayY + 8) + 12)
  const clock = clockSpan(model, rows, todayY)
  return { width, height, rows, todayY, ...(clock === undefined ? {} : { clock }) }
}

/** Height a step needs for its blade or rungs, px. */
function roomFor(step: LineStep): number {
  if (isClosed(step.state)) return 26
  return isLive(step.state) || (step.obligations?.length ?? 0) > 0 ? 46 : 36
}

/** The first step that today has not passed: the rule stands before it. */
function todayIndex(model: LineModel): number {
  const index = model.steps.findIndex((step) => {
    if (isClosed(step.state)) return false
    return step.on === undefined || step.on >= model.todayOn
  })
  return index === -1 ? model.steps.length : index
}

function tallLines(step: LineStep, model: LineModel, room: number, metrics: Metrics): TallText[] {
  const title = wrapText(step.title, 'sans600', TITLE_SIZE, room, metrics)
  const date =
    step.onLabel === undefined ? [] : wrapText(step.onLabel, 'mono400', DATE_SIZE, room, metrics)
  const parts = isClosed(step.state) ? [] : (step.obligations ?? [])
  const clock = isClockOf(step, model) ? model.running : undefined
  const wrapped = (text: string, kind: TallText['kind']) =>
    wrapText(text, kind === 'clock' ? 'sans600' : 'sans400', 12, room, metrics).map((line) => ({
      text: line,
      kind,
    }))
  return [
    ...title.map((text) => ({ text, kind: 'title' as const })),
    ...date.map((text) => ({ text, kind: 'date' as const })),
    ...parts.flatMap((part) => wrapped(`${part.title}, ${part.done ? 'done' : 'open'}`, 'part')),
    ...(clock === undefined ? [] : wrapped(clock.label, 'clock')),
    ...(clock?.note === undefined ? [] : wrapped(clock.note, 'note')),
  ]
}

function isClockOf(step: LineStep, model: LineModel): boolean {
  const ending = model.steps.filter((s) => isLive(s.state) && s.on === model.running?.toOn)
  return model.running !== undefined && ending[0] === step
}

export function leadOf(line: TallText): number {
  return line.kind === 'title' ? TITLE_LEAD : line.kind === 'date' ? DATE_LEAD : PART_LEAD
}

function widestText(lines: readonly TallText[], metrics: Metrics): number {
  const widths = lines.map(({ text, kind }) => {
    if (kind === 'title') return widestLine([text], 'sans600', TITLE_SIZE, metrics)
    if (kind === 'date') return textWidth(text, 'mono400', DATE_SIZE, metrics)
    return textWidth(text, kind === 'clock' ? 'sans600' : 'sans400', 12, metrics)
  })
  return Math.ceil(Math.max(0, ...widths))
}

function clockSpan(model: LineModel, rows: readonly TallRow[], todayY: number) {
  if (model.running === undefined) return undefined
  const { fromOn, toOn } = model.running
  const to = rows.find((row) => isClockOf(row.step, model)) ?? rows.find((r) => r.step.on === toOn)
  const from = rows.find((row) => row.step.on === fromOn && row !== to)
  const y2 = to?.stop.x ?? todayY
  const y1 = from?.stop.x ?? Math.min(todayY, y2 - 30)
  return y1 < y2 ? { y1, y2 } : { y1: y2, y2: y1 }
}
