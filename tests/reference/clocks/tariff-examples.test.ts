import { existsSync, readFileSync } from 'node:fs'
import { describe, expect, it } from 'vitest'
import { count, type CountInput } from '@/lib/domain/clocks/count'
import { federalCalendar } from '@/lib/domain/clocks/library-calendars'

const path = '../shared/reference/tariff-examples.json'
type Example = CountInput & { id: string; expected: string; note: string }

// Source: tariff-examples.json; each computed by a plain loop and by numpy busday_offset.
describe.skipIf(!existsSync(path))(`worked counts of ${path} (skipped where it is absent)`, () => {
  const examples = existsSync(path) ? (JSON.parse(readFileSync(path, 'utf8')) as Example[]) : []
  it.each(examples)('$id: $note', ({ start, length, unit, roll, expected }) => {
    expect(count({ start, length, unit, roll }, federalCalendar).dueOn).toBe(expected)
  })

  it('names both observed Fridays in the account of a count over a Saturday Christmas', () => {
    const { account } = count(
      { start: '2027-12-20', length: 10, unit: 'business_day' },
      federalCalendar,
    )
    expect(account).toContain('Fri 24 Dec 2027 (Christmas Day, observed)')
    expect(account).toContain("Fri 31 Dec 2027 (New Year's Day, observed)")
  })
})

describe('a receipt on a Saturday before Memorial Day, three business days', () => {
  const saturday = { start: '2026-05-23', length: 3, unit: 'business_day' } as const
  it('counts day 1 on the first business day after the event', () => {
    expect(count({ ...saturday, receipt: 'as_is' }, federalCalendar).dueOn).toBe('2026-05-28')
  })
  it('is one day later where the receipt itself moves to the next business day', () => {
    expect(count({ ...saturday, receipt: 'next_business_day' }, federalCalendar).dueOn).toBe(
      '2026-05-29',
    )
  })
})
