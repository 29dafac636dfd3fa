import { describe, expect, it } from 'vitest'
import type { Plant } from '@/lib/domain/plant/plant'
import { estimateInput, plantSchema } from '@/lib/schemas/plant'
import { plant } from './plants'

function messages(change: object): string[] {
  const result = plantSchema.safeParse({ ...plant(), ...change })
  return result.success
    ? []
    : result.error.issues.map((issue) => `${issue.path.join('.')}: ${issue.message}`)
}

describe('the plant schema', () => {
  it('takes a plant that the chain takes, unchanged', () => {
    const parsed: Plant = plantSchema.parse(plant())
    expect(parsed).toEqual(plant())
  })

  it.each([
    [{ dcLossFraction: 1.9 }, 'dcLossFraction: found 1.9, allowed 0 to 1'],
    [{ albedo: -0.1 }, 'albedo: found -0.1, allowed 0 to 1'],
    [{ dcKw: 0 }, 'dcKw: found 0, allowed above 0, up to 5000000 kW'],
    [{ gammaPerC: -0.35 }, 'gammaPerC: found -0.35, allowed -0.01 to 0 per C'],
    [{ inverterEfficiency: 98.7 }, 'inverterEfficiency: found 98.7, allowed 0.8 to 0.999'],
    [{ dcKw: '62 MW' }, 'dcKw: found 62 MW, allowed above 0, up to 5000000 kW'],
    [{ dcKw: undefined }, 'dcKw: found nothing, allowed above 0, up to 5000000 kW'],
    [
      { transposition: 'best' },
      'transposition: found best, allowed perez_1990, hay_davies_1980, isotropic',
    ],
    [
      { mounting: { kind: 'pole' } },
      'mounting.kind: allowed kinds are fixed and single_axis_tracker',
    ],
  ])('%j is refused with what was found and what is allowed', (change, message) => {
    expect(messages(change)).toContain(message)
  })

  it('names all wrong fields at once', () => {
    const wrong = { dcKw: -1, albedo: 3, mounting: { kind: 'fixed', tiltDeg: 120, azimuthDeg: 0 } }
    expect(messages(wrong)).toHaveLength(3)
  })

  it('refuses infinite and absent numbers', () => {
    expect(messages({ poiLimitKw: Infinity })).toHaveLength(1)
    expect(messages({ dcKw: Number.NaN })).toHaveLength(1)
  })

  it('weather is an id or a text with its name, and not both', () => {
    const parse = (weather: object) => estimateInput.safeParse({ weather, plant: plant() }).success
    expect(parse({ id: 'w1' })).toBe(true)
    expect(parse({ text: 'x', fileName: 'a.csv' })).toBe(true)
    expect(parse({ id: 'w1', text: 'x', fileName: 'a.csv' })).toBe(false)
    expect(parse({})).toBe(false)
  })
})
