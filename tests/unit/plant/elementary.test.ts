import { describe, expect, it } from 'vitest'
import { readFileSync, readdirSync } from 'node:fs'
import path from 'node:path'
import {
  acosOf,
  asinOf,
  atan2Of,
  atanOf,
  cosOf,
  expOf,
  logOf,
  powOf,
  sinOf,
  tanOf,
} from '@/lib/domain/plant/elementary'

const grid = (from: number, to: number) =>
  Array.from({ length: 20_001 }, (_, i) => from + ((to - from) * i) / 20_000)

// Reference: the engine's own functions, which are within one unit in the last place of the truth.
describe('elementary functions of the chain', () => {
  it.each([
    { name: 'sine', own: sinOf, ours: Math.sin, from: -7, to: 7, within: 1e-15 },
    { name: 'sine of many turns', own: sinOf, ours: Math.sin, from: -9e4, to: 9e4, within: 1e-15 },
    { name: 'cosine', own: cosOf, ours: Math.cos, from: -7, to: 7, within: 1e-15 },
    { name: 'cosine, many turns', own: cosOf, ours: Math.cos, from: -9e4, to: 9e4, within: 1e-15 },
    { name: 'tangent', own: tanOf, ours: Math.tan, from: -1.5, to: 1.5, within: 1e-14 },
    { name: 'arctangent', own: atanOf, ours: Math.atan, from: -50, to: 50, within: 1e-15 },
    { name: 'arcsine', own: asinOf, ours: Math.asin, from: -1, to: 1, within: 1e-15 },
    { name: 'arccosine', own: acosOf, ours: Math.acos, from: -1, to: 1, within: 2e-15 },
    { name: 'logarithm', own: logOf, ours: Math.log, from: 1e-6, to: 100, within: 1e-14 },
  ])('$name agrees with its definition', ({ own, ours, from, to, within }) => {
    const worst = Math.max(...grid(from, to).map((x) => Math.abs(own(x) - ours(x))))
    expect(worst).toBeLessThan(within)
  })

  it('exponential and power agree to fifteen digits', () => {
    const off = (own: number, ours: number) => Math.abs(own / ours - 1)
    expect(Math.max(...grid(-50, 50).map((x) => off(expOf(x), Math.exp(x))))).toBeLessThan(1e-15)
    const powers = grid(0.01, 120).map((x) => off(powOf(x, -1.6364), x ** -1.6364))
    expect(Math.max(...powers)).toBeLessThan(1e-14)
  })

  it('keep the corners: quadrants, ends of a range, zero and what has no value', () => {
    for (const [y, x] of [
      [1, 1],
      [1, -1],
      [-1, -1],
      [-1, 1],
      [0, -1],
      [1, 0],
      [-1, 0],
      [0, 0],
    ] as const)
      expect(atan2Of(y, x)).toBeCloseTo(Math.atan2(y, x), 15)
    expect([acosOf(1), acosOf(-1), asinOf(1), cosOf(0), sinOf(0)]).toEqual([
      0,
      Math.PI,
      Math.PI / 2,
      1,
      0,
    ])
    expect([acosOf(1.1), asinOf(-1.1), logOf(-1), expOf(NaN), sinOf(NaN)]).toEqual(
      Array(5).fill(NaN),
    )
    expect([expOf(-1e4), expOf(1e4), expOf(0), powOf(0, 2), powOf(5, 0)]).toEqual([
      0,
      Infinity,
      1,
      0,
      1,
    ])
  })

  it('are the only ones that the hourly chain uses', () => {
    const folder = path.resolve(import.meta.dirname, '../../../lib/domain/plant')
    const besideTheChain = ['reactive.ts', 'strings.ts']
    const found = readdirSync(folder)
      .filter((file) => !besideTheChain.includes(file))
      .filter((file) =>
        /\bMath\.(sin|cos|tan|asin|acos|atan2?|exp|log\w*|pow|hypot)\(|[\w)\]] \*\* /.test(
          readFileSync(path.join(folder, file), 'utf8').replace(/^\s*(\/?\*|\/\/).*$/gm, ''),
        ),
      )
    expect(found).toEqual([])
  })
})
