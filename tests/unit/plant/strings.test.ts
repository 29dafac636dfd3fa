import { describe, expect, it } from 'vitest'
import { checkString, stringLimits, voltageAt, type StringInputs } from '@/lib/domain/plant/strings'
import { stringsInput } from '@/lib/schemas/plant'

// Source: pv-worked-examples.md section 9 (rule of the NEC 690.7 kind; invented module).
const MODULE: StringInputs = {
  vocV: 49.8,
  vmpV: 41.6,
  betaVocPctPerC: -0.27,
  betaVmpPctPerC: -0.34,
  tMinC: -15,
  tCellHotC: 70,
  systemMaxV: 1500,
  trackingMinV: 860,
}

describe('longest string', () => {
  it.each([
    { tMinC: 0, cold: 53.1615, at1500: 28, at1000: 18 },
    { tMinC: -10, cold: 54.5061, at1500: 27, at1000: 18 },
    { tMinC: -15, cold: 55.1784, at1500: 27, at1000: 18 },
    { tMinC: -20, cold: 55.8507, at1500: 26, at1000: 17 },
    { tMinC: -30, cold: 57.1953, at1500: 26, at1000: 17 },
  ])('at $tMinC C is $at1500 at 1,500 V and $at1000 at 1,000 V', (row) => {
    const limits = stringLimits({ ...MODULE, tMinC: row.tMinC })
    expect(limits.vocColdV).toBeCloseTo(row.cold, 4)
    expect(limits.maxModules).toBe(row.at1500)
    expect(stringLimits({ ...MODULE, tMinC: row.tMinC, systemMaxV: 1000 }).maxModules).toBe(
      row.at1000,
    )
  })

  it('27 modules at -15 C give 1,489.8 V and 28 are refused', () => {
    expect(stringLimits(MODULE).stringVocV).toBeCloseTo(1489.8168, 4)
    expect(checkString(27, MODULE).allowed).toBe(true)
    expect(checkString(28, MODULE)).toMatchObject({ allowed: false })
    expect(checkString(28, MODULE).stringVocV).toBeCloseTo(1544.9952, 4)
    expect(checkString(28, MODULE).account).toContain('45.0 V above the limit of 1,500.0 V')
  })

  it('a string exactly at the limit is allowed', () => {
    const exact = { ...MODULE, vocV: 50, betaVocPctPerC: 0, systemMaxV: 1500 }
    expect(stringLimits(exact).maxModules).toBe(30)
    const tenths = { ...MODULE, vocV: 0.1, vmpV: 0.05, betaVocPctPerC: 0, systemMaxV: 0.3 }
    expect(stringLimits(tenths).maxModules).toBe(3)
  })

  // Source: engineering-checks.json PV-02 (temperature-coefficient method).
  it('49.9 V, -0.26 %/C at -24 C and 1,500 V allow 26 of 1,462.7 V', () => {
    const limits = stringLimits({ ...MODULE, vocV: 49.9, betaVocPctPerC: -0.26, tMinC: -24 })
    expect(limits).toMatchObject({ maxModules: 26 })
    expect(limits.vocColdV).toBeCloseTo(56.257, 3)
    expect(limits.stringVocV).toBeCloseTo(1462.7, 1)
  })

  // Source: demo-scenario.md section 3, invented module Halden 580B.
  it('the demo module: 26 in series at -24 C are refused by 5.9 V, 25 pass', () => {
    const halden = { ...MODULE, vocV: 51.6, vmpV: 43.3, betaVocPctPerC: -0.25, tMinC: -24 }
    const demo = { ...halden, betaVmpPctPerC: -0.3, trackingMinV: 880 }
    expect(checkString(26, demo).account).toContain('5.9 V above')
    expect(checkString(25, demo).stringVocV).toBeCloseTo(1448, 0)
    expect(stringLimits(demo)).toMatchObject({ maxModules: 25, minModules: 24 })
  })
})

describe('shortest string', () => {
  it.each([
    { tCellHotC: 60, hot: 36.6496, least: 24 },
    { tCellHotC: 65, hot: 35.9424, least: 24 },
    { tCellHotC: 70, hot: 35.2352, least: 25 },
    { tCellHotC: 75, hot: 34.528, least: 25 },
  ])('at $tCellHotC C cell is $least for 860 V', ({ tCellHotC, hot, least }) => {
    const limits = stringLimits({ ...MODULE, tCellHotC })
    expect(limits.vmpHotV).toBeCloseTo(hot, 4)
    expect(limits.minModules).toBe(least)
    expect(checkString(least - 1, { ...MODULE, tCellHotC }).allowed).toBe(false)
  })

  // Source: engineering-checks.json PV-04.
  it('41.95 V, -0.34 %/C at 70 C needs 25 for 860 V', () => {
    const limits = stringLimits({ ...MODULE, vmpV: 41.95 })
    expect(limits.vmpHotV).toBeCloseTo(35.532, 3)
    expect(limits.minModules).toBe(25)
  })

  it('a window that no string fits is said in the account', () => {
    const limits = stringLimits({ ...MODULE, trackingMinV: 1400 })
    expect(limits.account).toContain('No string length keeps both limits.')
  })
})

describe('input', () => {
  it('a positive voltage coefficient is refused: it would make a cold string look safe', () => {
    expect(voltageAt(49.8, 0.27, -15)).toBeCloseTo(44.4216, 4)
    const result = stringsInput.safeParse({ ...MODULE, betaVocPctPerC: 0.27 })
    expect(result.error!.issues[0]).toMatchObject({
      path: ['betaVocPctPerC'],
      message: 'found 0.27, allowed -0.6 to 0 % per C',
    })
  })

  it('a coefficient in mV/C is refused', () => {
    expect(stringsInput.safeParse({ ...MODULE, betaVocPctPerC: -134.46 }).success).toBe(false)
  })

  it('Vmp above Voc and a window above the system voltage are both named', () => {
    const result = stringsInput.safeParse({ ...MODULE, vmpV: 60, trackingMinV: 1500 })
    expect(result.error!.issues.map((issue) => issue.path[0])).toEqual(['vmpV', 'trackingMinV'])
  })
})
