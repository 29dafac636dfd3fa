import { px } from '@/components/drawing/geometry'
import type { Palette } from '@/components/drawing/palette'
import { Sheet } from '@/components/drawing/sheet'
import { Bar, Blade, Contact, Flag, Source } from '@/components/line/glyphs'
import { isClosed, isLive, summarizeLine, type LineStep } from '@/components/line/model'

interface StepLineSmallProps {
  steps: readonly LineStep[]
  palette: Palette
  /** Names the row in the text equivalent, such as the project. */
  title?: string
  width?: number
  height?: number
}

interface Stop {
  step: LineStep
  x: number
  /** Where the line from the stop before begins. */
  from: number
  /** Steps left out just before this one. */
  skipped: number
  /** Every step before it is closed too. */
  energized: boolean
}

const PAD = 7
const MIN_PITCH = 10
const HOP = 2.6

/** Indexes to draw: all, or first, last and a window around the live step. */
function shownIndexes(steps: readonly LineStep[], room: number): number[] {
  const all = steps.map((_, i) => i)
  if (steps.length <= room) return all
  const live = steps.findIndex((step) => !isClosed(step.state))
  const center = live === -1 ? steps.length - 1 : live
  const span = room - 2
  const from = Math.min(Math.max(1, center - Math.ceil(span / 2)), steps.length - 1 - span)
  return all.filter((i) => i === 0 || i === steps.length - 1 || (i >= from && i < from + span))
}

function placeStops(steps: readonly LineStep[], width: number): { stops: Stop[]; pitch: number } {
  const room = Math.max(3, Math.floor((width - 2 * PAD) / MIN_PITCH) - 2)
  const shown = shownIndexes(steps, room)
  const slots = shown.length + (shown.length < steps.length ? 2 : 0)
  const pitch = Math.min(22, (width - 2 * PAD - 4) / Math.max(1, slots))
  const stops: Stop[] = []
  let from = PAD + 4
  let x = PAD
  let energized = true
  shown.forEach((index, i) => {
    const step = steps[index]
    if (step === undefined) return
    const skipped = i === 0 ? 0 : index - (shown[i - 1] ?? 0) - 1
    x += skipped > 0 ? 2 * pitch : pitch
    energized = energized && isClosed(step.state)
    stops.push({ step, x, from, skipped, energized })
    from = step.state === 'not_needed' ? x + HOP : x
  })
  return { stops, pitch }
}

/**
 * The step line of one application for a table row, about 230 × 30 px. More steps than fit legibly
 * are left out behind a break mark; the text equivalent always counts all.
 */
export function StepLineSmall(props: StepLineSmallProps) {
  const { steps, palette, title = 'Sequence', width = 230, height = 30 } = props
  const { stops, pitch } = placeStops(steps, width)
  const y = px(height * 0.66)
  return (
    <Sheet width={width} height={height} title={title} desc={summarizeLine(steps)}>
      {stops.map((stop) => (
        <Run
          key={`run-${stop.step.key}-${stop.step.instance}`}
          stop={stop}
          y={y}
          pitch={pitch}
          palette={palette}
        />
      ))}
      <Source x={PAD - 1} y={y} radius={4.2} palette={palette} strokeWidth={1.8} />
      {stops.map((stop) => (
        <End
          key={`end-${stop.step.key}-${stop.step.instance}`}
          stop={stop}
          y={y}
          pitch={pitch}
          palette={palette}
        />
      ))}
    </Sheet>
  )
}

interface PartProps {
  stop: Stop
  y: number
  pitch: number
  palette: Palette
}

/** The piece of line that leads to a stop: closed, or broken by a raised blade. */
function Run({ stop, y, pitch, palette }: PartProps) {
  const { step, x, from } = stop
  if (isClosed(step.state)) {
    return <ClosedRun stop={stop} y={y} palette={palette} />
  }
  const live = isLive(step.state)
  const hinge = x - pitch * 0.6
  const rise = live ? Math.min(11, pitch * 0.72) : Math.min(6, pitch * 0.42)
  const weight = step.state === 'missed' ? 3.2 : step.state === 'running' ? 2.4 : live ? 1.7 : 1
  const stroke = live ? palette.ink : palette.ink3
  const lead = live ? palette.ink : palette.rule
  const reach = pitch * 0.6 - (live ? 1 : 2)
  return (
    <>
      <path d={`M${px(from)} ${y} H${px(hinge)}`} stroke={lead} strokeWidth={live ? 1.4 : 1} />
      {stop.skipped === 0 ? null : <Break x={(from + hinge) / 2} y={y} stroke={palette.ink3} />}
      <Blade x={hinge} y={y} dx={reach} dy={-rise} stroke={stroke} strokeWidth={weight} />
      {step.state === 'missed' ? (
        <Flag x={hinge + reach} y={y - rise} size={4.4} fill={palette.ink} />
      ) : null}
    </>
  )
}

function ClosedRun({ stop, y, palette }: Omit<PartProps, 'pitch'>) {
  const { step, x, from } = stop
  const hop = ` a${HOP} ${HOP} 0 0 1 ${2 * HOP} 0`
  const end = step.state === 'not_needed' ? `H${px(x - HOP)}${hop}` : `H${px(x)}`
  const stroke = stop.energized || step.state === 'done' ? palette.copper : palette.ink3
  const weight = step.state === 'done' ? 3 : stop.energized ? 1.8 : 1
  return (
    <>
      <path d={`M${px(from)} ${y} ${end}`} stroke={stroke} strokeWidth={weight} fill="none" />
      {stop.skipped === 0 ? null : <Break x={(from + x) / 2} y={y} stroke={stroke} />}
    </>
  )
}

function Break({ x, y, stroke }: { x: number; y: number; stroke: string }) {
  const d = `M${px(x - 2.4)} ${px(y + 3.5)} l2 -7 M${px(x + 0.4)} ${px(y + 3.5)} l2 -7`
  return <path d={d} stroke={stroke} strokeWidth={1.1} fill="none" />
}

function End({ stop, y, pitch, palette }: PartProps) {
  const { step, x } = stop
  const done = step.state === 'done'
  const color = isClosed(step.state)
    ? palette.copper
    : isLive(step.state)
      ? palette.ink
      : palette.ink3
  if (step.state === 'not_needed') return null
  if (step.kind === 'gate') {
    const weight = isLive(step.state) ? 3.2 : done ? 2.8 : 2.4
    return <Bar x={x} y={y} half={5.8} stroke={color} strokeWidth={weight} />
  }
  const size = Math.min(done ? 6.6 : 5.4, pitch * 0.5)
  const fill = done ? palette.copper : palette.sheet
  return (
    <>
      {step.tap === true ? <Tap x={x} y={y} stroke={color} /> : null}
      <Contact
        x={x}
        y={y}
        size={size}
        party={step.party}
        stroke={color}
        fill={fill}
        strokeWidth={done ? 0 : isLive(step.state) ? 1.7 : 1.2}
      />
    </>
  )
}

function Tap({ x, y, stroke }: { x: number; y: number; stroke: string }) {
  return <path d={`M${px(x)} ${y} v7 m-2 0 h4`} stroke={stroke} strokeWidth={1.1} fill="none" />
}
