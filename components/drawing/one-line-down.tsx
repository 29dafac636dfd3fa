import { px } from '@/components/drawing/geometry'
import { labelLines, type LabelLine, type OneLineProps } from '@/components/drawing/one-line-layout'
import {
  boundaryIndex,
  describeOneLine,
  type OneLineElement,
} from '@/components/drawing/one-line-model'
import type { Palette } from '@/components/drawing/palette'
import { Label, Sheet } from '@/components/drawing/sheet'
import { halfAlong, OneLineSymbol } from '@/components/drawing/symbols'
import { wrapText, type Metrics } from '@/components/drawing/text'

const AXIS_X = 40
const LABEL_X = 82
const LEAD = 15
const GAP = 18
const BOUNDARY_GAP = 26

interface DownRow {
  element: OneLineElement
  lines: LabelLine[]
  y: number
}

interface DownLayout {
  rows: DownRow[]
  /** Height of the ownership boundary. */
  boundaryY?: number
  height: number
}

function rowLines(element: OneLineElement, room: number, metrics: Metrics): LabelLine[] {
  const codes = element.relay ?? []
  const relay =
    codes.length === 0
      ? []
      : wrapText(`relay ${codes.join(' ')}`, 'sans400', 12, room, metrics).map((text) => ({
          text,
          bold: false,
        }))
  return [...labelLines(element, room * 0.9, metrics), ...relay]
}

function layoutDown({ elements, width, metrics }: OneLineProps): DownLayout {
  const boundary = boundaryIndex(elements)
  const layout: DownLayout = { rows: [], height: 0 }
  let y = 22
  elements.forEach((element, i) => {
    const lines = rowLines(element, width - LABEL_X - 10, metrics)
    const half = Math.max(halfAlong(element.kind, true), (lines.length * LEAD) / 2)
    if (i === boundary && i > 0) {
      layout.boundaryY = y - GAP + BOUNDARY_GAP
      y += 2 * BOUNDARY_GAP - GAP
    }
    layout.rows.push({ element, lines, y: y + half })
    y += 2 * half + GAP
  })
  return { ...layout, height: y }
}

/** The one-line diagram running downward, labels at the right, for narrow screens. */
export function OneLineDown(props: OneLineProps) {
  const { elements, width, palette, title = 'One-line diagram' } = props
  const { rows, boundaryY, height } = layoutDown(props)
  const line = rows.map(({ element, y }, i) => {
    const next = rows[i + 1]
    const to = next === undefined ? height - 4 : next.y - halfAlong(next.element.kind, true)
    return `M${AXIS_X} ${px(y + halfAlong(element.kind, true))} V${px(to)}`
  })
  return (
    <Sheet width={width} height={height} title={title} desc={describeOneLine(elements)}>
      <path d={line.join(' ')} stroke={palette.ink} strokeWidth={1.7} />
      {boundaryY === undefined ? null : (
        <Boundary
          y={boundaryY}
          width={width}
          sides={props.sides ?? ['ours', 'utility’s']}
          palette={palette}
        />
      )}
      {rows.map((row, i) => (
        <Row key={i} row={row} palette={palette} />
      ))}
    </Sheet>
  )
}

interface BoundaryProps {
  y: number
  width: number
  sides: [string, string]
  palette: Palette
}

function Boundary({ y, width, sides, palette }: BoundaryProps) {
  const text = { x: width - 8, face: 'sans400' as const, size: 12, fill: palette.ink, palette }
  return (
    <g>
      <path
        d={`M8 ${px(y)} H${width - 70}`}
        stroke={palette.ink}
        strokeWidth={1.4}
        strokeDasharray="8 5"
      />
      <Label y={y - 4} text={sides[0]} anchor="end" {...text} />
      <Label y={y + 13} text={sides[1]} anchor="end" {...text} />
    </g>
  )
}

function Row({ row, palette }: { row: DownRow; palette: Palette }) {
  const { element, lines, y } = row
  const { kind, winding } = element
  return (
    <g>
      <OneLineSymbol
        kind={kind}
        x={AXIS_X}
        y={y}
        palette={palette}
        downward
        {...(winding === undefined ? {} : { winding })}
      />
      {lines.map((line, k) => (
        <Label
          key={`${k}-${line.text}`}
          x={LABEL_X}
          y={y + (k - (lines.length - 1) / 2) * LEAD + 4}
          text={line.text}
          face={line.bold ? 'sans600' : 'sans400'}
          size={line.bold ? 13 : 12}
          fill={line.bold ? palette.ink : palette.ink2}
          palette={palette}
        />
      ))}
    </g>
  )
}
