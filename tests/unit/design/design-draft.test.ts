import { describe, expect, it } from 'vitest'
import {
  chosen,
  draftOf,
  numberOf,
  readDraft,
  textOf,
  typed,
} from '@/components/design/design-draft'
import { plantFields, startingDesign } from '@/components/design/design-fields'
import { stepped } from '@/components/design/plant-field'

const field = (path: string) =>
  Object.values(plantFields)
    .flat()
    .find((one) => one.path === path)!
const loss = field('acLossFraction')
const strings = field('strings')

describe('a plant being typed', () => {
  it('shows fractions in percent and keeps what was not touched to the last bit', () => {
    const draft = draftOf({ ...startingDesign, acLossFraction: 0.019 })
    expect(textOf(draft, loss)).toBe('1.9')
    const moved = typed(draft, strings, '4,303')
    expect(readDraft(moved).design).toEqual({ ...draft.body, strings: 4303 })
    expect(readDraft(moved).design?.acLossFraction).toBe(0.019)
  })

  it('reads thousands commas and the true minus sign, and no number as none', () => {
    expect(numberOf('4,303')).toBe(4303)
    expect(numberOf('−0.30')).toBe(-0.3)
    expect(numberOf(' ')).toBeNaN()
    expect(numberOf('12 MW')).toBeNaN()
  })

  it('keeps the text of a field that cannot be read, and says what is allowed', () => {
    const draft = typed(draftOf(startingDesign), strings, 'many')
    expect(textOf(draft, strings)).toBe('many')
    const { design, errors } = readDraft(draft)
    expect(design).toBeNull()
    expect(errors.strings).toBe('Found no number, allowed 1 to 500000 strings.')
  })

  it('shows a choice in its plain form, whatever was typed before', () => {
    const tilt = plantFields.fixed[0]!
    const fixed = chosen(draftOf(startingDesign), 'mounting', {
      kind: 'fixed',
      tiltDeg: 25,
      azimuthDeg: 180,
    })
    const again = chosen(typed(fixed, tilt, '30'), 'mounting', fixed.body.mounting)
    expect(textOf(again, tilt)).toBe('25')
  })

  it.each([
    ['0.95', 1, '0.96'],
    ['4,303', -1, '4,302'],
    ['−0.30', 1, '−0.29'],
    ['many', 1, 'many'],
    ['0', -1, '−1'],
  ])('moves the last digit of %s by %i to %s', (text, by, expected) => {
    expect(stepped(text, by)).toBe(expected)
  })
})
