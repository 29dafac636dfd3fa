import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import type { DemoCalendar } from '@/db/demo/calendars'
import { addDays, daysBetween } from '@/lib/domain/clocks/civil-date'
import { count } from '@/lib/domain/clocks/count'
import {
  easterSundays,
  observedFederalDates,
  thanksgivings,
} from '../../reference/clocks/federal-holidays'
import { calendarOf } from './told'

const years = [2025, 2026, 2027, 2028, 2029, 2030, 2031, 2032]
const eachYear = (...days: string[]) => years.flatMap((year) => days.map((day) => `${year}-${day}`))
const dayAfter = (on: string) => new Date(Date.parse(on) + 86_400_000).toISOString().slice(0, 10)
const fridayBefore = (on: string) =>
  new Date(Date.parse(on) - 2 * 86_400_000).toISOString().slice(0, 10)
const goodFridays = years.map((year) => fridayBefore(`${year}-${easterSundays[year]}`))
const moved = /-(01-01|06-1[89]|07-0[345]|11-1[012]|12-2[4-6]|12-31)$/
const columbusDays = observedFederalDates.filter((on) => /-10-/.test(on))

/** Closed weekdays typed or derived from the table, not from the rules under test. */
const closed: Record<DemoCalendar, Set<string>> = {
  federal: new Set(observedFederalDates),
  cbto: new Set(observedFederalDates),
  ave: new Set([...observedFederalDates, ...thanksgivings.map(dayAfter), ...eachYear('12-24')]),
  dml: new Set([
    ...observedFederalDates,
    ...thanksgivings.map(dayAfter),
    ...eachYear('12-24', '12-31'),
    '2026-02-24',
  ]),
  tfec: new Set([
    ...observedFederalDates.filter((on) => !moved.test(on) && !columbusDays.includes(on)),
    ...eachYear('01-01', '07-04', '11-11', '12-25'),
    ...goodFridays,
    ...thanksgivings.map(dayAfter),
  ]),
}
const calendars = Object.keys(closed) as DemoCalendar[]

/** The plainest loop there is: one day after the other, counting those that are open. */
function plainCount(start: string, length: number, way: 1 | -1, days: Set<string>): string {
  let at = Date.parse(start)
  for (let left = length; left > 0;) {
    at += way * 86_400_000
    const day = new Date(at)
    const weekend = day.getUTCDay() === 0 || day.getUTCDay() === 6
    if (!weekend && !days.has(day.toISOString().slice(0, 10))) left -= 1
  }
  return new Date(at).toISOString().slice(0, 10)
}

const aStart = fc.integer({ min: 0, max: 365 * 5 }).map((days) => addDays('2026-01-01', days))
const aLength = fc.integer({ min: 0, max: 60 })
const business = { unit: 'business_day' } as const

describe.each(calendars)('business days by the calendar %s', (key) => {
  const calendar = calendarOf(key)
  const forward = (start: string, length: number) =>
    count({ start, length, ...business }, calendar).dueOn
  const backward = (start: string, length: number) =>
    count({ start, length, ...business, direction: 'before' }, calendar).dueOn

  it('equal a plain loop in 20,000 random cases, forward and backward', () => {
    fc.assert(
      fc.property(aStart, aLength, fc.boolean(), (start, length, back) => {
        const made = back ? backward(start, length) : forward(start, length)
        expect(made).toBe(plainCount(start, length, back ? -1 : 1, closed[key]))
      }),
      { numRuns: 20_000 },
    )
  }, 60_000)

  it('end on a business day', () => {
    fc.assert(
      fc.property(aStart, fc.integer({ min: 1, max: 60 }), (start, length) => {
        expect(calendar.closedBecause(forward(start, length))).toBeNull()
      }),
    )
  })

  it('never end earlier for a later start or a longer clock', () => {
    fc.assert(
      fc.property(aStart, aLength, fc.integer({ min: 0, max: 30 }), (start, length, more) => {
        const due = forward(start, length)
        expect(forward(addDays(start, more), length) >= due).toBe(true)
        expect(forward(start, length + more) >= due).toBe(true)
      }),
    )
  })

  it('forward and then backward come back to a start on a business day', () => {
    fc.assert(
      fc.property(aStart, aLength, (start, length) => {
        fc.pre(calendar.closedBecause(start) === null)
        expect(backward(forward(start, length), length)).toBe(start)
      }),
    )
  })

  it('add up: a clock of both lengths ends where one after the other does', () => {
    fc.assert(
      fc.property(aStart, aLength, aLength, (start, first, second) => {
        expect(forward(forward(start, first), second)).toBe(forward(start, first + second))
      }),
    )
  })

  it('move by the days of a stop and no further back', () => {
    fc.assert(
      fc.property(
        aStart,
        aLength,
        aLength,
        fc.integer({ min: 1, max: 30 }),
        (start, length, lag, stay) => {
          const from = addDays(start, lag + 1)
          const to = addDays(from, stay)
          const stopped = (day: number) => {
            const on = addDays('1970-01-01', day)
            return on >= from && on <= to ? 'clock stopped' : null
          }
          const due = count({ start, length, ...business, stopped }, calendar).dueOn
          const plain = forward(start, length)
          expect(due).toBe(
            plain < from ? plain : plainCount(start, length, 1, closedWith(from, to)),
          )
          expect(due >= plain).toBe(true)
        },
      ),
    )
    function closedWith(from: string, to: string): Set<string> {
      const days = new Set(closed[key])
      for (let on = from; on <= to; on = dayAfter(on)) days.add(on)
      return days
    }
  })
})

describe('calendar days', () => {
  it('are the difference of the dates, whatever the calendar closes', () => {
    fc.assert(
      fc.property(aStart, aLength, (start, length) => {
        const { dueOn } = count({ start, length, unit: 'calendar_day' }, calendarOf('dml'))
        expect(daysBetween(start, dueOn)).toBe(length)
      }),
    )
  })

  it('that roll end on the first business day not before the raw end', () => {
    fc.assert(
      fc.property(aStart, aLength, (start, length) => {
        const calendar = calendarOf('tfec')
        const raw = addDays(start, length)
        const roll = 'next_business_day' as const
        const { dueOn } = count({ start, length, unit: 'calendar_day', roll }, calendar)
        let wanted = raw
        while (calendar.closedBecause(wanted) !== null) wanted = dayAfter(wanted)
        expect(dueOn).toBe(wanted)
      }),
    )
  })
})
