import { describe, expect, it } from 'vitest'
import { demoDesigns, demoWeather } from '@/db/demo/designs'
import { checksOf } from '@/lib/domain/plant/design-checks'
import { dcLossFractionOf, figuresOf, plantOf } from '@/lib/domain/plant/design'
import { designRunner } from '@/lib/domain/plant/design-year'
import { syntheticYear } from '@/lib/domain/plant/synthetic-year'
import { packWeather, unpackWeather } from '@/lib/domain/plant/weather-bytes'
import { estimateYear } from '@/lib/domain/plant/year'
import { designBodySchema, type DesignBody } from '@/lib/schemas/design'
import { plantSchema } from '@/lib/schemas/plant'
import { synthetic } from './weather-texts'

const latest = (name: string) => demoDesigns.find((one) => one.project === name)!.revisions.at(-1)!
const juniper = latest('Juniper Flat').body
const changed = (change: Partial<DesignBody>): DesignBody => ({ ...juniper, ...change })
const text = (design: DesignBody, path: string) =>
  checksOf(design)
    .filter((check) => check.path === path)
    .map((check) => `${check.tone}: ${check.text}`)

describe('a design', () => {
  it('becomes a plant that the estimate door takes', () => {
    const plant = plantOf(juniper)
    expect(plantSchema.parse(plant)).toEqual(plant)
    expect(plant).toMatchObject({ poiLimitKw: 48_000, inverterAcKw: 58_800, gammaPerC: -0.003 })
    expect(plant.dcKw).toBeCloseTo(62_393.5, 6)
  })

  it('takes its DC losses one after the other', () => {
    expect(dcLossFractionOf([{ fraction: 0.1 }, { fraction: 0.2 }])).toBeCloseTo(0.28, 12)
    expect(dcLossFractionOf([])).toBe(0)
    expect(plantOf(juniper).dcLossFraction).toBeCloseTo(0.112, 3)
  })

  // Source: demo-scenario.md sections 3 and 11, the invented plant's own figures.
  it('gives nameplate, both ratios and the longest string', () => {
    const figures = figuresOf(juniper)
    expect(figures.dcMw).toBeCloseTo(62.39, 2)
    expect(figures.dcPerPoi).toBeCloseTo(1.3, 2)
    expect(figures.dcPerInverter).toBeCloseTo(1.06, 2)
    expect(figures.strings.maxModules).toBe(25)
    expect(figures.spareMva).toBeGreaterThan(4)
  })

  it('is refused with every field that is out of its range', () => {
    const wrong = changed({ strings: 0, powerFactorAtPoi: 1.2, acLossFraction: 2 })
    const paths = designBodySchema.safeParse(wrong).error?.issues.map((one) => one.path.join('.'))
    expect(paths).toEqual(expect.arrayContaining(['strings', 'powerFactorAtPoi', 'acLossFraction']))
    const sheet = { ...juniper.module, vmpV: 52 }
    const crossed = designBodySchema.safeParse(changed({ module: sheet })).error?.issues[0]
    expect(crossed?.path).toEqual(['module', 'vmpV'])
    expect(crossed?.message).toContain('below the open-circuit voltage, 51.6 V')
  })
})

describe('the checks of a design', () => {
  it('say the cold string voltage with its limit, and how many modules are too many', () => {
    expect(text(juniper, 'modulesPerString')).toEqual([
      'kept: 25 in series at −24 °C: 1,448.0 V of 1,500 V',
      'kept: Hottest cell 70 °C: 936.4 V, tracking from 880 V',
    ])
    expect(text(changed({ modulesPerString: 26 }), 'modulesPerString')[0]).toBe(
      'broken: 26 in series at −24 °C: 1,505.9 V of 1,500 V, one too many',
    )
    expect(text(changed({ modulesPerString: 23 }), 'modulesPerString')[1]).toBe(
      'broken: Hottest cell 70 °C: 861.5 V, tracking from 880 V, at least 24 in series',
    )
  })

  it('say the apparent power needed at the inverters and what is short of it', () => {
    expect(text(juniper, 'inverter.count')).toEqual([
      'kept: 54.6 MVA needed for 48.0 MW at 0.95: 58.8 installed',
    ])
    const old = demoDesigns[0]!.revisions[2]!.body
    expect(text(old, 'inverter.count')).toEqual([
      'broken: 54.7 MVA needed for 48.0 MW at 0.95: 50.4 installed, 4.3 short',
    ])
  })

  // Ranges: engineering-facts.md section 5, common practice.
  it('name what is unusual in a data sheet, and ask about doubled cells', () => {
    const unusual = (change: Partial<DesignBody['module']>) =>
      checksOf(changed({ module: { ...juniper.module, ...change } }))
        .filter((check) => check.tone === 'unusual')
        .map((check) => check.text)
    expect(unusual({})).toEqual([])
    expect(unusual({ cellsInSeries: 144 })).toEqual([
      '0.30 V per cell: half-cut modules print twice the cells in series; is it 72?',
    ])
    expect(unusual({ vocV: 60 })[0]).toContain('Voc over Vmp 1.39, usually 1.15 to 1.33')
    expect(unusual({ gammaPmaxPctPerC: -0.6 })[0]).toContain('usually −0.50 to −0.25 %/°C')
  })
})

describe('the runner of designs', () => {
  const weather = synthetic()

  it('gives the bits of the plain chain, whatever was run before', () => {
    const runner = designRunner(weather)
    const fixed = changed({ mounting: { kind: 'fixed', tiltDeg: 25, azimuthDeg: 180 } })
    runner.run(fixed)
    runner.run(changed({ strings: 5000 }))
    const { subHourly, ...year } = runner.run(juniper)
    expect(year).toEqual(estimateYear(weather, plantOf(juniper)))
    expect(subHourly.highPoints).toBeGreaterThanOrEqual(subHourly.lowPoints)
  })

  it('runs on packed hours as on the hours themselves', () => {
    const unpacked = unpackWeather(packWeather(weather).buffer)
    expect(unpacked).toEqual(weather)
    expect(() => unpackWeather(packWeather(weather).buffer.slice(0, 1000))).toThrow(RangeError)
  })
})

describe('the demonstration designs', () => {
  it.each(
    demoDesigns.flatMap(({ project, revisions }) =>
      revisions.map((revision, i) => ({ name: `${project} ${i + 1}`, body: revision.body })),
    ),
  )('$name keeps the schema and its string limits', ({ body }) => {
    expect(designBodySchema.parse(body)).toEqual(body)
    const { maxModules, minModules } = figuresOf(body).strings
    expect(body.modulesPerString).toBeLessThanOrEqual(maxModules)
    expect(body.modulesPerString).toBeGreaterThanOrEqual(minModules)
  })

  // Source: demo-scenario.md section 11: 112 GWh, 0.7 %, March to August, mostly May and June.
  it('Juniper Flat comes near its scenario', () => {
    const read = syntheticYear(demoWeather.mountain)
    if (!read.ok) throw new Error(read.errors.map((one) => one.message).join('\n'))
    const { annual, monthly } = designRunner(read.year).run(juniper)
    expect(annual.exportKwh / 1e6).toBeCloseTo(112, 0)
    expect(100 * annual.limitedFraction).toBeCloseTo(0.7, 1)
    expect(annual.inverterClippedKwh).toBe(0)
    const clipped = monthly.map((month) => month.poiCurtailedKwh)
    expect(clipped[4]! + clipped[5]!).toBeGreaterThan(annual.poiCurtailedKwh / 2)
    expect(clipped.filter((_, i) => i < 2 || i > 8).every((kwh) => kwh === 0)).toBe(true)
  })
})
