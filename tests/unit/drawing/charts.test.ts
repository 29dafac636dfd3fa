import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { placeLimitLabels } from '@/components/chart/limit-labels'
import { energyFigure, figure, heightAt, niceTicks, smoothLine } from '@/components/chart/scale'
import { boxesOverlap } from '@/components/drawing/geometry'
import { hatchRect } from '@/components/drawing/hatch'
import { metrics } from '@/components/drawing/metrics'
import { layoutColumns } from '@/components/drawing/one-line-layout'
import { textWidth } from '@/components/drawing/text'
import { sampleElements } from '@/tests/unit/drawing/fixtures'

describe('axis ticks', () => {
  it('begin at zero, are evenly spaced and reach the largest value', () => {
    fc.assert(
      fc.property(fc.double({ min: 1e-3, max: 1e7, noNaN: true }), (max) => {
        const ticks = niceTicks(max, 5)
        expect(ticks[0]).toBe(0)
        expect(ticks.at(-1)).toBeGreaterThanOrEqual(max * (1 - 1e-9))
        expect(ticks.length).toBeLessThanOrEqual(8)
      }),
    )
  })
})

describe('figures', () => {
  it.each([
    [1470.2, 0, '1,470'],
    [-0.04, 1, '0.0'],
    [-2, 1, '−2.0'],
    [1234567.891, 2, '1,234,567.89'],
  ])('writes %d with %i digits as %s', (value, digits, text) => {
    expect(figure(value, digits)).toBe(text)
  })

  it('turns to GWh from ten thousand MWh', () => {
    expect(energyFigure(830_000)).toBe('830 MWh')
    expect(energyFigure(112_400_000)).toBe('112.4 GWh')
  })
})

describe('the smooth line', () => {
  it('passes through its points and never leaves the band between neighbors', () => {
    const ys = fc.array(fc.double({ min: 0, max: 1, noNaN: true }), { minLength: 2, maxLength: 12 })
    fc.assert(
      fc.property(ys, (drawn) => {
        const points = drawn.map((y, x) => ({ x, y }))
        const line = smoothLine(points)
        for (const { x, y } of points) expect(heightAt(line, x)).toBeCloseTo(y, 9)
        for (const { x, y } of line) {
          const [a, b] = [points[Math.floor(x)], points[Math.ceil(x)]]
          expect(y).toBeGreaterThanOrEqual(Math.min(a!.y, b!.y) - 1e-9)
          expect(y).toBeLessThanOrEqual(Math.max(a!.y, b!.y) + 1e-9)
        }
      }),
    )
  })
})

describe('hatching', () => {
  it('stays inside its rectangle and doubles its ink at half the spacing', () => {
    const read = (path: string) =>
      [...path.matchAll(/M([\d.]+) ([\d.]+) L([\d.]+) ([\d.]+)/g)].map((m) =>
        m.slice(1).map(Number),
      )
    const length = (path: string) =>
      read(path).reduce((sum, [x1, y1, x2, y2]) => sum + Math.hypot(x2! - x1!, y2! - y1!), 0)
    const [wide, tight] = [hatchRect(10, 20, 60, 40, 4), hatchRect(10, 20, 60, 40, 2)]
    for (const [x1, y1] of read(tight)) {
      expect(x1).toBeGreaterThanOrEqual(10)
      expect(x1).toBeLessThanOrEqual(70)
      expect(y1).toBeGreaterThanOrEqual(20)
      expect(y1).toBeLessThanOrEqual(60)
    }
    expect(length(tight) / length(wide)).toBeCloseTo(2, 1)
    // One line per spacing: ink is area over spacing.
    expect(length(tight)).toBeGreaterThan(0.95 * ((60 * 40) / 2))
  })
})

describe('labels of limit lines', () => {
  it('stay clear of each other, of every line and of the falling curve', () => {
    const plot = { x: 40, y: 40, width: 300, height: 160 }
    const curve = [
      { x: 40, y: 60 },
      { x: 160, y: 130 },
      { x: 340, y: 198 },
    ]
    const height = fc.integer({ min: 50, max: 110 })
    fc.assert(
      fc.property(height, height, (a, b) => {
        const wanted = [
          { text: '57.7 MW inverters', y: a, clips: false },
          { text: '48.0 MW export limit', y: b, clips: true },
        ]
        const placed = placeLimitLabels(wanted, plot, curve, metrics)
        const [first, second] = placed.map((label) => label.box)
        expect(boxesOverlap(first!, second!)).toBe(false)
        for (const { box } of placed) {
          expect(box.y).toBeGreaterThanOrEqual(0)
          expect(heightAt(curve, box.x)).toBeGreaterThan(box.y + box.height)
          for (const { y } of wanted) expect(y <= box.y || y >= box.y + box.height).toBe(true)
        }
      }),
    )
  })
})

describe('columns of the one-line diagram', () => {
  it('hold every line of their words, so that none meets a neighbor or the boundary', () => {
    fc.assert(
      fc.property(fc.integer({ min: 300, max: 1600 }), (width) => {
        for (const column of layoutColumns(sampleElements(), width, metrics) ?? []) {
          for (const line of column.lines) {
            const face = line.bold ? 'sans600' : 'sans400'
            const half = textWidth(line.text, face, line.bold ? 12 : 11, metrics) / 2
            expect(column.x - half).toBeGreaterThanOrEqual(column.x1)
            expect(column.x + half).toBeLessThanOrEqual(column.x2)
          }
        }
      }),
    )
  })

  it('are given up for the downward form where words would have to be cut', () => {
    expect(layoutColumns(sampleElements(), 340, metrics)).toBeUndefined()
    expect(layoutColumns(sampleElements(), 960, metrics)).toHaveLength(sampleElements().length)
  })
})
