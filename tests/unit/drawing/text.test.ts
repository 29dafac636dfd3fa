import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { metrics } from '@/components/drawing/metrics'
import { bindUnits, textWidth, wrapText, wrapTo } from '@/components/drawing/text'

describe('measured text', () => {
  it('reads the advance widths of the shipped font: an Archivo A is 0.682 em wide', () => {
    // Source: hmtx table of fonts/archivo-regular.ttf.
    expect(textWidth('A', 'sans400', 100, metrics)).toBeCloseTo(68.2, 5)
  })

  it('gives every digit the width of the widest, as tabular figures do', () => {
    expect(textWidth('1111', 'sans400', 12, metrics)).toBe(
      textWidth('8888', 'sans400', 12, metrics),
    )
  })

  it('gives every character of the mono face the same width', () => {
    const widths = [...'AiW0–°'].map((char) => textWidth(char, 'mono400', 10, metrics))
    expect(new Set(widths).size).toBe(1)
  })

  it('counts a character without a known width as wide as a W', () => {
    expect(textWidth('字', 'sans400', 12, metrics)).toBe(textWidth('W', 'sans400', 12, metrics))
  })
})

describe('wrapped text', () => {
  it('keeps every line within the room and loses no character', () => {
    const text = fc.string({ unit: fc.constantFrom('a', 'M', '1', ' ', '-'), maxLength: 80 })
    fc.assert(
      fc.property(text, fc.integer({ min: 20, max: 200 }), (drawn, room) => {
        const lines = wrapText(drawn, 'sans600', 13, room, metrics)
        for (const line of lines) {
          expect(textWidth(line, 'sans600', 13, metrics)).toBeLessThanOrEqual(room)
        }
        expect(lines.join('').replaceAll(' ', '')).toBe(drawn.replaceAll(' ', ''))
      }),
    )
  })

  it('ends in an ellipsis where lines are cut off', () => {
    const lines = wrapTo('one two three four five', 'sans400', 12, 50, 2, metrics)
    expect(lines).toHaveLength(2)
    expect(lines[1]).toMatch(/…$/)
  })

  it('never parts a figure from its unit', () => {
    expect(bindUnits('14 × 4.20 MVA, 5.75 %')).toBe('14\u00a0×\u00a04.20\u00a0MVA, 5.75\u00a0%')
    expect(bindUnits('Sorrel 69 kV bus')).toBe('Sorrel 69\u00a0kV bus')
    expect(bindUnits('2 Applications')).toBe('2 Applications')
  })
})
