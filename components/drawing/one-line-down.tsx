import { px } from '@/components/drawing/geometry'
import { labelLines, type OneLineProps } from '@/components/drawing/one-line-layout'
import { boundaryIndex, describeOneLine } from '@/components/drawing/one-line-model'
import { Label, Sheet } from '@/components/drawing/sheet'
import { halfAlong, OneLineSymbol } from '@/components/drawing/symbols'
import { wrapText } from '@/components/drawing/text'

const AXIS_X = 40
const LABEL_X = 82
const LEAD = 15
const GAP = 18
const BOUNDARY_GAP = 26

/** The one-line diagram running downward, labels at the right, for narrow screens. */
export function OneLineDown(props: OneLineProps) {
  const { elements, width, palette, metrics, title = 'One-line diagram' } = props
  const sides = props.sides ?? ['ours', 'utility’s']
  const boundary = boundaryIndex(elements)
  const room = width - LABEL_X - 10
  let y = 12
  let boundaryY = 0
  const rows = elements.map((element, i) => {
    const relay = element.relay?.join(' ') ?? ''
    const relayLines = relay === '' ? [] : wrapText(`relay ${relay}`, 'sans400', 11, room, metrics)
    const lines = [
      ...labelLines(element, room, metrics),
      ...relayLines.map((text) => ({ text, bold: false })),
    ]
    const half = Math.max(halfAlong(element.kind, true), (lines.length * LEAD) / 2)
    if (i === boundary && i > 0) {
      boundaryY = y - GAP + BOUNDARY_GAP
      y += 2 * BOUNDARY_GAP - GAP
    }
    const at = y + half + (i === 0 ? 10 : 0)
    y = at + half + GAP
    return { element, lines, at }
  })
  const line = rows.map((row, i) => {
    const next = rows[i + 1]
    const from = row.at + halfAlong(row.element.kind, true)
    const to = next === undefined ? y - 4 : next.at - halfAlong(next.element.kind, true)
    return `M${AXIS_X} ${px(from)} V${px(to)}`
  })
  return (
    <Sheet width={width} height={y} title={title} desc={describeOneLine(elements)}>
      <path d={line.join(' ')} stroke={palette.ink} strokeWidth={1.7} />
      {boundary < 1 ? null : (
        <g>
          <path
            d={`M8 ${px(boundaryY)} H${width - 70}`}
            stroke={palette.ink}
            strokeWidth={1.4}
            strokeDasharray="8 5"
          />
          {sides.map((side, i) => (
            <Label
              key={side}
              x={width - 8}
              y={boundaryY + (i === 0 ? -4 : 13)}
              text={side}
              face="sans400"
              size={12}
              fill={palette.ink}
              palette={palette}
              anchor="end"
            />
          ))}
        </g>
      )}
      {rows.map(({ element, lines, at }, i) => (
        <g key={`${i}-${element.title}`}>
          <OneLineSymbol
            kind={element.kind}
            x={AXIS_X}
            y={at}
            palette={palette}
            downward
            {...(element.winding === undefined ? {} : { winding: element.winding })}
          />
          {lines.map((text, k) => (
            <Label
              key={`${k}-${text.text}`}
              x={LABEL_X}
              y={at + (k - (lines.length - 1) / 2) * LEAD + 4}
              text={text.text}
              face={text.bold ? 'sans600' : 'sans400'}
              size={text.bold ? 13 : 12}
              fill={text.bold ? palette.ink : palette.ink2}
              palette={palette}
            />
          ))}
        </g>
      ))}
    </Sheet>
  )
}
