import { px } from '@/components/drawing/geometry'
import type { Palette } from '@/components/drawing/palette'
import type { LineParty } from '@/components/line/model'

interface ContactProps {
  x: number
  y: number
  /** Side of the square, diameter of the circle. */
  size: number
  party: LineParty
  stroke: string
  fill: string
  strokeWidth: number
}

/** Round: ours. Square: theirs. Round toward us and square toward them: both. */
export function Contact({ x, y, size, party, stroke, fill, strokeWidth }: ContactProps) {
  const half = size / 2
  const paint = { stroke, fill, strokeWidth }
  if (party === 'ours') return <circle cx={px(x)} cy={px(y)} r={px(half)} {...paint} />
  if (party === 'theirs') {
    return <rect x={px(x - half)} y={px(y - half)} width={px(size)} height={px(size)} {...paint} />
  }
  const [top, bottom, right] = [px(y - half), px(y + half), px(x + half)]
  const round = `A${px(half)} ${px(half)} 0 0 1 ${px(x)} ${top}`
  return <path d={`M${px(x)} ${top} H${right} V${bottom} H${px(x)} ${round} Z`} {...paint} />
}

interface SourceProps {
  x: number
  y: number
  radius: number
  palette: Palette
  strokeWidth: number
}

/** The source the line starts from; the wave only where there is room for it. */
export function Source({ x, y, radius, palette, strokeWidth }: SourceProps) {
  const [w, h] = [radius * 0.5, radius * 0.72]
  const wave = `M${px(x - w)} ${px(y)} q${px(w / 2)} ${px(-h)} ${px(w)} 0 q${px(w / 2)} ${px(h)} ${px(w)} 0`
  return (
    <g stroke={palette.copper} fill="none" strokeWidth={strokeWidth}>
      <circle cx={px(x)} cy={px(y)} r={px(radius)} />
      {radius < 6 ? null : <path d={wave} strokeWidth={strokeWidth * 0.7} strokeLinecap="round" />}
    </g>
  )
}

interface BladeProps {
  /** Hinge. */
  x: number
  y: number
  /** Tip, relative to the hinge. */
  dx: number
  dy: number
  stroke: string
  strokeWidth: number
}

/** A raised blade: open. */
export function Blade({ x, y, dx, dy, stroke, strokeWidth }: BladeProps) {
  return (
    <path
      d={`M${px(x)} ${px(y)} l${px(dx)} ${px(dy)}`}
      stroke={stroke}
      strokeWidth={strokeWidth}
      strokeLinecap="round"
      fill="none"
    />
  )
}

/** The flag of a missed clock; `x`, `y` is the tip of the blade it stands on. */
export function Flag({ x, y, size, fill }: { x: number; y: number; size: number; fill: string }) {
  const [w, h] = [size * 1.5, size]
  const cloth = `h${px(w)} l${px(-w * 0.28)} ${px(h / 2)} l${px(w * 0.28)} ${px(h / 2)} h${px(-w)} Z`
  return (
    <g fill={fill} stroke="none">
      <path d={`M${px(x)} ${px(y - h * 1.7)} ${cloth}`} />
      <path d={`M${px(x - 0.6)} ${px(y - h * 1.7)} h1.2 V${px(y)} h-1.2 Z`} />
    </g>
  )
}

interface BarProps {
  x: number
  y: number
  half: number
  stroke: string
  strokeWidth: number
}

/** The bar of a gate. */
export function Bar({ x, y, half, stroke, strokeWidth }: BarProps) {
  return (
    <path
      d={`M${px(x)} ${px(y - half)} V${px(y + half)}`}
      stroke={stroke}
      strokeWidth={strokeWidth}
      fill="none"
    />
  )
}
