import {
  businessCalendar,
  type CalendarRules,
  type HolidayRule,
} from '@/lib/domain/clocks/calendar'

const shifted = (name: string, month: number, day: number, fromYear?: number): HolidayRule => ({
  name,
  kind: 'fixed',
  month,
  day,
  shift: 'nearest_weekday',
  ...(fromYear !== undefined && { fromYear }),
})
const nth = (name: string, month: number, weekday: number, which: number): HolidayRule => ({
  name,
  kind: 'nth_weekday',
  month,
  weekday,
  nth: which,
})

/** The eleven federal holidays as observed. Source: 5 U.S.C. 6103(a) and (b); E.O. 11582. */
export const federalHolidays: HolidayRule[] = [
  shifted("New Year's Day", 1, 1),
  nth('Birthday of Martin Luther King, Jr.', 1, 1, 3),
  nth("Washington's Birthday", 2, 1, 3),
  { name: 'Memorial Day', kind: 'last_weekday', month: 5, weekday: 1 },
  shifted('Juneteenth', 6, 19, 2021),
  shifted('Independence Day', 7, 4),
  nth('Labor Day', 9, 1, 1),
  nth('Columbus Day', 10, 1, 2),
  shifted('Veterans Day', 11, 11),
  nth('Thanksgiving Day', 11, 4, 4),
  shifted('Christmas Day', 12, 25),
]

export const federalRules: CalendarRules = {
  weekend: [0, 6],
  holidays: federalHolidays,
  closures: [],
  source: '5 U.S.C. 6103(a) and (b); E.O. 11582 for Sundays',
}

/** Federal holidays on the day observed; the calendar named `federal` at every door. */
export const federalCalendar = businessCalendar('Federal, as observed', federalRules)

export const dayAfterThanksgiving: HolidayRule = {
  name: 'Day after Thanksgiving',
  kind: 'nth_weekday',
  month: 11,
  weekday: 4,
  nth: 4,
  plusDays: 1,
}
