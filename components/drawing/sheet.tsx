import type { ReactNode } from 'react'
import { px } from '@/components/drawing/geometry'
import type { Palette } from '@/components/drawing/palette'
import type { Face } from '@/components/drawing/text'

interface SheetProps {
  width: number
  height: number
  /** Name of the drawing, read aloud first. */
  title: string
  /** What it shows, in words: the text equivalent. */
  desc: string
  /** Fill of the ground; none leaves the page's own. */
  ground?: string
  children: ReactNode
}

/** The SVG element around a drawing, with its text equivalent. */
export function Sheet({ width, height, title, desc, ground, children }: SheetProps) {
  const [w, h] = [px(width), px(height)]
  return (
    <svg
      xmlns="http://www.w3.org/2000/svg"
      width={w}
      height={h}
      viewBox={`0 0 ${w} ${h}`}
      role="img"
      aria-label={`${title}. ${desc}`}
    >
      <title>{title}</title>
      <desc>{desc}</desc>
      {ground === undefined ? null : <rect x={0} y={0} width={w} height={h} fill={ground} />}
      {children}
    </svg>
  )
}

interface LabelProps {
  x: number
  /** Baseline. */
  y: number
  text: string
  face: Face
  size: number
  fill: string
  palette: Palette
  anchor?: 'start' | 'middle' | 'end'
  /** Color of the ground, where the text lies on rules that should stop short of it. */
  halo?: string
}

/** One line of text in one of the shipped faces. */
export function Label(props: LabelProps) {
  const { x, y, text, face, size, fill, palette, anchor = 'start', halo } = props
  const outline = halo === undefined ? {} : { stroke: halo, strokeWidth: 4, paintOrder: 'stroke' }
  return (
    <text
      x={px(x)}
      y={px(y)}
      fontFamily={face === 'mono400' ? palette.mono : palette.sans}
      fontWeight={face.slice(-3)}
      fontSize={size}
      fill={fill}
      textAnchor={anchor}
      {...outline}
    >
      {text}
    </text>
  )
}
