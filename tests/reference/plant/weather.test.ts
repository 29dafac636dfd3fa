import { readFileSync } from 'node:fs'
import { describe, expect, it } from 'vitest'
import { closureCheck } from '@/lib/domain/plant/weather-check'
import { readWeather } from '@/lib/domain/plant/weather'
import { estimateYear } from '@/lib/domain/plant/year'
import {
  basePlant,
  isMissing,
  loadReference,
  loadWeather,
  MISSING_NOTE,
  REFERENCE_JSON,
  STATION_FILES,
  weatherPath,
  type MountingName,
} from './reference-files'

const EPW = 'USA_AZ_Tucson.Intl.AP.722740_TMY3.epw'
const SALT_LAKE = '725720TYA.CSV'

const absent = isMissing(...STATION_FILES)

describe.skipIf(absent)(`station files ${MISSING_NOTE}`, () => {
  // Source: pv-reference.md section 3, sums of the files (kWh/m2, C).
  it.each([
    { id: '723170', ghi: 1566.203, dni: 1476.549, dhi: 682.223, mean: 14.422, min: -16.7 },
    { id: '722740', ghi: 2061.829, dni: 2546.824, dhi: 522.906, mean: 20.414, min: -3.3 },
    { id: '725090', ghi: 1407.838, dni: 1336.042, dhi: 651.843, mean: 10.6, min: -20 },
  ])('$id: sums and temperatures of the file are read', ({ id, ghi, dni, dhi, mean, min }) => {
    const { report } = loadWeather(`${id}TYA.CSV`)
    expect(report.annual.ghiKwhPerM2).toBeCloseTo(ghi, 3)
    expect(report.annual.dniKwhPerM2).toBeCloseTo(dni, 3)
    expect(report.annual.dhiKwhPerM2).toBeCloseTo(dhi, 3)
    expect(report.dryBulbC.mean).toBeCloseTo(mean, 3)
    expect(report.dryBulbC.min).toBe(min)
    expect(report.rowsRead).toBe(8760)
    expect(report.gaps).toEqual([])
    expect(report.defectHours).toEqual([])
  })

  // Source: pv-reference.json `closure_rms_by_shift_min`, at -60, -30 and 0 minutes from the stamp.
  it.each([
    { id: '723170', rms: [28.2, 1.0, 28.0] },
    { id: '722740', rms: [44.1, 1.8, 43.8] },
    { id: '725090', rms: [24.3, 1.6, 24.4] },
  ])('$id: closure is best half an hour before the stamp', ({ id, rms }) => {
    const { year, report } = loadWeather(`${id}TYA.CSV`)
    expect(report.closure.rmsWhPerM2).toBeCloseTo(rms[1]!, 1)
    expect(report.closure.agrees).toBe(true)
    const moved = (hours: number) => {
      const { meta } = year
      const utcOffsetHours = meta.utcOffsetHours - hours
      return closureCheck({ ...year, meta: { ...meta, utcOffsetHours } }).rmsWhPerM2
    }
    expect(Math.abs(moved(-0.5) - rms[0]!)).toBeLessThan(0.06)
    expect(Math.abs(moved(0.5) - rms[2]!)).toBeLessThan(0.06)
  })

  it('a file whose clock is an hour off is told by how much', () => {
    const text = readFileSync(weatherPath('723170TYA.CSV'), 'utf8').replace(
      ',NC,-5.0,',
      ',NC,-4.0,',
    )
    const result = readWeather(text)
    if (!result.ok) throw new Error('refused')
    expect(result.report.closure.bestShiftHours).toBe(1)
    expect(result.report.closure.words).toContain('1 hour later')
    expect(result.report.warnings).toContain(result.report.closure.words)
  })

  it('a longitude with the wrong sign is refused', () => {
    const text = readFileSync(weatherPath('723170TYA.CSV'), 'utf8').replace(',-79.950,', ',79.950,')
    const result = readWeather(text)
    expect(result.ok).toBe(false)
  })
})

describe.skipIf(isMissing(weatherPath(SALT_LAKE)))(`Salt Lake City file ${MISSING_NOTE}`, () => {
  // Source: pv-reference.md section 6 and weather/SOURCES.md.
  it('the one defect hour is named: 2003-02-21 18:00, GHI 490', () => {
    const { report } = loadWeather(SALT_LAKE)
    expect(report.defectHours).toHaveLength(1)
    expect(report.defectHours[0]).toMatchObject({
      stamp: '2003-02-21 18:00',
      kind: 'ghi_above_possible',
      found: 490,
    })
    expect(report.warnings.join(' ')).toContain('2003-02-21 18:00')
    expect(report.closure.rmsWhPerM2).toBeCloseTo(4.0, 1)
  })

  it('that hour alone makes the loss at 1.0 on the tracker', () => {
    const { year } = loadWeather(SALT_LAKE)
    const result = estimateYear(year, basePlant('tracker'), [1, 1.2])
    expect(result.annual.dcMaxKw).toBeCloseTo(1.569, 2)
    expect(result.ratios[0]!.clippedFraction * 100).toBeCloseTo(0.0284, 4)
    expect(result.ratios[1]!.clippedFraction * 100).toBeCloseTo(0.0378, 4)
  })
})

describe.skipIf(isMissing(weatherPath(EPW), weatherPath('722740TYA.CSV'), REFERENCE_JSON))(
  `Tucson as EPW and as TMY3 ${MISSING_NOTE}`,
  () => {
    // Source: pv-reference.md section 5.
    it('both files hold the same hours', () => {
      const epw = loadWeather(EPW).year
      const tmy3 = loadWeather('722740TYA.CSV').year
      expect(epw.meta).toMatchObject({ kind: 'epw', stationId: '722740', latitudeDeg: 32.13 })
      for (const key of ['ghi', 'dni', 'dhi', 'dryBulbC', 'windMPerS'] as const) {
        expect(epw[key]).toEqual(tmy3[key])
      }
      expect([...epw.month, ...epw.day, ...epw.hour]).toEqual([
        ...tmy3.month,
        ...tmy3.day,
        ...tmy3.hour,
      ])
    })

    it.each(['fixed', 'tracker'] as MountingName[])('the EPW gives the stated %s year', (name) => {
      const expected = loadReference().epw_check.systems[name].base_perez_ashrae_faiman
      const result = estimateYear(loadWeather(EPW).year, basePlant(name))
      expect(Math.abs(result.annual.poaKwhPerM2 - expected.poa_kwh_m2)).toBeLessThan(0.005)
      expect(Math.abs(result.annual.dcKwh - expected.dc_kwh_per_kwdc)).toBeLessThan(0.005)
      const loss = result.ratios[4]!.clippedFraction * 100
      expect(loss).toBeCloseTo(expected.loss_curve[4]!.clip_loss_pct, 3)
    })
  },
)
