import { describe, expect, it } from 'vitest'
import { distanceKm } from '@/lib/domain/distance'
import { outOfStepWords, poiMegawatts, revisionStateWords } from '@/lib/domain/exhibits'

const inStep = {
  designNo: 3,
  latestDesign: { no: 3, on: '10 May' },
  exportLimitMw: 48,
  poiMw: 48,
  termsOn: '2 Feb',
}

describe('a revision and what it is held against', () => {
  it.each([
    ['the same design and terms', {}, null],
    ['a later design', { latestDesign: { no: 4, on: '30 Nov' } }, 'design revision 4 of 30 Nov'],
    ['no megawatts in the terms', { poiMw: null }, null],
    [
      'other megawatts',
      { poiMw: 45 },
      'the request says 45 MWac at the POI since 2 Feb, this one 48',
    ],
    [
      'both',
      { latestDesign: { no: 4, on: '30 Nov' }, poiMw: 45, termsOn: null },
      'design revision 4 of 30 Nov; the request says 45 MWac at the POI, this one 48',
    ],
  ])('with %s', (_name, change, words) =>
    expect(outOfStepWords({ ...inStep, ...change })).toBe(words),
  )

  it.each([
    ['draft', false, null, 'draft, to be checked'],
    [
      'checked',
      false,
      'design revision 4 of 30 Nov',
      'checked, to be issued, out of step: design revision 4 of 30 Nov',
    ],
    ['issued', true, null, 'issued'],
    [
      'issued',
      true,
      'design revision 4 of 30 Nov',
      'issued, out of step: design revision 4 of 30 Nov',
    ],
    ['superseded', true, null, 'superseded by a later issue'],
    ['superseded', false, null, 'set aside, never issued'],
  ] as const)('%s, issued before %s, out of step %s', (state, wasIssued, outOfStep, words) =>
    expect(revisionStateWords({ state, wasIssued, outOfStep })).toBe(words),
  )

  it('counts the furthest known megawatts', () => {
    expect(poiMegawatts({ requestedMw: 50, studiedMw: 48 })).toBe(48)
    expect(poiMegawatts({ requestedMw: 50, grantedMw: 45, studiedMw: 48 })).toBe(45)
    expect(poiMegawatts({})).toBeNull()
  })
})

// One degree of a great circle is the radius times pi / 180: 111.195 km (arithmetic, no source).
describe('distance', () => {
  it.each([
    ['one degree of latitude', [40, -100], [41, -100], 111.195],
    ['one degree of longitude on the equator', [0, 10], [0, 11], 111.195],
    ['the same place', [39.4, -111.2], [39.4, -111.2], 0],
    ['over the date line', [0, 179.5], [0, -179.5], 111.195],
  ])('%s', (_name, a, b, km) => {
    const place = ([latitudeDeg, longitudeDeg]: number[]) => ({
      latitudeDeg: latitudeDeg!,
      longitudeDeg: longitudeDeg!,
    })
    expect(distanceKm(place(a), place(b))).toBeCloseTo(km, 2)
  })
})
