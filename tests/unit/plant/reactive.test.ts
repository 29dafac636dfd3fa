import { describe, expect, it } from 'vitest'
import { neededInverterKva, resistancePct } from '@/lib/domain/plant/reactive'

const PAD = { ratedKva: 2750, impedancePct: 5.75, xOverR: 8, noLoadKw: 2.9 }
/** Demo: main transformer on its self-cooled base, fourteen pad-mount units of 4.4 MVA. */
const DEMO = [
  { ratedKva: 36_000, impedancePct: 8.5, xOverR: 28 },
  { ratedKva: 61_600, impedancePct: 5.75, xOverR: 8 },
]

describe('power needed at the inverters', () => {
  // Source: engineering-checks.json AC-01, S = P/pf.
  it('without transformers 2,500 kW at 0.95 needs 2,631.6 kVA and 821.7 kvar', () => {
    const needed = neededInverterKva({ limitKw: 2500, powerFactorAtPoi: 0.95, transformers: [] })
    expect(needed.inverterKva).toBeCloseTo(2631.6, 1)
    expect(needed.inverterKvar).toBeCloseTo(821.7, 1)
  })

  // Source: engineering-checks.json TX-01, R = Z / sqrt(1 + (X/R)^2).
  it('5.75 % with X/R 8 is 0.7132 % resistance', () => {
    expect(resistancePct(PAD)).toBeCloseTo(0.7132, 4)
  })

  // Source: engineering-facts.md section 4 item 24: 963.6 kvar, 2,679.3 kVA, inverter PF 0.933.
  it('0.95 at the high side needs 0.933 at inverters giving 2,500 kW', () => {
    const lossKw = 2.9 + 19.613 * (2679.3 / 2750) ** 2
    const needed = neededInverterKva({
      limitKw: 2500 - lossKw,
      powerFactorAtPoi: 0.95,
      transformers: [PAD],
      unityVoltageAt: 'inverter',
    })
    expect(needed.inverterKw).toBeCloseTo(2500, 1)
    expect(needed.inverterKvar).toBeCloseTo(963.6, 0)
    expect(needed.inverterKva).toBeCloseTo(2679.3, 0)
    expect(needed.inverterPowerFactor).toBeCloseTo(0.933, 3)
  })

  // Source: demo-scenario.md story F: 50.4 MVA cannot give it, about 54.5 MVA, 58.8 can.
  it('the demo plant needs about 54.5 MVA for 48 MW at 0.95', () => {
    const needed = neededInverterKva({
      limitKw: 48_000,
      powerFactorAtPoi: 0.95,
      acLossFraction: 0.019,
      transformers: DEMO,
    })
    expect(needed.inverterKva / 1000).toBeGreaterThan(54.4)
    expect(needed.inverterKva / 1000).toBeLessThan(54.7)
    expect(needed.inverterKva).toBeGreaterThan(50_400)
    expect(needed.account).toContain('54.6 MVA needed at the inverters for 48.0 MW at 0.95')
  })

  it('the voltage held at the inverters asks for more than held at the POI', () => {
    const base = { limitKw: 48_000, powerFactorAtPoi: 0.95, transformers: DEMO }
    const poi = neededInverterKva({ ...base, unityVoltageAt: 'poi' })
    const inverter = neededInverterKva({ ...base, unityVoltageAt: 'inverter' })
    expect(inverter.inverterKva).toBeGreaterThan(poi.inverterKva)
  })

  it('with the POI at 1 per unit the result is the exact phasor solution of the series circuit', () => {
    const needed = neededInverterKva({
      limitKw: 48_000,
      powerFactorAtPoi: 0.95,
      transformers: DEMO,
    })
    const current = { re: 48, im: -48 * Math.tan(Math.acos(0.95)) }
    let r = 0
    let x = 0
    for (const transformer of DEMO) {
      r += resistancePct(transformer) / 100 / (transformer.ratedKva / 1000)
      x += (resistancePct(transformer) * transformer.xOverR) / 100 / (transformer.ratedKva / 1000)
    }
    const voltage = {
      re: 1 + r * current.re - x * current.im,
      im: r * current.im + x * current.re,
    }
    const mw = voltage.re * current.re + voltage.im * current.im
    const mvar = voltage.im * current.re - voltage.re * current.im
    expect(needed.inverterKw / 1000).toBeCloseTo(mw, 8)
    expect(needed.inverterKvar / 1000).toBeCloseTo(mvar, 8)
  })
})
