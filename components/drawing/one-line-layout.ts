import type { OneLineElement } from '@/components/drawing/one-line-model'
import type { Palette } from '@/components/drawing/palette'
import { bindUnits, textWidth, widestWord, wrapText, type Metrics } from '@/components/drawing/text'

export interface OneLineProps {
  elements: readonly OneLineElement[]
  width: number
  palette: Palette
  metrics: Metrics
  title?: string
  /** Words on either side of the ownership boundary. */
  sides?: [string, string]
}

export interface LabelLine {
  text: string
  bold: boolean
}

/** One element's stretch of the sheet; its words stay inside. */
export interface OneLineColumn {
  element: OneLineElement
  x1: number
  x2: number
  /** Center of the symbol. */
  x: number
  lines: LabelLine[]
}

export const TITLE_SIZE = 12
export const SUBTITLE_SIZE = 11
export const COLUMN_PAD = 6
const GAP = 12
const MIN_COLUMN = 58

/** An element's title and subtitle wrapped to `room` px; figures stay with their units. */
export function labelLines(element: OneLineElement, room: number, metrics: Metrics): LabelLine[] {
  const title = wrapText(element.title, 'sans600', TITLE_SIZE, room, metrics)
  const words = bindUnits(element.subtitle ?? '')
  const subtitle = words === '' ? [] : wrapText(words, 'sans400', SUBTITLE_SIZE, room, metrics)
  return [
    ...title.map((text) => ({ text, bold: true })),
    ...subtitle.map((text) => ({ text, bold: false })),
  ]
}

function leastWidth(element: OneLineElement, metrics: Metrics): number {
  const title = widestWord(element.title, 'sans600', TITLE_SIZE, metrics)
  const subtitle = widestWord(bindUnits(element.subtitle ?? ''), 'sans400', SUBTITLE_SIZE, metrics)
  const relay = Math.max(
    0,
    ...(element.relay ?? []).map((code) => 2 * textWidth(`${code} `, 'sans500', 10, metrics)),
  )
  return Math.max(MIN_COLUMN, title + GAP, subtitle + GAP, relay + GAP)
}

/**
 * Columns of the one-line diagram: each at least as wide as its longest word, the rest of the width
 * shared. Undefined where the sheet is too narrow for the words; the diagram then runs downward.
 */
export function layoutColumns(
  elements: readonly OneLineElement[],
  width: number,
  metrics: Metrics,
): OneLineColumn[] | undefined {
  const least = elements.map((element) => leastWidth(element, metrics))
  const spare = width - 2 * COLUMN_PAD - least.reduce((sum, w) => sum + w, 0)
  if (spare < 0) return undefined
  let x1 = COLUMN_PAD
  return elements.map((element, i) => {
    const own = (least[i] ?? 0) + spare / elements.length
    const column = {
      element,
      x1,
      x2: x1 + own,
      x: x1 + own / 2,
      lines: labelLines(element, own - GAP + 2, metrics),
    }
    x1 += own
    return column
  })
}
