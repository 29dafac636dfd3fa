import Holidays from 'date-holidays'
import { describe, expect, it } from 'vitest'
import { easterSunday, holidaysIn } from '@/lib/domain/clocks/calendar'
import { addDays, weekdayOf } from '@/lib/domain/clocks/civil-date'
import { federalCalendar, federalHolidays } from '@/lib/domain/clocks/library-calendars'
import { easterSundays, observedFederalDates, observedFederalHolidays } from './federal-holidays'

const years = Object.keys(observedFederalHolidays).map(Number)
const isWeekday = (on: string) => ![0, 6].includes(weekdayOf(on))

describe('federal holidays as observed, 5 U.S.C. 6103 and E.O. 11582', () => {
  it.each(years)('%i closes exactly the weekdays of the table', (year) => {
    const made = [...holidaysIn(federalHolidays, year).keys()].sort()
    expect(made).toEqual(observedFederalHolidays[year]!.map((day) => `${year}-${day}`))
  })

  it('the table holds 89 weekdays, and the calendar closes on no other', () => {
    expect(observedFederalDates).toHaveLength(89)
    const table = new Set(observedFederalDates)
    for (let on = '2025-01-01'; on <= '2032-12-31'; on = addDays(on, 1))
      if (isWeekday(on)) expect(federalCalendar.closedBecause(on) !== null, on).toBe(table.has(on))
  })

  it('New Year on a Saturday closes 31 December of the year before, under its name', () => {
    expect(federalCalendar.closedBecause('2027-12-31')).toBe("New Year's Day, observed")
    expect(federalCalendar.closedBecause('2032-12-31')).toBe("New Year's Day, observed")
  })

  it('Juneteenth closes from 2021 on, the year of its act', () => {
    expect(federalCalendar.closedBecause('2020-06-19')).toBeNull()
    expect(federalCalendar.closedBecause('2021-06-18')).toBe('Juneteenth, observed')
  })
})

// Source: date-holidays 3.37.0, country US, type public, the substitute day where it gives one.
describe('the federal calendar beside the npm library date-holidays', () => {
  /** The library gives Veterans Day no substitute day; 6103(b) does. */
  const onlyOurs = ['2028-11-10', '2029-11-12']
  const theirs = (year: number) =>
    new Holidays('US')
      .getHolidays(year)
      .filter((day) => day.type === 'public')
      .map((day) => day.date.slice(0, 10))
      .filter(isWeekday)

  it.each(years)('%i differs in the observed Veterans Days only', (year) => {
    const ours = observedFederalDates.filter((on) => on.startsWith(String(year)))
    const listed = new Set(theirs(year))
    expect(ours.filter((on) => !listed.has(on))).toEqual(
      onlyOurs.filter((on) => on.startsWith(String(year))),
    )
    expect([...listed].filter((on) => !ours.includes(on))).toEqual([])
  })
})

// Source: published tables of the Gregorian calendar (from memory).
describe('Easter Sunday', () => {
  it.each(Object.entries(easterSundays))('%s falls on %s', (year, day) => {
    expect(easterSunday(Number(year))).toBe(`${year}-${day}`)
  })

  it('is a Sunday from 22 March to 25 April in every year from 1900 to 2199', () => {
    for (let year = 1900; year < 2200; year += 1) {
      const on = easterSunday(year)
      expect(weekdayOf(on), on).toBe(0)
      expect(on.slice(5) >= '03-22' && on.slice(5) <= '04-25', on).toBe(true)
    }
  })
})
