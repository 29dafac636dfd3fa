import { assembleYear, linesOf, MAX_ROWS, refused } from '@/lib/domain/plant/weather-assemble'
import {
  cellsOf,
  headingNumber,
  IssueList,
  type RowStamp,
  type ValueRule,
} from '@/lib/domain/plant/weather-rows'
import type { WeatherMeta, WeatherResult } from '@/lib/domain/plant/weather-year'

const isMissing = (value: number) => value <= -9900

/** Columns by name, so that an extra column or another order does no harm. */
const COLUMNS: { heading: RegExp; rule: ValueRule }[] = [
  {
    heading: /^GHI \(/i,
    rule: { key: 'ghi', label: 'GHI', min: 0, max: 1600, unit: 'Wh/m2', missing: isMissing },
  },
  {
    heading: /^DNI \(/i,
    rule: { key: 'dni', label: 'DNI', min: 0, max: 1500, unit: 'Wh/m2', missing: isMissing },
  },
  {
    heading: /^DHI \(/i,
    rule: { key: 'dhi', label: 'DHI', min: 0, max: 1000, unit: 'Wh/m2', missing: isMissing },
  },
  {
    heading: /^Dry-bulb \(/i,
    rule: { key: 'dryBulbC', label: 'Dry-bulb', min: -70, max: 60, unit: 'C', missing: isMissing },
  },
  {
    heading: /^Wspd \(/i,
    rule: { key: 'windMPerS', label: 'Wspd', min: 0, max: 60, unit: 'm/s', missing: isMissing },
  },
]

/** Whether a text opens like a TMY3 file: the second line names a date and a time column. */
export function looksLikeTmy3(lines: string[]): boolean {
  return /^"?Date \(MM\/DD\/YYYY\)"?,"?Time/i.test(lines[1] ?? '')
}

/**
 * Reads a TMY3 file: heading, column names, 8,760 hour-ending rows in local standard time.
 * Copies saved again by a spreadsheet (1/1/2004, 1:00, CRLF, trailing commas) are accepted.
 * The albedo column is not read: it holds 0.00 where albedo was not measured.
 * Source: Wilcox & Marion (2008), Users Manual for TMY3 Data Sets, NREL/TP-581-43156.
 */
export function readTmy3(text: string): WeatherResult {
  const issues = new IssueList()
  const lines = linesOf(text)
  const meta = headingOf(cellsOf(lines[0] ?? ''), issues)
  const names = cellsOf(lines[1] ?? '').map((name) => name.trim())
  const at = (heading: RegExp) => names.findIndex((name) => heading.test(name))
  const columns = COLUMNS.map(({ heading, rule }) => ({ rule, position: at(heading) }))
  for (const { rule, position } of columns) {
    if (position < 0) issues.add(2, rule.label, 'no such column', `a column named ${rule.label}`)
  }
  if (issues.failed) return refused(issues)
  const doubtful = columns.map(({ position }) => position + 1)
  return assembleYear(
    meta,
    {
      firstRow: 3,
      lines: lines.slice(2, 2 + MAX_ROWS),
      columns,
      stampOf,
      stampAllowed: 'MM/DD/YYYY and HH:00',
      isFlagged: (cells) => doubtful.some((position) => cells[position]?.trim() === '?'),
    },
    issues,
  )
}

function headingOf(cells: string[], issues: IssueList): WeatherMeta {
  return {
    stationId: cells[0]?.trim() ?? '',
    name: cells[1]?.trim() ?? '',
    region: cells[2]?.trim() ?? '',
    utcOffsetHours: headingNumber(issues, cells[3], 'UTC offset', -12, 14),
    latitudeDeg: headingNumber(issues, cells[4], 'latitude', -90, 90),
    longitudeDeg: headingNumber(issues, cells[5], 'longitude', -180, 180),
    elevationM: headingNumber(issues, cells[6], 'elevation', -430, 6000),
    kind: 'tmy3',
  }
}

const DATE = /^\s*"?(\d{1,2})\/(\d{1,2})\/(\d{4})"?\s*$/
const TIME = /^\s*"?(\d{1,2}):00(?::00)?"?\s*$/

function stampOf(cells: string[]): RowStamp | null {
  const date = DATE.exec(cells[0] ?? '')
  const time = TIME.exec(cells[1] ?? '')
  if (date === null || time === null) return null
  const [, month, day, year] = date
  return { year: Number(year), month: Number(month), day: Number(day), hour: Number(time[1]) }
}
