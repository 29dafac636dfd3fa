import { readdirSync } from 'node:fs'
import path from 'node:path'
import { Resvg } from '@resvg/resvg-js'

const folder = path.join(import.meta.dirname, '../../fonts')

/** The renderer reads TTF only; system fonts stay out, so that every machine draws the same. */
const font = {
  fontFiles: readdirSync(folder)
    .filter((name) => name.endsWith('.ttf'))
    .map((name) => path.join(folder, name)),
  loadSystemFonts: false,
  defaultFontFamily: 'Archivo',
}

/** Paper under the PNG: where it is see-through, a print smears black into the edges. */
const background = '#ffffff'

export interface DrawnPicture {
  /** Letters as outlines: no reader's machine needs the fonts. */
  svg: string
  png: Uint8Array
  /** Size as placed, CSS px of 1/96 inch. */
  width: number
  height: number
}

/** Draws an SVG for a document: as outlines, and as PNG at `scale` times its placed size. */
export function drawPicture(svg: string, scale = 3): DrawnPicture {
  const drawing = new Resvg(svg, { font })
  const { width, height } = drawing
  const zoomed = new Resvg(svg, { font, fitTo: { mode: 'zoom', value: scale }, background })
  return {
    svg: onGround(unfilled(drawing.toString())),
    png: zoomed.render().asPng(),
    width,
    height,
  }
}

/** A straight line has no area, yet some programs draw its fill as a hairline. */
function unfilled(svg: string): string {
  return svg.replace(
    /fill="[^"]*"( stroke="#[^>]* d="M [-\d.]+ [-\d.]+ L [-\d.]+ [-\d.]+")/g,
    'fill="none"$1',
  )
}

/**
 * Office programs do not know `paint-order` and stroke outlines roughly: the halo of a label becomes
 * a plain ground of its color under the letters.
 */
function onGround(svg: string): string {
  return svg.replace(/<path [^>]*paint-order="stroke"[^>]*\/>/g, (path) => {
    const color = / stroke="([^"]+)"/.exec(path)?.[1] ?? '#ffffff'
    const outline = / d="([^"]+)"/.exec(path)?.[1] ?? ''
    const letters = path.replace(/ (stroke(-[a-z]+)?|paint-order)="[^"]*"/g, '')
    return `${groundOf(outline, color)}${letters}`
  })
}

/** Room around the letters, px. */
const around = 1.5

function groundOf(outline: string, color: string): string {
  const figures = (outline.match(/-?\d+(\.\d+)?/g) ?? []).map(Number)
  const [xs, ys] = [0, 1].map((axis) => figures.filter((_, i) => i % 2 === axis))
  if (!xs?.length || !ys?.length) return ''
  const [left, top] = [Math.min(...xs) - around, Math.min(...ys) - around]
  const [width, height] = [Math.max(...xs) + around - left, Math.max(...ys) + around - top]
  return `<rect x="${left.toFixed(2)}" y="${top.toFixed(2)}" width="${width.toFixed(2)}" height="${height.toFixed(2)}" fill="${color}"/>`
}
