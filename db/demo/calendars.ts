import type { CalendarRules, HolidayRule } from '@/lib/domain/clocks/calendar'
import {
  dayAfterThanksgiving,
  federalHolidays,
  federalRules,
} from '@/lib/domain/clocks/library-calendars'

const fixed = (name: string, month: number, day: number): HolidayRule => ({
  name,
  kind: 'fixed',
  month,
  day,
  shift: 'none',
})

const christmasEve = fixed('Christmas Eve', 12, 24)

const aveHolidays: HolidayRule[] = [...federalHolidays, dayAfterThanksgiving, christmasEve]

const onActualDate = (rule: HolidayRule): HolidayRule =>
  rule.kind === 'fixed' ? { ...rule, shift: 'none' } : rule

const tfecHolidays: HolidayRule[] = [
  ...federalHolidays
    .filter((rule) => rule.name !== 'Juneteenth' && rule.name !== 'Columbus Day')
    .map(onActualDate),
  { name: 'Good Friday', kind: 'easter', plusDays: -2 },
  dayAfterThanksgiving,
]

export type DemoCalendar = 'federal' | 'ave' | 'cbto' | 'dml' | 'tfec'

/** The calendars of the invented organizations of the demonstration. */
export const demoCalendars: Record<DemoCalendar, { name: string; rules: CalendarRules }> = {
  federal: { name: 'Federal, as observed', rules: federalRules },
  ave: {
    name: 'Ambrel Valley Electric Company',
    rules: {
      weekend: [0, 6],
      holidays: aveHolidays,
      closures: [],
      source: 'Invented: federal as observed, the day after Thanksgiving, 24 December',
    },
  },
  cbto: {
    name: 'Cinder Basin Transmission Operator',
    rules: { ...federalRules, source: 'Invented: federal as observed, nothing else' },
  },
  dml: {
    name: 'Dunmarrow Municipal Light',
    rules: {
      weekend: [0, 6],
      holidays: [...aveHolidays, fixed('New Year’s Eve', 12, 31)],
      closures: [{ on: '2026-02-24', name: 'Storm closure' }],
      source:
        'Invented: federal as observed, the day after Thanksgiving, 24 and 31 December, one storm closure',
    },
  },
  tfec: {
    name: 'Three Furrows Electric Cooperative',
    rules: {
      weekend: [0, 6],
      holidays: tfecHolidays,
      closures: [],
      source:
        'Invented: federal on the actual date without Juneteenth and Columbus Day, Good Friday, the day after Thanksgiving',
    },
  },
}
