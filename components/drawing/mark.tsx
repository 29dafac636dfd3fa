import type { Palette } from '@/components/drawing/palette'

interface MarkProps {
  palette: Palette
  /** Width in px; the height is 0.45 of it. */
  width?: number
}

/** The mark of the product: a switch whose copper blade is about to close on a round contact. */
export function Mark({ palette, width = 34 }: MarkProps) {
  return (
    <svg
      xmlns="http://www.w3.org/2000/svg"
      width={width}
      height={width * 0.45}
      viewBox="0 0 40 18"
      role="img"
      aria-label="Lineside"
    >
      <MarkLines palette={palette} />
    </svg>
  )
}

/** The mark's lines on their own 40 × 18 field, for use inside another drawing. */
export function MarkLines({ palette }: { palette: Palette }) {
  return (
    <g fill="none" strokeWidth={2.4} strokeLinecap="butt">
      <path d="M0 13.4 H9" stroke={palette.ink} />
      <path d="M10 13.2 L28 2.6" stroke={palette.copper} strokeWidth={3.4} strokeLinecap="round" />
      <circle cx={9.4} cy={13.4} r={3.2} fill={palette.ink} />
      <circle cx={30} cy={13.4} r={3} stroke={palette.ink} strokeWidth={2} />
      <path d="M33.6 13.4 H40" stroke={palette.ink} />
    </g>
  )
}
