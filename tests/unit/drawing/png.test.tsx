import { readdirSync } from 'node:fs'
import { join } from 'node:path'
import { Resvg } from '@resvg/resvg-js'
import { renderToStaticMarkup } from 'react-dom/server'
import { describe, expect, it } from 'vitest'
import { metrics } from '@/components/drawing/metrics'
import { lightPalette } from '@/components/drawing/palette'
import { Label, Sheet } from '@/components/drawing/sheet'
import { textWidth, type Face } from '@/components/drawing/text'

const folder = join(process.cwd(), 'fonts')
const fontFiles = readdirSync(folder)
  .filter((name) => name.endsWith('.ttf'))
  .map((name) => join(folder, name))

/** Width of the ink of a line of text as the PNG renderer sets it, px. */
function inkWidth(text: string, face: Face, size: number): number {
  const label = <Label {...{ text, face, size }} x={10} y={60} fill="#000" palette={lightPalette} />
  const svg = renderToStaticMarkup(
    <Sheet width={2000} height={100} title="t" desc="d">
      {label}
    </Sheet>,
  )
  const font = { fontFiles, loadSystemFonts: false, defaultFontFamily: 'Archivo' }
  return new Resvg(svg, { font }).getBBox()?.width ?? 0
}

const faces: Face[] = ['sans400', 'sans500', 'sans600', 'sans700', 'mono400']
const lines = ['Facilities agreement received', '22 Sep, 3 BD over', '14 × 4.20 MVA ± 5.75 % Δ–Y']

describe.each(faces)('text in the face %s', (face) => {
  it.each(lines)('is measured no narrower than it is set, and within 8 %%: "%s"', (text) => {
    const [ink, measured] = [inkWidth(text, face, 40), textWidth(text, face, 40, metrics)]
    expect(ink).toBeLessThanOrEqual(measured)
    // Side bearings, kerning and tabular digits make up the difference.
    expect(ink).toBeGreaterThan(measured * 0.92)
  })
})

describe('the shipped weights', () => {
  it('are told apart by the PNG renderer: bold is wider than regular', () => {
    const text = 'Facilities agreement'
    expect(inkWidth(text, 'sans700', 40)).toBeGreaterThan(inkWidth(text, 'sans400', 40))
  })
})
