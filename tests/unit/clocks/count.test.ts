import { describe, expect, it } from 'vitest'
import type { DemoCalendar } from '@/db/demo/calendars'
import { businessCalendar, type HolidayRule } from '@/lib/domain/clocks/calendar'
import { dayNumber } from '@/lib/domain/clocks/civil-date'
import { count, type CountInput } from '@/lib/domain/clocks/count'
import { federalCalendar, federalRules } from '@/lib/domain/clocks/library-calendars'
import { calendarOf } from './told'

type Case = [rule: string, calendar: DemoCalendar, input: CountInput, dueOn: string]
const bd = (start: string, length: number, more: Partial<CountInput> = {}): CountInput => ({
  start,
  length,
  unit: 'business_day',
  ...more,
})
const cd = (start: string, length: number, more: Partial<CountInput> = {}): CountInput => ({
  start,
  length,
  unit: 'calendar_day',
  ...more,
})
const months = (start: string, length: number, more: Partial<CountInput> = {}): CountInput => ({
  start,
  length,
  unit: 'month',
  ...more,
})
const before = { direction: 'before' } as const
const next = { roll: 'next_business_day' } as const
const previous = { roll: 'previous_business_day' } as const

const cases: Case[] = [
  [
    'the day of the event does not count, the last day does',
    'federal',
    cd('2026-06-01', 1),
    '2026-06-02',
  ],
  [
    'an opening day that counts makes the clock one day shorter',
    'federal',
    cd('2028-01-18', 45, { includeStart: true }),
    '2028-03-02',
  ],
  [
    'a start on a closed day that counts is no day 1 in business days',
    'federal',
    bd('2026-05-23', 1, { includeStart: true }),
    '2026-05-26',
  ],
  ['no days end on the day itself, open or closed', 'federal', bd('2026-05-23', 0), '2026-05-23'],
  [
    'a calendar day may end on a Sunday where nothing rolls',
    'ave',
    cd('2026-05-08', 30),
    '2026-06-07',
  ],
  [
    'a calendar day that rolls ends on the next business day',
    'cbto',
    cd('2026-05-08', 31, next),
    '2026-06-08',
  ],
  [
    'a raw end on a Saturday rolls back to Friday where it rolls back',
    'federal',
    cd('2026-09-15', 60, previous),
    '2026-11-13',
  ],
  [
    'a roll passes over a closed Friday before a weekend',
    'dml',
    cd('2026-12-01', 30, next),
    '2027-01-04',
  ],
  [
    'Monday 5 July 2027 is closed where the holiday is observed',
    'federal',
    bd('2027-07-02', 1),
    '2027-07-06',
  ],
  ['and open where only the actual date closes', 'tfec', bd('2027-07-02', 1), '2027-07-05'],
  [
    'a utility closed on 24 December and the day after Thanksgiving skips both',
    'ave',
    bd('2026-12-23', 1),
    '2026-12-28',
  ],
  ['31 December counts where only the town is closed', 'ave', bd('2026-12-30', 1), '2026-12-31'],
  ['and does not count in the town', 'dml', bd('2026-12-30', 1), '2027-01-04'],
  ['a storm closure is skipped where it was declared', 'dml', bd('2026-02-23', 1), '2026-02-25'],
  ['and counts everywhere else', 'ave', bd('2026-02-23', 1), '2026-02-24'],
  ['Good Friday is closed where a calendar names it', 'tfec', bd('2026-04-02', 1), '2026-04-06'],
  ['Columbus Day counts where a calendar leaves it out', 'tfec', bd('2026-10-09', 1), '2026-10-12'],
  ['Juneteenth counts where a calendar leaves it out', 'tfec', bd('2026-06-18', 1), '2026-06-19'],

  [
    'an event on a closed day: day 1 is the next business day',
    'federal',
    bd('2026-11-26', 3, { receipt: 'as_is' }),
    '2026-12-01',
  ],
  [
    'an event on a closed day that is received the next: one day later',
    'federal',
    bd('2026-11-26', 3, { receipt: 'next_business_day' }),
    '2026-12-02',
  ],
  [
    'the same convention moves calendar days from a Saturday to Monday',
    'federal',
    cd('2026-06-06', 10, { receipt: 'next_business_day' }),
    '2026-06-18',
  ],
  [
    'an event on a business day is received that day under both',
    'federal',
    bd('2026-06-08', 3, { receipt: 'next_business_day' }),
    '2026-06-11',
  ],

  [
    'twenty business days before pass over Thanksgiving',
    'cbto',
    bd('2026-12-23', 20, before),
    '2026-11-24',
  ],
  [
    'ten business days before a test pass over nothing but weekends',
    'dml',
    bd('2026-12-18', 10, before),
    '2026-12-04',
  ],
  [
    'ten business days before pass over both ends of the year',
    'dml',
    bd('2027-01-15', 10, before),
    '2026-12-30',
  ],
  [
    'thirty calendar days before end on a weekday as counted',
    'cbto',
    cd('2027-01-22', 30, before),
    '2026-12-23',
  ],
  [
    'a backward count on a holiday rolls to the business day before',
    'cbto',
    cd('2027-01-31', 30, { ...before, ...next }),
    '2026-12-31',
  ],
  [
    'and never toward the date it counts from',
    'federal',
    cd('2026-06-17', 10, { ...before, ...next }),
    '2026-06-05',
  ],
  [
    'a backward count without a roll stays on a Sunday',
    'ave',
    cd('2026-06-17', 10, before),
    '2026-06-07',
  ],
  [
    'a receipt rule does not move the date a backward count ends at',
    'federal',
    bd('2026-06-06', 1, { ...before, receipt: 'next_business_day' }),
    '2026-06-05',
  ],

  [
    'a month from the 31st ends on the last day of a shorter month',
    'federal',
    months('2026-01-31', 1),
    '2026-02-28',
  ],
  ['in a leap year that is the 29th', 'federal', months('2028-01-31', 1), '2028-02-29'],
  [
    'a month from the last day of a short month is not the last of the next',
    'federal',
    months('2026-02-28', 1),
    '2026-03-28',
  ],
  [
    'three months from 30 November end in February',
    'federal',
    months('2026-11-30', 3),
    '2027-02-28',
  ],
  ['three months keep the day of the month', 'dml', months('2026-09-11', 3), '2026-12-11'],
  [
    'a month before 31 March is the last of February',
    'federal',
    months('2026-03-31', 1, before),
    '2026-02-28',
  ],
  [
    'months that end on a weekend roll where they roll',
    'federal',
    months('2026-10-15', 4, next),
    '2027-02-16',
  ],
  [
    'a month with the opening day counted ends a day earlier',
    'federal',
    months('2026-01-15', 1, { includeStart: true }),
    '2026-02-14',
  ],
  [
    'a year from 29 February ends on the 28th',
    'federal',
    { start: '2028-02-29', length: 1, unit: 'year' },
    '2029-02-28',
  ],
  [
    'ten years keep day and month',
    'federal',
    { start: '2026-03-01', length: 10, unit: 'year' },
    '2036-03-01',
  ],
]

describe('a clock', () => {
  it.each(cases)('%s', (_, calendar, input, dueOn) => {
    expect(count(input, calendarOf(calendar)).dueOn).toBe(dueOn)
  })

  it.each([-1, 2601, 1.5, Number.NaN])(
    'of %d business days is refused with what is allowed',
    (length) => {
      expect(() => count(bd('2026-06-01', length), federalCalendar)).toThrow(/0 to 2600/)
    },
  )

  it.each(['2026-02-29', '2026-13-01', 'soon', '2026-6-1'])('from "%s" is refused', (start) => {
    expect(() => count(bd(start, 1), federalCalendar)).toThrow(/no date/)
  })
})

const stop = (from: string, to: string) => ({
  stopped: (day: number) =>
    day >= dayNumber(from) && day <= dayNumber(to) ? 'clock stopped' : null,
})

describe('a stopped clock', () => {
  const stops: Case[] = [
    [
      'leaves out the first and the last day of the stop',
      'federal',
      cd('2026-06-01', 10, stop('2026-06-05', '2026-06-08')),
      '2026-06-15',
    ],
    [
      'leaves out the business days of the stop only',
      'federal',
      bd('2026-06-01', 10, stop('2026-06-05', '2026-06-08')),
      '2026-06-17',
    ],
    [
      'stopped on one day loses that day',
      'federal',
      cd('2026-06-01', 10, stop('2026-06-05', '2026-06-05')),
      '2026-06-12',
    ],
    [
      'does not lose what lies after its end',
      'federal',
      cd('2026-06-01', 10, stop('2026-06-12', '2026-06-20')),
      '2026-06-11',
    ],
    [
      'of months gets the stopped days after',
      'federal',
      months('2026-09-11', 3, stop('2026-10-01', '2026-10-10')),
      '2026-12-21',
    ],
    [
      'of months stopped at its end goes on after the stop',
      'federal',
      months('2026-09-11', 3, stop('2026-12-10', '2026-12-12')),
      '2026-12-14',
    ],
    [
      'that rolls does so after the stopped days',
      'federal',
      months('2026-09-11', 3, { ...stop('2026-10-01', '2026-10-01'), ...next }),
      '2026-12-14',
    ],
  ]
  it.each(stops)('%s', (_, calendar, input, dueOn) => {
    expect(count(input, calendarOf(calendar)).dueOn).toBe(dueOn)
  })
})

describe('the derivation', () => {
  const { derivation, account, dayZeroOn } = count(bd('2026-11-20', 5), calendarOf('ave'))

  it('names each day, why it did not count, and the number of each that did', () => {
    expect(derivation[0]).toEqual({
      on: '2026-11-20',
      counted: false,
      reason: 'day 0, the event itself',
    })
    expect(derivation.find((day) => day.on === '2026-11-26')?.reason).toBe('Thanksgiving Day')
    expect(derivation.find((day) => day.on === '2026-11-27')?.reason).toBe('Day after Thanksgiving')
    expect(derivation.filter((day) => day.counted).map((day) => day.reason)).toEqual([
      'day 1',
      'day 2',
      'day 3',
      'day 4',
      'day 5',
    ])
  })

  it('holds each day between start and end exactly once', () => {
    const days = derivation.map((day) => day.on)
    expect(days).toEqual([...new Set(days)].sort())
    expect(days.at(-1)).toBe('2026-12-01')
    expect(dayZeroOn).toBe('2026-11-20')
  })

  it('is told in words with the calendar that counted', () => {
    expect(account).toContain('5 business days from Fri 20 Nov 2026')
    expect(account).toContain('Ambrel Valley Electric Company')
    expect(account).toContain('4 weekend days')
  })

  it('says that the receipt moved day 0', () => {
    const moved = count(bd('2026-05-23', 3, { receipt: 'next_business_day' }), federalCalendar)
    expect(moved.dayZeroOn).toBe('2026-05-26')
    expect(moved.account).toContain('received Sat 23 May 2026, a closed day')
  })
})

describe('a calendar', () => {
  it('works on a day that it takes out of a rule', () => {
    const open = businessCalendar('Open', { ...federalRules, removals: ['2026-10-12'] })
    expect(open.closedBecause('2026-10-12')).toBeNull()
    expect(open.closedBecause('2027-10-11')).toBe('Columbus Day')
  })

  it('has no fifth Monday in a month of four', () => {
    const fifth: HolidayRule = { name: 'Fifth', kind: 'nth_weekday', month: 2, weekday: 1, nth: 5 }
    const calendar = businessCalendar('Fifth', { ...federalRules, holidays: [fifth] })
    expect(calendar.closedBecause('2026-03-02')).toBeNull()
    expect(calendar.closedBecause('2044-02-29')).toBe('Fifth')
  })

  it('without a working weekday is refused', () => {
    const weekend = [0, 1, 2, 3, 4, 5, 6]
    expect(() => businessCalendar('None', { ...federalRules, weekend })).toThrow(
      /no working weekday/,
    )
  })
})
