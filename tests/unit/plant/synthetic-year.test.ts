import { describe, expect, it } from 'vitest'
import {
  erbsDiffuseFraction,
  haurwitzClearSky,
  syntheticYear,
} from '@/lib/domain/plant/synthetic-year'
import { SITE, synthetic } from './weather-texts'

const year = synthetic()

function monthSum(values: Float64Array, month: number): number {
  return values.reduce((sum, value, i) => (year.month[i] === month ? sum + value : sum), 0)
}

describe('a synthetic year', () => {
  it('meets the twelve monthly means it was given', () => {
    SITE.months.forEach((mean, k) => {
      const hours = year.month.filter((month) => month === k + 1).length
      expect(monthSum(year.ghi, k + 1) / 1000 / (hours / 24)).toBeCloseTo(mean.ghiKwhPerM2Day, 6)
      expect(monthSum(year.dryBulbC, k + 1) / hours).toBeCloseTo(mean.dryBulbC, 8)
      expect(monthSum(year.windMPerS, k + 1) / hours).toBeCloseTo(mean.windMPerS, 8)
    })
  })

  it('is the same each time and marked synthetic', () => {
    expect(synthetic()).toEqual(year)
    expect(year.meta.kind).toBe('synthetic')
  })

  it('closes in every hour, has no defect hours and nothing below 0', () => {
    const result = syntheticYear(SITE)
    if (!result.ok) throw new Error('refused')
    expect(result.report.closure.rmsWhPerM2).toBeLessThan(1e-9)
    expect(result.report.defectHours).toEqual([])
    for (const values of [year.ghi, year.dni, year.dhi, year.windMPerS]) {
      expect(values.every((value) => value >= 0)).toBe(true)
    }
  })

  it('has clear and cloudy days', () => {
    const june = Array.from({ length: 30 }, (_, day) => {
      const first = 24 * (151 + day)
      return year.ghi.slice(first, first + 24).reduce((sum, wh) => sum + wh, 0)
    })
    expect(Math.max(...june)).toBeGreaterThan(1.5 * Math.min(...june))
  })

  it('refuses a month that the sun cannot give, and a year without twelve months', () => {
    const months = SITE.months.map((mean, k) => (k === 11 ? { ...mean, ghiKwhPerM2Day: 9 } : mean))
    const result = syntheticYear({ ...SITE, months })
    if (result.ok) throw new Error('accepted')
    expect(result.errors[0]).toMatchObject({ column: 'GHI of month 12', found: '9' })
    expect(syntheticYear({ ...SITE, months: months.slice(1) }).ok).toBe(false)
  })
})

describe('formulas behind it', () => {
  // Source: Erbs, Klein & Duffie (1982): branches at clearness 0.22 and 0.80; values by hand.
  it.each([
    [0, 1],
    [0.2, 0.982],
    [0.5, 0.659],
    [0.9, 0.165],
  ])('clearness %d has the diffuse share %d', (kt, expected) => {
    expect(erbsDiffuseFraction(kt)).toBeCloseTo(expected, 3)
  })

  // Source: Haurwitz (1945), 1098 cosZ exp(-0.057 / cosZ), by hand.
  it('clear sky is 1,037 W/m2 with the sun overhead, 490 at 60 degrees and 0 at the horizon', () => {
    expect(haurwitzClearSky(1)).toBeCloseTo(1037.16, 1)
    expect(haurwitzClearSky(0.5)).toBeCloseTo(489.85, 1)
    expect(haurwitzClearSky(0)).toBe(0)
  })
})
