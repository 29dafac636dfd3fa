import { px } from '@/components/drawing/geometry'
import type { Palette } from '@/components/drawing/palette'
import { Bar, Blade, Contact, Flag } from '@/components/line/glyphs'
import type { LineStop } from '@/components/line/layout-line'
import { isClosed, isLive, type LineStep } from '@/components/line/model'

interface SwitchProps {
  stop: LineStop
  y: number
  gateHalf: number
  palette: Palette
  /** False where the caller draws the flag of a missed step itself. */
  flag?: boolean
}

const HOP = 6

/** The piece of line that leads to a step, with its raised blade or its rungs. */
export function SwitchRun(props: SwitchProps) {
  const { step } = props.stop
  const gated = (step.obligations?.length ?? 0) > 0
  return (
    <>
      {isClosed(step.state) ? (
        <ClosedRun {...props} />
      ) : gated ? (
        <Rungs {...props} />
      ) : (
        <OpenRun {...props} />
      )}
      {step.tap === true ? <Tap {...props} /> : null}
    </>
  )
}

/** Color of the stop's own lines. */
export function stopColor(step: LineStep, palette: Palette): string {
  if (step.state === 'done' || step.state === 'waived') return palette.copper
  return isLive(step.state) ? palette.ink : palette.ink3
}

function startOf(stop: LineStop): number {
  return stop.x - stop.room
}

function ClosedRun({ stop, y, palette }: SwitchProps) {
  const { step, x, energized } = stop
  const hop = step.state === 'not_needed'
  const stroke = energized || step.state === 'done' ? palette.copper : palette.ink3
  const weight = step.state === 'done' ? 5 : energized ? 2.4 : 1.3
  const radius = Math.min(HOP, stop.room * 0.4)
  const end = hop
    ? `H${px(x - radius)} a${px(radius)} ${px(radius)} 0 0 1 ${px(2 * radius)} 0`
    : `H${px(x)}`
  return (
    <path
      d={`M${px(startOf(stop))} ${px(y)} ${end}`}
      stroke={stroke}
      strokeWidth={weight}
      fill="none"
    />
  )
}

/** Length and rise of the raised blade that leads to an open stop, in px. */
export function bladeOf(stop: LineStop): { length: number; rise: number; weight: number } {
  const { state } = stop.step
  const length = Math.min(isLive(state) ? 30 : 26, stop.room * 0.72)
  const rise = length * (isLive(state) ? 0.72 : 0.58)
  const weight = state === 'missed' ? 5 : state === 'running' ? 4.4 : state === 'open' ? 2.6 : 1.6
  return { length, rise, weight }
}

function OpenRun({ stop, y, palette, flag = true }: SwitchProps) {
  const { step, x } = stop
  const live = isLive(step.state)
  const stroke = live ? palette.ink : palette.ink3
  const { length, rise, weight } = bladeOf(stop)
  const hinge = x - length
  const reach = length - (live ? 3 : 5)
  return (
    <>
      <Lead from={startOf(stop)} to={hinge} y={y} live={live} stroke={stroke} />
      <Blade x={hinge} y={y} dx={reach} dy={-rise} stroke={stroke} strokeWidth={weight} />
      {step.state === 'missed' && flag ? (
        <Flag x={hinge + reach} y={y - rise} size={9} fill={palette.ink} />
      ) : null}
    </>
  )
}

interface LeadProps {
  from: number
  to: number
  y: number
  live: boolean
  stroke: string
}

/** The line up to a hinge: whole where a clock runs, dashed where all lies ahead. */
function Lead({ from, to, y, live, stroke }: LeadProps) {
  if (to - from < 0.5) return null
  return (
    <path
      d={`M${px(from)} ${px(y)} H${px(to)}`}
      stroke={stroke}
      strokeWidth={live ? 2 : 1.4}
      strokeDasharray={live ? undefined : '6 4'}
      fill="none"
    />
  )
}

/** The obligations of an open gate: parallel blades between two bars, closed where done. */
function Rungs({ stop, y, gateHalf, palette }: SwitchProps) {
  const { step, x } = stop
  const parts = step.obligations ?? []
  const live = isLive(step.state)
  const ink = live ? palette.ink : palette.ink3
  const left = x - Math.min(24, stop.room * 0.6)
  const half = gateHalf - 5
  const spacing = (2 * half) / parts.length
  return (
    <>
      <Lead from={startOf(stop)} to={left} y={y} live={live} stroke={ink} />
      <Bar x={left} y={y} half={half} stroke={ink} strokeWidth={1.8} />
      {parts.map((part, i) => (
        <Rung
          key={`${i}-${part.title}`}
          left={left}
          right={x}
          y={y - half + spacing * (i + 0.62)}
          rise={Math.min(9, spacing * 0.62)}
          stroke={part.done ? palette.copper : ink}
          done={part.done}
          weight={live ? 2.8 : 1.5}
        />
      ))}
    </>
  )
}

interface RungProps {
  left: number
  right: number
  y: number
  rise: number
  stroke: string
  done: boolean
  weight: number
}

function Rung({ left, right, y, rise, stroke, done, weight }: RungProps) {
  if (done) {
    const d = `M${px(left + 1)} ${px(y)} H${px(right)}`
    return <path d={d} stroke={stroke} strokeWidth={weight + 0.4} fill="none" />
  }
  const reach = (right - left) * 0.72
  return <Blade x={left + 1} y={y} dx={reach} dy={-rise} stroke={stroke} strokeWidth={weight} />
}

/** The contact or gate bar of a step; drawn after all runs, which end behind it. */
export function SwitchEnd({ stop, y, gateHalf, palette }: SwitchProps) {
  const { step, x } = stop
  if (step.state === 'not_needed') return null
  const color = stopColor(step, palette)
  const live = isLive(step.state)
  if (step.kind === 'gate') {
    const weight = step.state === 'done' ? 6 : live ? 6 : 3.2
    return <Bar x={x} y={y} half={gateHalf} stroke={color} strokeWidth={weight} />
  }
  const done = step.state === 'done'
  return (
    <Contact
      x={x}
      y={y}
      size={Math.min(done ? 13 : 12, stop.room * 0.75 + 3)}
      party={step.party}
      stroke={color}
      fill={done ? color : palette.sheet}
      strokeWidth={done ? 0 : live ? 2.6 : 1.8}
    />
  )
}

/** The affected system taps off below: a spur to a square contact of theirs. */
function Tap({ stop, y, palette }: SwitchProps) {
  const color = stopColor(stop.step, palette)
  const x = stop.x - Math.min(10, stop.room * 0.4)
  return (
    <g stroke={color} strokeWidth={1.6} fill="none">
      <path d={`M${px(x)} ${px(y)} v13`} />
      <rect x={px(x - 3.5)} y={px(y + 13)} width={7} height={7} />
    </g>
  )
}
