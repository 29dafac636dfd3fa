import { describe, expect, test } from 'vitest'
import {
  civilDateAt,
  formatBusinessDays,
  formatCalendarDays,
  formatClosingHour,
  formatDate,
  formatHour,
  formatInstant,
  formatMonth,
  formatShortDate,
  zoneName,
} from '@/lib/domain/format-date'

describe('dates in words', () => {
  test('a date carries weekday and year', () => {
    expect(formatDate('2026-12-10')).toBe('Thu 10 Dec 2026')
  })

  test('a date in the year of today drops the year', () => {
    expect(formatDate('2026-12-10', '2026-01-31')).toBe('Thu 10 Dec')
    expect(formatDate('2027-01-04', '2026-12-31')).toBe('Mon 4 Jan 2027')
  })

  test('a short date has no weekday, a month no day', () => {
    expect(formatShortDate('2026-09-02', '2026-12-01')).toBe('2 Sep')
    expect(formatShortDate('2029-09-02', '2026-12-01')).toBe('2 Sep 2029')
    expect(formatMonth('2029-09-02')).toBe('Sep 2029')
  })

  test.each(['2026-02-30', '2026-1-4', '20261210', '', '2026-12-10T00:00:00Z'])(
    'what is no civil date is refused and named: "%s"',
    (on) => {
      expect(() => formatDate(on)).toThrow(`Found "${on}"`)
    },
  )

  test.each([
    ['2026-12-11T00:00:00Z', 'America/Denver', '5 pm MT'],
    ['2026-11-30T16:30:00-05:00', 'America/New_York', '4:30 pm ET'],
    ['2026-12-03T22:00:00Z', 'America/Chicago', '4 pm CT'],
    ['2026-07-01T19:00:00Z', 'America/Los_Angeles', 'noon PT'],
    ['2026-07-01T07:05:00Z', 'America/Los_Angeles', '12:05 am PT'],
    ['2026-07-01T19:00:00Z', 'America/Phoenix', 'noon MST'],
  ])('the hour of %s in %s reads %s', (at, zone, words) => {
    expect(formatHour(at, zone)).toBe(words)
  })

  test('the zone has one name in summer and winter', () => {
    expect(zoneName('America/Denver', '2026-07-01T00:00:00Z')).toBe('MT')
    expect(zoneName('America/Denver', '2026-12-01T00:00:00Z')).toBe('MT')
  })

  test('an instant falls on the day of its zone, not of the machine', () => {
    expect(formatInstant('2026-12-11T00:00:00Z', 'America/Denver', '2026-12-01')).toBe(
      'Thu 10 Dec, 5 pm MT',
    )
    expect(civilDateAt('2026-12-11T00:00:00Z', 'America/Denver')).toBe('2026-12-10')
    expect(civilDateAt(new Date('2026-12-11T00:00:00Z'), 'Pacific/Auckland')).toBe('2026-12-11')
  })

  test('an unknown zone is refused and named', () => {
    expect(() => formatHour('2026-12-11T00:00:00Z', 'Mountain')).toThrow('"Mountain"')
  })

  test('a closing hour reads as an hour', () => {
    expect(formatClosingHour('17:00')).toBe('5 pm')
    expect(formatClosingHour('16:30:00')).toBe('4:30 pm')
    expect(() => formatClosingHour('25:00')).toThrow('Found "25:00"')
  })

  test('days are counted in words', () => {
    expect(formatBusinessDays(7)).toBe('7 BD')
    expect(formatCalendarDays(1)).toBe('1 day')
    expect(formatCalendarDays(9)).toBe('9 days')
  })
})
