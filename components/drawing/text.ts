export type Face = 'sans400' | 'sans500' | 'sans600' | 'sans700' | 'mono400'

/** Advance widths per face and character, in thousandths of an em. */
export type Metrics = Readonly<Record<Face, Readonly<Record<string, number>>>>

const NO_BREAK_SPACE = '\u00a0'
const DIGITS = '0123456789'

function advance(char: string, widths: Readonly<Record<string, number>>): number {
  const key = char === NO_BREAK_SPACE ? ' ' : char
  const own = DIGITS.includes(key) ? widestDigit(widths) : widths[key]
  return own ?? widths['W'] ?? 1000
}

/** Pages set tabular figures, PNG do not: the widest digit stands for all. */
function widestDigit(widths: Readonly<Record<string, number>>): number {
  return Math.max(...[...DIGITS].map((digit) => widths[digit] ?? 0))
}

/**
 * Width of a line of text in px. A character missing from the table counts as wide as a `W`, so the
 * answer is never too small.
 */
export function textWidth(text: string, face: Face, sizePx: number, metrics: Metrics): number {
  let thousandths = 0
  for (const char of text) thousandths += advance(char, metrics[face])
  return (thousandths * sizePx) / 1000
}

/**
 * Breaks text at spaces into lines no wider than `maxPx`. Words longer than a line are cut. Never
 * returns an empty array.
 */
export function wrapText(
  text: string,
  face: Face,
  sizePx: number,
  maxPx: number,
  metrics: Metrics,
): string[] {
  const fits = (line: string) => textWidth(line, face, sizePx, metrics) <= maxPx
  const lines: string[] = []
  let line = ''
  for (const word of text.split(/[ \t\n]+/).filter(Boolean)) {
    const joined = line === '' ? word : `${line} ${word}`
    if (fits(joined)) {
      line = joined
      continue
    }
    if (line !== '') lines.push(line)
    const pieces = cutWord(word, fits)
    lines.push(...pieces.slice(0, -1))
    line = pieces.at(-1) ?? ''
  }
  if (line !== '' || lines.length === 0) lines.push(line)
  return lines
}

function cutWord(word: string, fits: (line: string) => boolean): string[] {
  const pieces: string[] = []
  let piece = ''
  for (const char of word) {
    if (piece !== '' && !fits(piece + char)) {
      pieces.push(piece)
      piece = ''
    }
    piece += char
  }
  return [...pieces, piece]
}

const UNIT = /(\d) (?=(?:[kMG]?(?:VA|Wac|Wdc|Wh|W|V)|A|%)(?=$|[\s,;]))/g

/** Binds figures to their units and factors by no-break spaces, so that no line ends between them. */
export function bindUnits(text: string): string {
  return text
    .replace(UNIT, `$1${NO_BREAK_SPACE}`)
    .replace(/ × /g, `${NO_BREAK_SPACE}×${NO_BREAK_SPACE}`)
}

/** Width of the widest unbreakable piece of a text, px. */
export function widestWord(text: string, face: Face, sizePx: number, metrics: Metrics): number {
  return widestLine(text.split(/[ \t\n]+/), face, sizePx, metrics)
}

/** Wraps to at most `maxLines`; what does not fit ends in an ellipsis. */
export function wrapTo(
  text: string,
  face: Face,
  sizePx: number,
  maxPx: number,
  maxLines: number,
  metrics: Metrics,
): string[] {
  const lines = wrapText(text, face, sizePx, maxPx, metrics)
  if (lines.length <= maxLines) return lines
  const kept = lines.slice(0, maxLines)
  let last = kept[maxLines - 1] ?? ''
  while (last.length > 1 && textWidth(`${last}…`, face, sizePx, metrics) > maxPx) {
    last = last.slice(0, -1)
  }
  kept[maxLines - 1] = `${last.trimEnd()}…`
  return kept
}

/** Widest of several lines, in px. */
export function widestLine(
  lines: readonly string[],
  face: Face,
  sizePx: number,
  metrics: Metrics,
): number {
  return Math.max(0, ...lines.map((line) => textWidth(line, face, sizePx, metrics)))
}
