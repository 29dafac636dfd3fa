import { linePath, px } from '@/components/drawing/geometry'
import type { Palette } from '@/components/drawing/palette'
import { Label, Sheet } from '@/components/drawing/sheet'
import type { Metrics } from '@/components/drawing/text'
import { DimensionLine } from '@/components/line/dimension-line'
import { Source } from '@/components/line/glyphs'
import {
  DATE_SIZE,
  layoutLine,
  TITLE_LEAD,
  TITLE_SIZE,
  type LineLabel,
  type LineLayout,
} from '@/components/line/layout-line'
import { TICK_SIZE } from '@/components/line/layout-ticks'
import { describeLine, type LineModel, type LineStep } from '@/components/line/model'
import { SwitchEnd, SwitchRun } from '@/components/line/switches'

interface StepLineLargeProps {
  model: LineModel
  /** Sheet width in px, 600 or more. */
  width: number
  palette: Palette
  metrics: Metrics
  title?: string
}

/** The step line of one application on a time axis. */
export function StepLineLarge(props: StepLineLargeProps) {
  const { model, width, palette, metrics, title = 'Sequence' } = props
  const layout = layoutLine(model, width, metrics)
  return (
    <Sheet
      width={layout.width}
      height={layout.height}
      title={title}
      desc={describeLine(model)}
      ground={palette.sheet}
    >
      <TimeAxis layout={layout} palette={palette} />
      <Leaders layout={layout} palette={palette} />
      <TodayRule layout={layout} palette={palette} />
      {layout.dimension === undefined || model.running === undefined ? null : (
        <DimensionLine
          layout={layout.dimension}
          tone={model.running.tone}
          downTo={layout.axisY - layout.gateHalf - 14}
          palette={palette}
        />
      )}
      <Switches layout={layout} palette={palette} />
      <Source x={layout.sourceX} y={layout.axisY} radius={9} palette={palette} strokeWidth={2.4} />
      <Rounds layout={layout} palette={palette} />
      {layout.labels.map((label) => (
        <StepLabel
          key={`${label.step.key}-${label.step.instance}`}
          label={label}
          palette={palette}
        />
      ))}
    </Sheet>
  )
}

interface PartProps {
  layout: LineLayout
  palette: Palette
}

function Switches({ layout, palette }: PartProps) {
  const common = { y: layout.axisY, gateHalf: layout.gateHalf, palette }
  return (
    <>
      {layout.stops.map((stop) => (
        <SwitchRun key={`${stop.step.key}-${stop.step.instance}`} stop={stop} {...common} />
      ))}
      {layout.stops.map((stop) => (
        <SwitchEnd key={`${stop.step.key}-${stop.step.instance}`} stop={stop} {...common} />
      ))}
    </>
  )
}

function TimeAxis({ layout, palette }: PartProps) {
  const { timeAxisY: y, ticks, breaks, timeEndX, zone } = layout
  const start = ticks[0]?.x ?? layout.sourceX
  return (
    <g stroke="none">
      <path d={`M${px(start)} ${y} H${px(timeEndX)}`} stroke={palette.ink3} strokeWidth={1} />
      {ticks.map((tick) => (
        <g key={`${px(tick.x)}-${tick.text}`}>
          <path
            d={`M${px(tick.x)} ${y} v${tick.year ? 9 : 6}`}
            stroke={palette.ink3}
            strokeWidth={1}
          />
          <Label
            x={tick.x + 3}
            y={y + 17}
            text={tick.text}
            face={tick.year ? 'sans600' : 'sans400'}
            size={TICK_SIZE}
            fill={palette.ink2}
            palette={palette}
          />
        </g>
      ))}
      {breaks.map((x) => (
        <AxisBreak key={px(x)} x={x} y={y} palette={palette} />
      ))}
      {zone === undefined ? null : <Zone layout={layout} palette={palette} />}
    </g>
  )
}

function AxisBreak({ x, y, palette }: { x: number; y: number; palette: Palette }) {
  return (
    <g>
      <path d={`M${px(x - 5)} ${y} h10`} stroke={palette.sheet} strokeWidth={3} />
      <path
        d={`M${px(x - 7)} ${y + 7} l6 -14 M${px(x - 1)} ${y + 7} l6 -14`}
        stroke={palette.ink3}
        strokeWidth={1}
      />
    </g>
  )
}

function Zone({ layout, palette }: PartProps) {
  const { zone, timeAxisY: y } = layout
  if (zone === undefined) return null
  return (
    <g>
      <path
        d={`M${px(zone.x1 + 10)} ${y} H${px(zone.x2)}`}
        stroke={palette.ink3}
        strokeWidth={1}
        strokeDasharray="2 4"
      />
      <Label
        x={zone.box.x}
        y={zone.box.y + 11}
        text={zone.text}
        face="sans400"
        size={12}
        fill={palette.ink2}
        palette={palette}
      />
    </g>
  )
}

function TodayRule({ layout, palette }: PartProps) {
  const { today, timeAxisY } = layout
  return (
    <g>
      <path
        d={`M${px(today.x)} ${px(today.top)} V${px(today.box.y - 1)} M${px(today.x)} ${timeAxisY - 4} v4`}
        stroke={palette.ink}
        strokeWidth={1.3}
        strokeDasharray="2 3"
        fill="none"
      />
      <Label
        x={today.box.x}
        y={today.box.y + 12}
        text="today"
        face="sans600"
        size={12}
        fill={palette.ink}
        palette={palette}
      />
    </g>
  )
}

function Leaders({ layout, palette }: PartProps) {
  return layout.labels.map((label) => (
    <path
      key={`${label.step.key}-${label.step.instance}`}
      d={linePath(label.leader)}
      stroke={palette.rule}
      strokeWidth={1}
      fill="none"
    />
  ))
}

/** The number of a repeated step, beside its contact, under the line. */
function Rounds({ layout, palette }: PartProps) {
  return layout.stops
    .filter((stop) => stop.step.repeated === true)
    .map((stop) => (
      <Label
        key={`${stop.step.key}-${stop.step.instance}`}
        x={stop.step.tap === true ? stop.x + 8 : stop.x - 8}
        y={layout.axisY + 17}
        anchor={stop.step.tap === true ? 'start' : 'end'}
        text={String(stop.step.instance)}
        face="sans600"
        size={11}
        fill={palette.ink2}
        palette={palette}
      />
    ))
}

/** Text color of a step's label: red in words for a missed one, lighter for what lies ahead. */
export function labelColor(step: LineStep, palette: Palette): string {
  if (step.state === 'missed') return palette.late
  return step.state === 'ahead' || step.state === 'not_needed' ? palette.ink2 : palette.ink
}

function StepLabel({ label, palette }: { label: LineLabel; palette: Palette }) {
  const { box, lines, align, step } = label
  const x = align === 'start' ? box.x : align === 'end' ? box.x + box.width : box.x + box.width / 2
  const color = labelColor(step, palette)
  const dateY = box.y + lines.length * TITLE_LEAD + 11
  return (
    <g>
      <rect
        x={px(box.x - 2)}
        y={px(box.y)}
        width={px(box.width + 4)}
        height={px(box.height)}
        fill={palette.sheet}
      />
      {lines.map((line, i) => (
        <Label
          key={`${i}-${line}`}
          x={x}
          y={box.y + i * TITLE_LEAD + 12.5}
          text={line}
          face="sans600"
          size={TITLE_SIZE}
          fill={color}
          anchor={align}
          palette={palette}
        />
      ))}
      {step.onLabel === undefined ? null : (
        <Label
          x={x}
          y={dateY}
          text={step.onLabel}
          face="mono400"
          size={DATE_SIZE}
          fill={step.state === 'missed' ? palette.late : palette.ink2}
          anchor={align}
          palette={palette}
        />
      )}
    </g>
  )
}
