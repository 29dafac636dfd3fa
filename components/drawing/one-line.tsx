import { px } from '@/components/drawing/geometry'
import { OneLineDown } from '@/components/drawing/one-line-down'
import {
  COLUMN_PAD,
  layoutColumns,
  SUBTITLE_SIZE,
  TITLE_SIZE,
  type LabelLine,
  type OneLineColumn,
  type OneLineProps,
} from '@/components/drawing/one-line-layout'
import { boundaryIndex, describeOneLine } from '@/components/drawing/one-line-model'
import type { Palette } from '@/components/drawing/palette'
import { Label, Sheet } from '@/components/drawing/sheet'
import { halfAlong, OneLineSymbol } from '@/components/drawing/symbols'
import { textWidth, type Metrics } from '@/components/drawing/text'

const LEAD = 14
const LABEL_OFF = 44

/**
 * The simplified one-line diagram from the array to the grid, with the ownership boundary. Labels
 * wrap inside their own column, so that none meets its neighbor or the boundary. Runs downward where
 * the columns would be narrower than the words need.
 */
export function OneLine(props: OneLineProps) {
  const { elements, width, palette, metrics, title = 'One-line diagram', sides } = props
  const columns = layoutColumns(elements, width, metrics)
  if (columns === undefined) return <OneLineDown {...props} />
  const relayRows = Math.max(0, ...elements.map((e) => relayLines(e.relay ?? []).length))
  const axisY = 32 + (relayRows === 0 ? 0 : relayHeight(relayRows) + 14) + 24
  const lines = Math.max(1, ...columns.map((column) => column.lines.length))
  const height = axisY + LABEL_OFF + lines * LEAD + 8
  const boundary = columns[boundaryIndex(elements)]
  return (
    <Sheet width={width} height={height} title={title} desc={describeOneLine(elements)}>
      <path d={conductor(columns, axisY, width)} stroke={palette.ink} strokeWidth={1.7} />
      {boundary === undefined || boundary === columns[0] ? null : (
        <Boundary
          x={boundary.x1}
          height={height}
          sides={sides ?? ['ours', 'utility’s']}
          palette={palette}
        />
      )}
      {columns.map((column, i) => (
        <Element key={i} column={column} axisY={axisY} palette={palette} metrics={metrics} />
      ))}
    </Sheet>
  )
}

interface ElementProps {
  column: OneLineColumn
  axisY: number
  palette: Palette
  metrics: Metrics
}

function Element({ column, axisY, palette, metrics }: ElementProps) {
  const { element, x, lines } = column
  const { relay = [], winding } = element
  return (
    <g>
      {relay.length === 0 ? null : (
        <Relay codes={relay} x={x} bottom={axisY - 26} palette={palette} metrics={metrics} />
      )}
      <OneLineSymbol
        kind={element.kind}
        x={x}
        y={axisY}
        palette={palette}
        {...(winding === undefined ? {} : { winding })}
      />
      <ElementLabel lines={lines} x={x} y={axisY + LABEL_OFF} palette={palette} />
    </g>
  )
}

function conductor(columns: readonly OneLineColumn[], y: number, width: number): string {
  return columns
    .map((column, i) => {
      const next = columns[i + 1]
      const from = column.x + halfAlong(column.element.kind)
      const to = next === undefined ? width - COLUMN_PAD : next.x - halfAlong(next.element.kind)
      return `M${px(from)} ${px(y)} H${px(to)}`
    })
    .join(' ')
}

function relayLines(codes: readonly string[]): string[] {
  const lines: string[] = []
  for (let i = 0; i < codes.length; i += 2) lines.push(codes.slice(i, i + 2).join(' '))
  return lines
}

/** Height of the sign that holds so many lines: a circle up to two, a box beyond. */
function relayHeight(rows: number): number {
  return rows <= 2 ? 36 : rows * 12 + 10
}

interface RelayProps {
  codes: readonly string[]
  x: number
  bottom: number
  palette: Palette
  metrics: Metrics
}

/** The protection functions that trip an element, on a dashed lead over it. */
function Relay({ codes, x, bottom, palette, metrics }: RelayProps) {
  const lines = relayLines(codes)
  const widest = Math.max(...lines.map((line) => textWidth(line, 'sans500', 10, metrics)))
  const round = lines.length <= 2 && widest <= 30
  const [w, h] = round ? [36, 36] : [Math.max(36, widest + 12), relayHeight(lines.length)]
  const middle = bottom - h / 2
  const sign = { stroke: palette.ink, strokeWidth: 1.4, fill: 'none' }
  return (
    <g>
      <path
        d={`M${px(x)} ${px(bottom)} v14`}
        stroke={palette.ink}
        strokeWidth={1.2}
        strokeDasharray="3 2"
      />
      {round ? (
        <circle cx={px(x)} cy={px(middle)} r={18} {...sign} />
      ) : (
        <rect x={px(x - w / 2)} y={px(bottom - h)} width={px(w)} height={px(h)} {...sign} />
      )}
      {lines.map((line, i) => (
        <Label
          key={line}
          x={x}
          y={middle + 3.6 + (i - (lines.length - 1) / 2) * 12}
          text={line}
          face="sans500"
          size={10}
          fill={palette.ink}
          palette={palette}
          anchor="middle"
        />
      ))}
    </g>
  )
}

interface BoundaryProps {
  x: number
  height: number
  sides: [string, string]
  palette: Palette
}

function Boundary({ x, height, sides, palette }: BoundaryProps) {
  const text = { y: 13, face: 'sans400' as const, size: 12, fill: palette.ink, palette }
  return (
    <g>
      <path
        d={`M${px(x)} 4 V${px(height - 2)}`}
        stroke={palette.ink}
        strokeWidth={1.4}
        strokeDasharray="8 5"
      />
      <Label x={x - 7} text={sides[0]} anchor="end" {...text} />
      <Label x={x + 7} text={sides[1]} {...text} />
    </g>
  )
}

interface ElementLabelProps {
  lines: readonly LabelLine[]
  x: number
  y: number
  palette: Palette
}

function ElementLabel({ lines, x, y, palette }: ElementLabelProps) {
  return lines.map((line, i) => (
    <Label
      key={`${i}-${line.text}`}
      x={x}
      y={y + i * LEAD + 10}
      text={line.text}
      face={line.bold ? 'sans600' : 'sans400'}
      size={line.bold ? TITLE_SIZE : SUBTITLE_SIZE}
      fill={line.bold ? palette.ink : palette.ink2}
      palette={palette}
      anchor="middle"
    />
  ))
}
