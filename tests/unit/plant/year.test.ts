import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import type { Plant } from '@/lib/domain/plant/plant'
import { prepareYear } from '@/lib/domain/plant/plane'
import { sunYear } from '@/lib/domain/plant/sun'
import { SunTrack } from '@/lib/domain/plant/sun-track'
import { estimateYear, planeInputsOf, runYear } from '@/lib/domain/plant/year'
import { estimateResult } from '@/lib/schemas/plant-result'
import { plant } from './plants'
import { synthetic } from './weather-texts'

const weather = synthetic()
const sun = sunYear(weather)

const plants: fc.Arbitrary<Plant> = fc
  .record({
    dcKw: fc.double({ min: 100, max: 300_000, noNaN: true }),
    dcPerInverter: fc.double({ min: 0.5, max: 2.5, noNaN: true }),
    dcPerPoi: fc.option(fc.double({ min: 0.5, max: 3, noNaN: true }), { nil: undefined }),
    inverterEfficiency: fc.double({ min: 0.9, max: 0.99, noNaN: true }),
    acLossFraction: fc.double({ min: 0, max: 0.1, noNaN: true }),
    albedo: fc.double({ min: 0, max: 0.8, noNaN: true }),
    tiltDeg: fc.integer({ min: 0, max: 90 }),
    azimuthDeg: fc.integer({ min: 0, max: 360 }),
    transposition: fc.constantFrom('perez_1990', 'hay_davies_1980', 'isotropic'),
    incidence: fc.constantFrom('ashrae', 'physical', 'none'),
  })
  .map(({ dcPerInverter, dcPerPoi, tiltDeg, azimuthDeg, ...rest }) =>
    plant({
      ...rest,
      inverterAcKw: rest.dcKw / dcPerInverter,
      poiLimitKw: dcPerPoi === undefined ? undefined : rest.dcKw / dcPerPoi,
      mounting: { kind: 'fixed', tiltDeg, azimuthDeg },
    }),
  )

function run(one: Plant) {
  return runYear(prepareYear(weather, planeInputsOf(one), sun), one)
}

function near(actual: number, expected: number) {
  expect(Math.abs(actual - expected)).toBeLessThanOrEqual(1e-9 * Math.max(Math.abs(expected), 1))
}

describe('laws of any plant', () => {
  it('energy balances at the inverter, on the way and at the limit', () => {
    fc.assert(
      fc.property(plants, (one) => {
        const { annual } = run(one)
        near(annual.acKwh + annual.inverterClippedKwh, annual.acUnclippedKwh)
        near(annual.acKwh * (1 - one.acLossFraction!), annual.atPoiKwh)
        near(annual.exportKwh + annual.poiCurtailedKwh, annual.atPoiKwh)
        const available = annual.acUnclippedKwh * (1 - one.acLossFraction!)
        near(annual.limitedFraction, 1 - annual.exportKwh / available)
        expect(annual.acUnclippedKwh).toBeLessThanOrEqual(annual.dcKwh)
      }),
      { numRuns: 40 },
    )
  })

  it('export never passes the limit at the POI, in the year and in its ratios', () => {
    fc.assert(
      fc.property(plants, (one) => {
        const { annual, durationCurve, poiRatios } = run(one)
        const limit = Math.min(one.poiLimitKw ?? Infinity, one.inverterAcKw)
        expect(annual.exportKwh).toBeLessThanOrEqual(limit * 8760)
        expect(annual.acCapacityFactor).toBeLessThanOrEqual(1)
        for (const ratio of poiRatios) {
          expect(ratio.exportKwh).toBeLessThanOrEqual((one.dcKw / ratio.dcPerPoi) * 8760)
        }
        const descending = durationCurve.every(
          (point, k) => k === 0 || point.kw <= durationCurve[k - 1]!.kw,
        )
        expect(descending).toBe(true)
      }),
      { numRuns: 40 },
    )
  })

  it('a larger ratio never clips a smaller fraction', () => {
    fc.assert(
      fc.property(plants, (one) => {
        const { ratios, poiRatios } = run(one)
        for (let k = 1; k < ratios.length; k++) {
          const before = ratios[k - 1]!.clippedFraction
          expect(ratios[k]!.clippedFraction).toBeGreaterThanOrEqual(before - 1e-12)
        }
        for (let k = 1; k < poiRatios.length; k++) {
          const before = poiRatios[k - 1]!.limitedFraction
          expect(poiRatios[k]!.limitedFraction).toBeGreaterThanOrEqual(before - 1e-12)
        }
      }),
      { numRuns: 40 },
    )
  })

  it('months and the hour-by-month table add up to the year', () => {
    fc.assert(
      fc.property(plants, (one) => {
        const { annual, monthly, clippedByHourAndMonth, curtailedByHourAndMonth } = run(one)
        const months = (key: 'dcKwh' | 'exportKwh' | 'poaKwhPerM2' | 'hoursAtPoiLimit') =>
          monthly.reduce((sum, month) => sum + month[key], 0)
        near(months('dcKwh'), annual.dcKwh)
        near(months('exportKwh'), annual.exportKwh)
        near(months('poaKwhPerM2'), annual.poaKwhPerM2)
        expect(months('hoursAtPoiLimit')).toBe(annual.hoursAtPoiLimit)
        const total = (table: number[][]) => table.flat().reduce((sum, kwh) => sum + kwh, 0)
        near(total(curtailedByHourAndMonth), annual.poiCurtailedKwh)
        near(total(clippedByHourAndMonth), annual.inverterClippedKwh + annual.poiCurtailedKwh)
      }),
      { numRuns: 25 },
    )
  })

  it('a plant twice the size gives twice the energy and the same fractions', () => {
    fc.assert(
      fc.property(plants, (one) => {
        const twice = {
          ...one,
          dcKw: one.dcKw * 2,
          inverterAcKw: one.inverterAcKw * 2,
          poiLimitKw: one.poiLimitKw === undefined ? undefined : one.poiLimitKw * 2,
        }
        const small = run(one).annual
        const large = run(twice).annual
        near(large.exportKwh, small.exportKwh * 2)
        near(large.clippedFraction, small.clippedFraction)
        near(large.acCapacityFactor, small.acCapacityFactor)
      }),
      { numRuns: 20 },
    )
  })
})

describe('the year of one plant', () => {
  const result = estimateYear(weather, plant())

  it('is the same, bit for bit, live, frozen and with prepared parts', () => {
    const frozen = JSON.stringify(estimateYear(synthetic(), plant()))
    expect(JSON.stringify(result)).toBe(frozen)
    expect(JSON.stringify(run(plant()))).toBe(frozen)
    const track = new SunTrack()
    sunYear(weather, { track, shiftHours: 1.5 })
    const shared = prepareYear(weather, planeInputsOf(plant()), sunYear(weather, { track }))
    expect(JSON.stringify(runYear(shared, plant()))).toBe(frozen)
  })

  it('has the shape that the interface promises', () => {
    expect(estimateResult.parse(result)).toEqual(result)
    expect(result.ratios.map((ratio) => ratio.dcAc)).toEqual([
      1, 1.1, 1.2, 1.3, 1.4, 1.5, 1.6, 1.7, 1.8,
    ])
  })

  it('states the array over both ratings', () => {
    expect(result.annual.dcPerInverterKw).toBeCloseTo(62_390 / 50_400, 12)
    expect(result.annual.dcPerPoiKw).toBeCloseTo(62_390 / 48_000, 12)
  })

  it('without a limit at the POI has no curtailment and counts on the inverter rating', () => {
    const { annual, poiRatios } = estimateYear(weather, plant({ poiLimitKw: undefined }))
    expect(annual).not.toHaveProperty('dcPerPoiKw')
    expect(annual.poiCurtailedKwh).toBe(0)
    expect(annual.acCapacityFactor).toBeCloseTo(annual.exportKwh / (50_400 * 8760), 12)
    expect(poiRatios).toEqual([])
  })

  it('a ratio equal to the plant agrees with the plant', () => {
    const one = plant({ poiLimitKw: 48_000 })
    const own = runYear(prepareYear(weather, planeInputsOf(one), sun), one, [62_390 / 50_400])
    near(own.ratios[0]!.acKwh, own.annual.acKwh)
    near(own.ratios[0]!.clippedFraction, own.annual.clippedFraction)
    const poi = runYear(prepareYear(weather, planeInputsOf(one), sun), one, [62_390 / 48_000])
    near(poi.poiRatios[0]!.exportKwh, poi.annual.exportKwh)
    near(poi.poiRatios[0]!.limitedFraction, poi.annual.limitedFraction)
  })

  it('the next MWdc yields the difference of two years, less than a MW without limits', () => {
    const larger = estimateYear(weather, plant({ dcKw: 63_390 }))
    near(result.nextMwdcKwh, larger.annual.exportKwh - result.annual.exportKwh)
    const free = estimateYear(weather, plant({ poiLimitKw: undefined, inverterAcKw: 200_000 }))
    expect(result.nextMwdcKwh).toBeLessThan(free.nextMwdcKwh)
    expect(result.nextMwdcKwh).toBeGreaterThan(0)
  })

  it('the duration curve counts the hours above the limit', () => {
    const above = result.durationCurve.filter((point) => point.kw > 48_000).at(-1)!
    const hours = result.annual.hoursAtPoiLimit
    expect(above.hours).toBeLessThanOrEqual(hours)
    expect(hours - above.hours).toBeLessThan(25)
  })

  it('names a publication for every step, and marks a synthetic year', () => {
    expect(result.methods.every((method) => method.source !== '')).toBe(true)
    expect(result.methods[0]!.method).toContain('not measured')
    expect(result.weather.kind).toBe('synthetic')
  })

  it('does not change the weather it was given', () => {
    const before = JSON.stringify([weather.ghi.slice(4000, 4100), weather.dryBulbC.slice(0, 50)])
    estimateYear(weather, plant())
    const after = JSON.stringify([weather.ghi.slice(4000, 4100), weather.dryBulbC.slice(0, 50)])
    expect(after).toBe(before)
  })
})

describe('orientation', () => {
  const fixed = (tiltDeg: number, azimuthDeg: number) =>
    estimateYear(weather, plant({ mounting: { kind: 'fixed', tiltDeg, azimuthDeg } })).annual

  it('north of the equator south yields more than north, a tracker more than fixed', () => {
    expect(fixed(30, 180).dcKwh).toBeGreaterThan(fixed(30, 0).dcKwh * 1.3)
    expect(estimateYear(weather, plant()).annual.dcKwh).toBeGreaterThan(fixed(30, 180).dcKwh)
  })

  it('azimuth 0 and 360 are the same, and an axis of 0 tracks like one of 180', () => {
    near(fixed(30, 0).dcKwh, fixed(30, 360).dcKwh)
    const mounting = { ...plant().mounting, axisAzimuthDeg: 0 } as Plant['mounting']
    near(
      estimateYear(weather, plant({ mounting })).annual.dcKwh,
      estimateYear(weather, plant()).annual.dcKwh,
    )
  })

  it('a flat plane receives the global horizontal irradiance of the file', () => {
    const ghi = weather.ghi.reduce((sum, wh) => sum + wh, 0) / 1000
    expect(Math.abs(fixed(0, 180).poaKwhPerM2 - ghi)).toBeLessThan(ghi * 0.001)
  })
})
