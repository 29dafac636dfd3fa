import { Label, Sheet } from '@/components/drawing/sheet'
import type { Palette } from '@/components/drawing/palette'
import { Bar, Blade, Contact, Source } from '@/components/line/glyphs'

const line = 170

interface StepLabel {
  x: number
  name: string
  note: string
  party: 'ours' | 'theirs'
  far?: boolean
  /** A gate's bar reaches down to its words. */
  isGate?: boolean
}

const labels: readonly StepLabel[] = [
  { x: 116, name: 'Filed', note: 'gate 0', party: 'ours' },
  { x: 208, name: 'Scoping meeting', note: 'held', party: 'theirs' },
  { x: 300, name: 'Gate 1', note: 'closed', party: 'ours', isGate: true },
  { x: 396, name: 'Study report', note: 'received', party: 'theirs' },
  { x: 484, name: 'Agreement', note: 'to sign', party: 'ours' },
  { x: 582, name: 'Facilities', note: 'forecast', party: 'theirs', far: true },
  { x: 676, name: 'Back-feed', note: 'forecast', party: 'ours', far: true },
]

/** The picture that Lineside draws of an application, with one clock running: an example. */
export function LineDrawing({ palette }: { palette: Palette }) {
  return (
    <Sheet
      width={720}
      height={270}
      title="An application as a line of switches"
      desc="From the source at the left, four steps are closed; the agreement is open, with 7 of 30 calendar days left; two steps lie ahead."
    >
      <DoneLine palette={palette} />
      <OpenStep palette={palette} />
      <FarLine palette={palette} />
      {labels.map((label) => (
        <StepWords key={label.x} label={label} palette={palette} />
      ))}
      <Dimension palette={palette} />
    </Sheet>
  )
}

function DoneLine({ palette }: { palette: Palette }) {
  const paint = { stroke: palette.copper, fill: palette.copper, strokeWidth: 1 }
  return (
    <g>
      <path d={`M53 ${line} H396`} stroke={palette.copper} strokeWidth={5} />
      <Source x={40} y={line} radius={12} palette={palette} strokeWidth={3} />
      <Contact x={116} y={line} size={13} party="ours" {...paint} />
      <Contact x={208} y={line} size={12} party="theirs" {...paint} />
      <Bar x={300} y={line} half={27} stroke={palette.copper} strokeWidth={5} />
      <Contact x={396} y={line} size={12} party="theirs" {...paint} />
    </g>
  )
}

function OpenStep({ palette }: { palette: Palette }) {
  return (
    <g>
      <path d={`M402 ${line} H440`} stroke={palette.ink} strokeWidth={2} />
      <circle cx={442} cy={line} r={3.5} fill={palette.ink} />
      <Blade x={442} y={line} dx={32} dy={-21} stroke={palette.ink} strokeWidth={5} />
      <Contact
        x={484}
        y={line}
        size={12}
        party="ours"
        stroke={palette.ink}
        fill={palette.sheet}
        strokeWidth={2}
      />
    </g>
  )
}

function FarLine({ palette }: { palette: Palette }) {
  const paint = { stroke: palette.ink3, fill: palette.sheet, strokeWidth: 1.6 }
  return (
    <g>
      <path
        d={`M491 ${line} H552 M589 ${line} H646`}
        stroke={palette.ink3}
        strokeWidth={1.6}
        strokeDasharray="5 4"
      />
      <Blade x={552} y={line} dx={21} dy={-14} stroke={palette.ink3} strokeWidth={1.8} />
      <Contact x={582} y={line} size={11} party="theirs" {...paint} />
      <Blade x={646} y={line} dx={21} dy={-14} stroke={palette.ink3} strokeWidth={1.8} />
      <Contact x={676} y={line} size={11} party="ours" {...paint} />
    </g>
  )
}

/** Ours below the line, theirs above it. */
function StepWords({ label, palette }: { label: StepLabel; palette: Palette }) {
  const { x, name, note, party, far, isGate } = label
  const y = party === 'ours' ? line + 50 : line - 50
  const shared = { x, palette, anchor: 'middle' as const }
  const lead = party === 'ours' ? [line + 12, y - 14] : [y + 22, line - 12]
  return (
    <g>
      {isGate ? null : (
        <path d={`M${x} ${lead[0]} V${lead[1]}`} stroke={palette.rule} strokeWidth={1} />
      )}
      <Label
        {...shared}
        y={y}
        text={name}
        face="sans600"
        size={13}
        fill={far ? palette.ink2 : palette.ink}
      />
      <Label {...shared} y={y + 16} text={note} face="sans400" size={12} fill={palette.ink2} />
    </g>
  )
}

function Dimension({ palette }: { palette: Palette }) {
  const [from, to, y] = [396, 484, 52]
  return (
    <g stroke={palette.soon} fill="none" strokeWidth={1.3}>
      <path d={`M${from} ${y - 10} V${line - 84} M${to} ${y - 10} V${line - 14}`} />
      <path d={`M${from} ${y} H${to}`} />
      <path d={`M${from} ${y} l8 -3.5 v7 Z M${to} ${y} l-8 -3.5 v7 Z`} fill={palette.soon} />
      <g stroke="none">
        <Label
          x={494}
          y={y - 1}
          text="30 calendar days, 7 left"
          face="sans600"
          size={13}
          fill={palette.soon}
          palette={palette}
        />
        <Label
          x={494}
          y={y + 16}
          text="start the wire by Thursday"
          face="sans400"
          size={12}
          fill={palette.ink2}
          palette={palette}
        />
      </g>
    </g>
  )
}
