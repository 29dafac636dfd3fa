import { describe, expect, it } from 'vitest'
import { prepareYear } from '@/lib/domain/plant/plane'
import { subHourlyAllowance } from '@/lib/domain/plant/sub-hourly'
import { planeInputsOf } from '@/lib/domain/plant/year'
import { basePlant, isMissing, loadWeather, MISSING_NOTE, STATION_FILES } from './reference-files'

// Source: pv-reference.md section 8, own check 2, column "full" (percentage points), base case.
// Tolerance 0.05 points: the reference does not say where a partly cloudy hour begins.
const POINTS = 0.05
const rows = [
  { id: '723170', mounting: 'fixed', full: [0.402, 1.173, 2.321] },
  { id: '723170', mounting: 'tracker', full: [0.026, 0.937, 2.298] },
  { id: '722740', mounting: 'fixed', full: [0.646, 1.756, 2.673] },
  { id: '722740', mounting: 'tracker', full: [0.751, 2.013, 3.153] },
  { id: '725090', mounting: 'fixed', full: [0.564, 1.398, 2.299] },
  { id: '725090', mounting: 'tracker', full: [0.105, 1.101, 2.346] },
] as const

describe.skipIf(isMissing(...STATION_FILES))(`loss within the hour ${MISSING_NOTE}`, () => {
  it.each(rows)('$id $mounting: the two-state bound at 1.3, 1.4 and 1.5 agrees', (row) => {
    const plant = basePlant(row.mounting)
    const prepared = prepareYear(loadWeather(`${row.id}TYA.CSV`).year, planeInputsOf(plant))
    row.full.forEach((points, k) => {
      const one = { ...plant, inverterAcKw: 1 / [1.3, 1.4, 1.5][k]! }
      const bound = subHourlyAllowance(prepared, one)
      expect(Math.abs(bound.highPoints - points)).toBeLessThan(POINTS)
      expect(bound.lowPoints).toBe(bound.highPoints / 2)
    })
  })

  it('a plant whose limits are never reached loses nothing within the hour', () => {
    const plant = { ...basePlant('fixed'), inverterAcKw: 2 }
    const prepared = prepareYear(loadWeather('723170TYA.CSV').year, planeInputsOf(plant))
    expect(subHourlyAllowance(prepared, plant).highPoints).toBe(0)
  })
})
