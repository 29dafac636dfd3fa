import { px } from '@/components/drawing/geometry'
import type { Palette } from '@/components/drawing/palette'
import { Label, Sheet } from '@/components/drawing/sheet'
import type { Face, Metrics } from '@/components/drawing/text'
import { Arrows } from '@/components/line/dimension-line'
import { toneColor } from '@/components/line/dimension-tick'
import { Flag, Source } from '@/components/line/glyphs'
import { DATE_SIZE, TITLE_SIZE } from '@/components/line/layout-line'
import {
  AXIS_X,
  LABEL_X,
  layoutTall,
  leadOf,
  type TallLayout,
  type TallRow,
  type TallText,
} from '@/components/line/layout-tall'
import { describeLine, type LineModel, type LineTone } from '@/components/line/model'
import { labelColor } from '@/components/line/step-line-large'
import { bladeOf, SwitchEnd, SwitchRun } from '@/components/line/switches'

interface StepLineTallProps {
  model: LineModel
  /** Sheet width in px, about 340. */
  width: number
  palette: Palette
  metrics: Metrics
  title?: string
}

const GATE_HALF = 22

/** The step line running downward, for narrow screens; rows are not to the scale of time. */
export function StepLineTall(props: StepLineTallProps) {
  const { model, width, palette, metrics, title = 'Sequence' } = props
  const layout = layoutTall(model, width, metrics)
  const tone = model.running?.tone
  return (
    <Sheet
      width={width}
      height={layout.height}
      title={title}
      desc={describeLine(model)}
      ground={palette.sheet}
    >
      <TodayRule layout={layout} palette={palette} />
      {tone === undefined ? null : <Clock layout={layout} tone={tone} palette={palette} />}
      <Switches layout={layout} palette={palette} />
      <Source x={AXIS_X} y={17} radius={9} palette={palette} strokeWidth={2.4} />
      {layout.rows.map((row) => (
        <RowText
          key={`${row.step.key}-${row.step.instance}`}
          row={row}
          tone={tone ?? 'far'}
          palette={palette}
        />
      ))}
    </Sheet>
  )
}

interface PartProps {
  layout: TallLayout
  palette: Palette
}

/** The switches of the large line, mirrored so that right becomes down and up becomes left. */
function Switches({ layout, palette }: PartProps) {
  const common = { y: AXIS_X, gateHalf: GATE_HALF, palette }
  return (
    <>
      <g transform="matrix(0 1 1 0 0 0)">
        {layout.rows.map(({ stop, step }) => (
          <SwitchRun key={`${step.key}-${step.instance}`} stop={stop} flag={false} {...common} />
        ))}
        {layout.rows.map(({ stop, step }) => (
          <SwitchEnd key={`${step.key}-${step.instance}`} stop={stop} {...common} />
        ))}
      </g>
      {layout.rows.map((row) => (
        <Marks key={`${row.step.key}-${row.step.instance}`} row={row} palette={palette} />
      ))}
    </>
  )
}

/** The flag of a missed step and the number of a repeated one, upright beside the mirrored line. */
function Marks({ row, palette }: { row: TallRow; palette: Palette }) {
  const { step, stop } = row
  const tip = { x: AXIS_X - bladeOf(stop).rise, y: stop.x - 4 }
  return (
    <>
      {step.state === 'missed' ? (
        <g transform={`translate(${px(tip.x)} ${px(tip.y)}) scale(-1 1)`}>
          <Flag x={0} y={0} size={9} fill={palette.ink} />
        </g>
      ) : null}
      {step.repeated === true ? (
        <Label
          x={AXIS_X + 10}
          y={stop.x + 15}
          text={String(step.instance)}
          face="sans600"
          size={11}
          fill={palette.ink2}
          palette={palette}
        />
      ) : null}
    </>
  )
}

function TodayRule({ layout, palette }: PartProps) {
  const { todayY, width } = layout
  return (
    <g>
      <path
        d={`M${AXIS_X - 34} ${px(todayY)} H${width - 58}`}
        stroke={palette.ink}
        strokeWidth={1.3}
        strokeDasharray="2 3"
        fill="none"
      />
      <Label
        x={width - 12}
        y={todayY + 4}
        text="today"
        face="sans600"
        size={12}
        fill={palette.ink}
        palette={palette}
        anchor="end"
      />
    </g>
  )
}

interface ClockProps extends PartProps {
  tone: LineTone
}

function Clock({ layout, tone, palette }: ClockProps) {
  if (layout.clock === undefined) return null
  const { y1, y2 } = layout.clock
  const color = toneColor(tone, palette)
  return (
    <g>
      {[y1, y2].map((y, i) => (
        <path key={i} d={`M8 ${px(y)} H${AXIS_X - 26}`} stroke={color} strokeWidth={0.9} />
      ))}
      <g transform="matrix(0 1 1 0 0 0)">
        <Arrows x1={y1} x2={y2} y={16} stroke={color} />
      </g>
    </g>
  )
}

interface RowTextProps {
  row: TallRow
  tone: LineTone
  palette: Palette
}

function RowText({ row, tone, palette }: RowTextProps) {
  let y = row.box.y
  return row.lines.map((line, i) => {
    const at = y
    y += leadOf(line)
    return (
      <Label
        key={`${i}-${line.text}`}
        x={LABEL_X}
        y={at + 12.5}
        text={line.text}
        {...lineStyle(line, row, tone, palette)}
        palette={palette}
      />
    )
  })
}

function lineStyle(
  line: TallText,
  row: TallRow,
  tone: LineTone,
  palette: Palette,
): { face: Face; size: number; fill: string } {
  const late = row.step.state === 'missed'
  if (line.kind === 'title') {
    return { face: 'sans600', size: TITLE_SIZE, fill: labelColor(row.step, palette) }
  }
  if (line.kind === 'date') {
    return { face: 'mono400', size: DATE_SIZE, fill: late ? palette.late : palette.ink2 }
  }
  if (line.kind === 'clock') return { face: 'sans600', size: 12, fill: toneColor(tone, palette) }
  return { face: 'sans400', size: 12, fill: palette.ink2 }
}
