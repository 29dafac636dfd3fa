import { px } from '@/components/drawing/geometry'
import type { OneLineKind } from '@/components/drawing/one-line-model'
import type { Palette } from '@/components/drawing/palette'
import { Label } from '@/components/drawing/sheet'

interface SymbolProps {
  kind: OneLineKind
  x: number
  y: number
  palette: Palette
  winding?: [string, string]
  /** The line runs downward through the symbol. */
  downward?: boolean
}

const HALF: Record<OneLineKind, { along: number; across: number }> = {
  pv_array: { along: 17, across: 14 },
  inverter: { along: 19, across: 19 },
  transformer: { along: 21, across: 13 },
  breaker: { along: 12, across: 12 },
  meter: { along: 13, across: 13 },
  disconnect: { along: 16, across: 12 },
  poi: { along: 11, across: 14 },
  utility: { along: 15, across: 15 },
  storage: { along: 0, across: 30 },
}

/** Half of a symbol's length along the line, px: where the line stops. */
export function halfAlong(kind: OneLineKind, downward = false): number {
  const half = HALF[kind]
  const turned = kind === 'transformer' || kind === 'disconnect' || kind === 'storage'
  return downward && !turned ? half.across : half.along
}

/** A symbol of the one-line diagram, centered. */
export function OneLineSymbol(props: SymbolProps) {
  const { x, y, palette } = props
  return (
    <g
      transform={`translate(${px(x)} ${px(y)})`}
      stroke={palette.ink}
      strokeWidth={1.7}
      fill="none"
    >
      <Lines {...props} />
    </g>
  )
}

function Lines({ kind, palette, winding, downward = false }: SymbolProps) {
  switch (kind) {
    case 'pv_array':
      return (
        <path d="M-17 -14 H17 V14 H-17 Z M-17 -14 L-1 0 L-17 14 M-17 -19 l-6 -8 M-8 -19 l-6 -8" />
      )
    case 'inverter':
      return (
        <path d="M-19 -19 H19 V19 H-19 Z M-19 19 L19 -19 M-13 -11 h10 M-13 -7 h10 M3 10 q3 -6 6 0 q3 6 6 0" />
      )
    case 'transformer':
      return <Windings winding={winding} downward={downward} palette={palette} />
    case 'breaker':
      return (
        <>
          <rect x={-12} y={-12} width={24} height={24} />
          <Letters text="52" palette={palette} />
        </>
      )
    case 'meter':
      return (
        <>
          <circle r={13} />
          <Letters text="M" palette={palette} />
        </>
      )
    case 'disconnect':
      return <Disconnect downward={downward} palette={palette} />
    case 'poi':
      return <path d="M0 -14 L11 0 L0 14 L-11 0 Z" fill={palette.ink} />
    case 'utility':
      return (
        <>
          <circle r={15} />
          <path d="M-8 0 q4 -9 8 0 q4 9 8 0" strokeLinecap="round" />
        </>
      )
    case 'storage':
      return <Storage downward={downward} palette={palette} />
  }
}

function Letters({
  text,
  palette,
  x = 0,
  y = 0,
}: {
  text: string
  palette: Palette
  x?: number
  y?: number
}) {
  return (
    <g stroke="none">
      <Label
        x={x}
        y={y + 4}
        text={text}
        face="sans500"
        size={11.5}
        fill={palette.ink}
        palette={palette}
        anchor="middle"
      />
    </g>
  )
}

interface TurnedProps {
  downward: boolean
  palette: Palette
}

function Windings({ winding, downward, palette }: TurnedProps & { winding?: [string, string] }) {
  const [dx, dy] = downward ? [0, 8] : [8, 0]
  const [near, far] = winding ?? ['', '']
  return (
    <>
      <circle cx={-dx} cy={-dy} r={13} />
      <circle cx={dx} cy={dy} r={13} />
      <Letters text={near} x={-dx * 1.5} y={-dy * 1.5} palette={palette} />
      <Letters text={far} x={dx * 1.5} y={dy * 1.5} palette={palette} />
    </>
  )
}

function Disconnect({ downward, palette }: TurnedProps) {
  return (
    <g transform={downward ? 'matrix(0 1 1 0 0 0)' : undefined}>
      <path d="M-13 0 L12 -13" strokeWidth={2.2} strokeLinecap="round" />
      <circle cx={-13} cy={0} r={3} fill={palette.ink} stroke="none" />
      <circle cx={13} cy={0} r={3} />
    </g>
  )
}

/** A battery on a spur off the line. */
function Storage({ downward, palette }: TurnedProps) {
  return (
    <g transform={downward ? 'matrix(0 -1 1 0 0 0)' : undefined}>
      <circle r={2.4} stroke="none" fill={palette.ink} />
      <path d="M0 0 V16 M-11 16 H11 M-6 21 H6 M-11 26 H11 M-6 31 H6" />
    </g>
  )
}
