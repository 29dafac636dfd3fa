import { readFileSync } from 'node:fs'
import path from 'node:path'
import { describe, expect, test } from 'vitest'
import { darkPalette, lightPalette } from '@/components/drawing/palette'

const css = readFileSync(path.join(import.meta.dirname, '../../../app/globals.css'), 'utf8')

function variablesOf(selector: string): Record<string, string> {
  const start = css.indexOf(`${selector} {`)
  const body = css.slice(start, css.indexOf('}', start))
  return Object.fromEntries([...body.matchAll(/--([\w-]+):\s*(#\w{6})/g)].map((m) => [m[1], m[2]]))
}

const light = variablesOf(':root')
const dark = variablesOf(`:root[data-theme='dark']`)
const system = variablesOf(`:root[data-theme='system']`)

/** Relative luminance and contrast ratio. Source: WCAG 2.2, definitions of both terms. */
function contrast(a: string, b: string): number {
  const luminance = (hex: string) => {
    const [r = 0, g = 0, b = 0] = [1, 3, 5].map((at) => {
      const channel = parseInt(hex.slice(at, at + 2), 16) / 255
      return channel <= 0.04045 ? channel / 12.92 : ((channel + 0.055) / 1.055) ** 2.4
    })
    return 0.2126 * r + 0.7152 * g + 0.0722 * b
  }
  const [low = 0, high = 0] = [luminance(a), luminance(b)].sort((x, y) => x - y)
  return (high + 0.05) / (low + 0.05)
}

const pairs: [string, string][] = [
  ...['ink', 'ink-2', 'copper', 'blue', 'late', 'soon', 'ok'].flatMap(
    (text): [string, string][] => [
      [text, 'film'],
      [text, 'sheet'],
    ],
  ),
  ['on-copper', 'copper'],
  ['on-copper', 'copper-deep'],
  ['late', 'late-2'],
  ['ink', 'late-2'],
  ['soon-ink', 'soon-2'],
  ['ink', 'copper-2'],
  ['ink', 'rule-2'],
]

describe('theme', () => {
  test.each([
    ['light', light],
    ['dark', dark],
  ])('every text color of the %s sheet meets WCAG 2.2 AA on its ground', (_, theme) => {
    const misses = pairs.filter(([text, ground]) => contrast(theme[text]!, theme[ground]!) < 4.5)
    expect(misses).toEqual([])
  })

  test.each([
    ['light', light],
    ['dark', dark],
  ])('the border of a %s field stands out 3 to 1 from its sheet', (_, theme) => {
    expect(contrast(theme['ink-3']!, theme.sheet!)).toBeGreaterThanOrEqual(3)
  })

  test('a page left to the system gets the same night sheet as a chosen one', () => {
    expect(system).toEqual(dark)
    expect(Object.keys(dark).length).toBeGreaterThan(10)
  })

  test.each([
    ['light', light, lightPalette],
    ['dark', dark, darkPalette],
  ])('drawings and pages use one set of %s colors', (_, theme, palette) => {
    const { page, ink2, ink3, rule2, sans, mono, ...same } = palette
    expect(theme).toMatchObject({
      ...same,
      film: page,
      'ink-2': ink2,
      'ink-3': ink3,
      'rule-2': rule2,
    })
  })
})
