/**
 * Federal holidays as observed, 2025 to 2032. Source: 5 U.S.C. 6103(a) and (b), Saturday to the
 * Friday before; E.O. 11582, Sunday to the Monday after; worked out once by hand and by a
 * general-purpose open-source library of another language, all 89 weekdays equal.
 */
export const observedFederalHolidays: Record<number, string[]> = {
  2025: [
    '01-01',
    '01-20',
    '02-17',
    '05-26',
    '06-19',
    '07-04',
    '09-01',
    '10-13',
    '11-11',
    '11-27',
    '12-25',
  ],
  2026: [
    '01-01',
    '01-19',
    '02-16',
    '05-25',
    '06-19',
    '07-03',
    '09-07',
    '10-12',
    '11-11',
    '11-26',
    '12-25',
  ],
  2027: [
    '01-01',
    '01-18',
    '02-15',
    '05-31',
    '06-18',
    '07-05',
    '09-06',
    '10-11',
    '11-11',
    '11-25',
    '12-24',
    '12-31',
  ],
  2028: ['01-17', '02-21', '05-29', '06-19', '07-04', '09-04', '10-09', '11-10', '11-23', '12-25'],
  2029: [
    '01-01',
    '01-15',
    '02-19',
    '05-28',
    '06-19',
    '07-04',
    '09-03',
    '10-08',
    '11-12',
    '11-22',
    '12-25',
  ],
  2030: [
    '01-01',
    '01-21',
    '02-18',
    '05-27',
    '06-19',
    '07-04',
    '09-02',
    '10-14',
    '11-11',
    '11-28',
    '12-25',
  ],
  2031: [
    '01-01',
    '01-20',
    '02-17',
    '05-26',
    '06-19',
    '07-04',
    '09-01',
    '10-13',
    '11-11',
    '11-27',
    '12-25',
  ],
  2032: [
    '01-01',
    '01-19',
    '02-16',
    '05-31',
    '06-18',
    '07-05',
    '09-06',
    '10-11',
    '11-11',
    '11-25',
    '12-24',
    '12-31',
  ],
}

/** Easter Sunday by published tables of the Gregorian calendar (from memory), 2020 to 2035. */
export const easterSundays: Record<number, string> = {
  2020: '04-12',
  2021: '04-04',
  2022: '04-17',
  2023: '04-09',
  2024: '03-31',
  2025: '04-20',
  2026: '04-05',
  2027: '03-28',
  2028: '04-16',
  2029: '04-01',
  2030: '04-21',
  2031: '04-13',
  2032: '03-28',
  2033: '04-17',
  2034: '04-09',
  2035: '03-25',
}

const datesOf = (table: Record<number, string[]>) =>
  Object.entries(table).flatMap(([year, days]) => days.map((day) => `${year}-${day}`))

export const observedFederalDates = datesOf(observedFederalHolidays)

/** The dates of the table that a rule names each year, for calendars built on the federal one. */
export const thanksgivings = observedFederalDates.filter((on) => /-11-2[2-8]$/.test(on))
