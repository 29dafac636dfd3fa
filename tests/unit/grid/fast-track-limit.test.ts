import { describe, expect, test } from 'vitest'
import { fastTrackLimitMw } from '@/lib/domain/grid/fast-track-limit'

// Source: FERC Order 792 (2013), SGIP section 2.1, eligibility table; cell values from memory.
const table = [
  { kv: 4.16, anywhere: 0.5, mainline: 0.5 },
  { kv: 5, anywhere: 2, mainline: 3 },
  { kv: 13.2, anywhere: 2, mainline: 3 },
  { kv: 14.99, anywhere: 2, mainline: 3 },
  { kv: 15, anywhere: 3, mainline: 4 },
  { kv: 24.9, anywhere: 3, mainline: 4 },
  { kv: 30, anywhere: 4, mainline: 5 },
  { kv: 34.5, anywhere: 4, mainline: 5 },
  { kv: 69, anywhere: 4, mainline: 5 },
  { kv: 69.1, anywhere: null, mainline: null },
]

describe('the reach of the federal fast track', () => {
  test.each(table)('at $kv kV: $anywhere MW anywhere, $mainline MW on a mainline', (row) => {
    expect(fastTrackLimitMw(row.kv, false)).toBe(row.anywhere)
    expect(fastTrackLimitMw(row.kv, true)).toBe(row.mainline)
  })

  test('a voltage that is none is refused in words', () => {
    expect(() => fastTrackLimitMw(0, true)).toThrow('Found 0 kV')
    expect(() => fastTrackLimitMw(NaN, true)).toThrow('above 0 kV')
  })
})
