import { textWidth, type Metrics } from '@/components/drawing/text'
import { monthStarts } from '@/components/line/time-scale'

export interface TickLayout {
  x: number
  /** Empty where there is no room for a word. */
  text: string
  year: boolean
}

interface TickField {
  scale: (day: number) => number
  fromDay: number
  toDay: number
  timeEndX: number
  /** Beyond these days only years and half years are marked. */
  nearFromDay: number
  nearToDay: number
}

const MONTHS = ['Jan', 'Feb', 'Mar', 'Apr', 'May', 'Jun', 'Jul', 'Aug', 'Sep', 'Oct', 'Nov', 'Dec']
export const TICK_SIZE = 11
const GAP = 7

function isMarked(start: { day: number; month: number }, field: TickField): boolean {
  const near = start.day >= field.nearFromDay && start.day < field.nearToDay
  return near || start.month % 6 === 0 || start.day === field.fromDay
}

/** Month ticks under the axis: years first, then half years, then what still fits between. */
export function layoutTicks(field: TickField, metrics: Metrics): TickLayout[] {
  const starts = monthStarts(field.fromDay, field.toDay).filter(
    (s) => s.day <= field.toDay && isMarked(s, field),
  )
  const ticks = starts.map((start, i) => {
    const year = start.month === 0 || i === 0
    const month = MONTHS[start.month] ?? ''
    const text = start.month === 0 ? String(start.year) : i === 0 ? `${month} ${start.year}` : month
    const rank = start.month === 0 ? 0 : i === 0 ? 1 : start.month === 6 ? 2 : 3
    const width = textWidth(text, 'sans400', TICK_SIZE, metrics)
    return { x: field.scale(start.day), text, year, rank, width }
  })
  const taken: { from: number; to: number }[] = []
  for (const tick of [...ticks].sort((a, b) => a.rank - b.rank || a.x - b.x)) {
    const [from, to] = [tick.x, tick.x + tick.width + GAP]
    const free = taken.every((other) => to <= other.from || from >= other.to)
    if (free && to - GAP <= field.timeEndX) taken.push({ from, to })
    else tick.text = ''
  }
  let last = -Infinity
  return ticks.flatMap(({ x, text, year }) => {
    if (text === '' && x - last < 9) return []
    last = x
    return [{ x, text, year }]
  })
}
