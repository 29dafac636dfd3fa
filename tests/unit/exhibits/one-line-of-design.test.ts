import { describe, expect, it } from 'vitest'
import { demoDesigns } from '@/db/demo/designs'
import { megaOf, oneLineOfDesign, trimmed, windingSymbols } from '@/lib/domain/one-line-of-design'

const design = demoDesigns[0]!.revisions.at(-1)!.body

describe('the one-line of a design', () => {
  it('runs from the array over the transformers to the utility', () => {
    const elements = oneLineOfDesign(design, { poi: 'a bus', poiVoltageKv: 69 })
    expect(elements.map((one) => [one.kind, one.title, one.subtitle])).toEqual([
      ['pv_array', 'PV array', '62.39 MWdc'],
      ['inverter', 'Inverters', '14 × 4.20 MVA'],
      ['transformer', 'Pad-mount', '14 × 4.4 MVA, 5.75 %, 0.69/34.5 kV'],
      ['transformer', 'Main transformer', '36 MVA, 8.5 %, 34.5/69 kV'],
      ['poi', 'POI', '48.0 MWac'],
      ['utility', 'Utility', '69 kV'],
    ])
  })

  it('takes the voltage of the outermost transformer where the request names none', () => {
    expect(oneLineOfDesign(design).at(-1)).toMatchObject({ subtitle: '69 kV' })
    expect(oneLineOfDesign({ ...design, transformers: [] }).at(-1)?.subtitle).toBeUndefined()
  })

  it('draws no protection, meter or disconnect, since a design holds none', () => {
    const kinds = new Set(oneLineOfDesign(design).map((one) => one.kind))
    expect([...kinds]).toEqual(['pv_array', 'inverter', 'transformer', 'poi', 'utility'])
  })
})

// Capital letters of a vector group name the high side: IEC 60076-1 clause 7, from memory.
describe('windings of a vector group', () => {
  it.each([
    ['Dyn', ['Y', 'Δ']],
    ['Dyn11', ['Y', 'Δ']],
    ['YNd1', ['Δ', 'Y']],
    ['YNyn with delta tertiary', ['Y', 'Y']],
    ['Dd0', ['Δ', 'Δ']],
    ['grounded wye', undefined],
    ['', undefined],
  ])('"%s" stands plant side first', (winding, symbols) => {
    expect(windingSymbols(winding)).toEqual(symbols)
  })
})

describe('figures', () => {
  it.each([
    [4200, '4.20'],
    [3150, '3.15'],
    [385, '0.385'],
    [125, '0.125'],
  ])('%d kVA reads %s MVA', (kva, text) => expect(megaOf(kva)).toBe(text))

  it.each([
    [48, 1, '48.0'],
    [2.8, 1, '2.8'],
    [8.5, 0, '8.5'],
    [69, 0, '69'],
    [0.345, 2, '0.345'],
  ])('%d with at least %d decimals reads %s', (value, decimals, text) =>
    expect(trimmed(value, decimals)).toBe(text),
  )
})
