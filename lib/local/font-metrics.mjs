// Writes components/drawing/metrics.ts: advance widths in thousandths of an em, read from the
// cmap (format 4) and hmtx tables of the shipped TTF files. Run once after a font file changes.
// Source of the table layouts: OpenType specification 1.9, chapters cmap, hhea, hmtx, head.
import { readFileSync, writeFileSync } from 'node:fs'
import { join } from 'node:path'

const root = join(import.meta.dirname, '..', '..')
const FACES = {
  sans400: 'archivo-regular.ttf',
  sans500: 'archivo-medium.ttf',
  sans600: 'archivo-semibold.ttf',
  sans700: 'archivo-bold.ttf',
  mono400: 'chivo-mono-regular.ttf',
}
const ASCII = Array.from({ length: 95 }, (_, i) => String.fromCharCode(32 + i)).join('')
const SIGNS = '–—−·°%±×÷ΔΩµ≤≥≈…’‘“”²³½§éñüö→'
const CHARS = [...new Set(ASCII + SIGNS)]

function tables(buffer) {
  const count = buffer.readUInt16BE(4)
  const found = {}
  for (let i = 0; i < count; i++) {
    const at = 12 + i * 16
    found[buffer.toString('latin1', at, at + 4)] = buffer.readUInt32BE(at + 8)
  }
  return found
}

function unicodeSubtable(buffer, cmap) {
  const count = buffer.readUInt16BE(cmap + 2)
  for (let i = 0; i < count; i++) {
    const at = cmap + buffer.readUInt32BE(cmap + 4 + i * 8 + 4)
    if (buffer.readUInt16BE(at) === 4) return at
  }
  throw new Error('no cmap subtable of format 4 in this font')
}

function glyphOf(buffer, at, code) {
  const segments = buffer.readUInt16BE(at + 6) / 2
  const ends = at + 14
  const starts = ends + segments * 2 + 2
  const deltas = starts + segments * 2
  const offsets = deltas + segments * 2
  for (let s = 0; s < segments; s++) {
    if (buffer.readUInt16BE(ends + s * 2) < code) continue
    const start = buffer.readUInt16BE(starts + s * 2)
    if (start > code) return 0
    const delta = buffer.readInt16BE(deltas + s * 2)
    const offset = buffer.readUInt16BE(offsets + s * 2)
    if (offset === 0) return (code + delta) & 0xffff
    const glyph = buffer.readUInt16BE(offsets + s * 2 + offset + (code - start) * 2)
    return glyph === 0 ? 0 : (glyph + delta) & 0xffff
  }
  return 0
}

function advances(file) {
  const buffer = readFileSync(join(root, 'fonts', file))
  const t = tables(buffer)
  const unitsPerEm = buffer.readUInt16BE(t.head + 18)
  const longMetrics = buffer.readUInt16BE(t.hhea + 34)
  const cmap = unicodeSubtable(buffer, t.cmap)
  const widthOf = (glyph) => {
    const index = Math.min(glyph, longMetrics - 1)
    return Math.round((buffer.readUInt16BE(t.hmtx + index * 4) * 1000) / unitsPerEm)
  }
  const widths = {}
  for (const char of CHARS) {
    const glyph = glyphOf(buffer, cmap, char.codePointAt(0))
    if (glyph !== 0) widths[char] = widthOf(glyph)
  }
  return widths
}

function literal(widths) {
  const entries = Object.entries(widths).map(([char, w]) => `${JSON.stringify(char)}: ${w}`)
  const lines = []
  for (let i = 0; i < entries.length; i += 12)
    lines.push(`    ${entries.slice(i, i + 12).join(', ')},`)
  return lines.join('\n')
}

const faces = Object.entries(FACES).map(([face, file]) => {
  const widths = advances(file)
  const missing = CHARS.filter((char) => !(char in widths))
  if (missing.length > 0) console.log(`${file}: no glyph for ${missing.join(' ')}`)
  return `  ${face}: {\n${literal(widths)}\n  },`
})
const text = `// Written by lib/local/font-metrics.mjs from the TTF files in fonts/. Do not edit by hand.
// Advance widths in thousandths of an em. Kerning is left out: measured text is never too short.
import type { Metrics } from '@/components/drawing/text'

// prettier-ignore
export const metrics: Metrics = {
${faces.join('\n')}
}
`
writeFileSync(join(root, 'components', 'drawing', 'metrics.ts'), text)
