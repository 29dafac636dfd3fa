import type { ReactElement } from 'react'
import { renderToStaticMarkup } from 'react-dom/server'
import { describe, expect, it } from 'vitest'
import { ClippingCurve } from '@/components/chart/clipping-curve'
import { DurationCurve } from '@/components/chart/duration-curve'
import { HourMonthGrid } from '@/components/chart/hour-month-grid'
import { LossChain } from '@/components/chart/loss-chain'
import { MonthBars } from '@/components/chart/month-bars'
import { Mark } from '@/components/drawing/mark'
import { metrics } from '@/components/drawing/metrics'
import { OneLine } from '@/components/drawing/one-line'
import { darkPalette, lightPalette, type Palette } from '@/components/drawing/palette'
import { DimensionTick } from '@/components/line/dimension-tick'
import { StepLineLarge } from '@/components/line/step-line-large'
import { StepLineSmall } from '@/components/line/step-line-small'
import { StepLineTall } from '@/components/line/step-line-tall'
import { sampleElements, sampleModel, samplePlaces } from '@/tests/unit/drawing/fixtures'

const cells = Array.from({ length: 24 }, (_, h) =>
  Array.from({ length: 12 }, (_, m) => (h > 9 && h < 15 && m > 2 && m < 8 ? 1000 * (m + h) : 0)),
)
const months = Array.from({ length: 12 }, (_, i) => ({
  month: i + 1,
  exportKwh: 9e6,
  clippedKwh: i * 2e4,
}))
const ratios = [1, 1.2, 1.4, 1.6].map((ratio, i) => ({ ratio, lostFraction: 0.01 * i * i }))
const hours = [1, 500, 1500, 4000].map((h, i) => ({ hours: h, kw: 54_000 - i * 16_000 }))
const limits = [
  { kw: 57_700, label: '57.7 MW inverters', clips: false },
  { kw: 48_000, label: '48.0 MW export limit', clips: true },
]

function drawings(palette: Palette, width: number): Record<string, ReactElement> {
  const common = { palette, metrics, width }
  const chart = { ...common, height: 240 }
  const model = sampleModel()
  const at = { ratio: 1.3, lostFraction: 0.025 }
  const clipped = { clippedKwh: 8e5, clippedHours: 400 }
  return {
    mark: <Mark palette={palette} />,
    'small line': <StepLineSmall steps={model.steps} palette={palette} />,
    'large line': <StepLineLarge model={model} {...common} width={Math.max(600, width)} />,
    'tall line': <StepLineTall model={model} {...common} />,
    tick: <DimensionTick label="7 BD" tone="soon" palette={palette} metrics={metrics} />,
    'one-line': <OneLine elements={sampleElements()} {...common} />,
    'loss chain': <LossChain places={samplePlaces()} {...common} />,
    clipping: <ClippingCurve points={ratios} at={at} ratioName="DC/AC" {...chart} />,
    duration: <DurationCurve points={hours} limits={limits} {...clipped} {...chart} />,
    grid: <HourMonthGrid kwhByHourAndMonth={cells} title="Clipped" {...chart} />,
    bars: <MonthBars months={months} {...chart} />,
  }
}

const names = Object.keys(drawings(lightPalette, 340))

function markupOf(name: string, palette: Palette, width: number): string {
  return renderToStaticMarkup(drawings(palette, width)[name])
}

describe.each(names)('the drawing "%s"', (name) => {
  it.each([340, 960])('is made of presentation attributes alone at %i px', (width) => {
    const markup = markupOf(name, lightPalette, width)
    expect(markup).not.toMatch(/\s(class|style|id)=/)
    expect(markup).not.toContain('var(')
    expect(markup).not.toMatch(/NaN|undefined|Infinity/)
  })

  it('takes every color from the palette it is given', () => {
    const allowed = new Set(Object.values(darkPalette))
    const colors = markupOf(name, darkPalette, 960).match(/#[0-9a-f]{3,8}\b/g) ?? []
    expect(colors.length).toBeGreaterThan(0)
    expect(colors.filter((color) => !allowed.has(color))).toEqual([])
  })

  it('says in words what it shows', () => {
    const markup = markupOf(name, lightPalette, 960)
    expect(markup).toContain('role="img"')
    const label = /aria-label="([^"]*)"/.exec(markup)?.[1] ?? ''
    expect(label).toMatch(/[A-Za-z]{2}/)
  })

  it('comes out the same every time', () => {
    expect(markupOf(name, lightPalette, 960)).toBe(markupOf(name, lightPalette, 960))
  })
})

describe('the text equivalent of the step line', () => {
  it('names every step with its side, state and date, and denies showing equipment', () => {
    const markup = markupOf('large line', lightPalette, 960)
    for (const step of sampleModel().steps) expect(markup).toContain(`${step.title}: `)
    expect(markup).toContain('Gate 2: ours, running, 10 Dec (Deposit done; Site control open)')
    expect(markup).toContain('not the state of equipment')
  })
})

describe('the small step line', () => {
  it.each([1, 2, 13, 22, 23, 40])('keeps %i steps inside its row', (count) => {
    const [first] = sampleModel().steps
    const steps = Array.from({ length: count }, (_, i) => ({
      ...first!,
      key: `s${i}`,
      state: i < count / 2 ? ('done' as const) : ('ahead' as const),
    }))
    const markup = renderToStaticMarkup(<StepLineSmall steps={steps} palette={lightPalette} />)
    const centers = [...markup.matchAll(/cx="([\d.-]+)"/g)].map((match) => Number(match[1]))
    expect(Math.min(...centers)).toBeGreaterThanOrEqual(4)
    expect(Math.max(...centers)).toBeLessThanOrEqual(226)
    expect(markup).toContain(`of ${count} steps done`)
  })
})
