import { daysInMonth, expectedStamp } from '@/lib/domain/plant/calendar-day'
import {
  HOURS_PER_YEAR,
  WEATHER_ISSUE_CAP,
  type WeatherIssue,
  type WeatherYear,
} from '@/lib/domain/plant/weather-year'

/** Issues of a file, kept up to the cap; `truncated` says that more were found. */
export class IssueList {
  readonly items: WeatherIssue[] = []
  truncated = false

  add(row: number | null, column: string | null, found: string, allowed: string): void {
    if (this.items.length >= WEATHER_ISSUE_CAP) {
      this.truncated = true
      return
    }
    const shown = found.length > 60 ? `${found.slice(0, 60)}…` : found
    const place = [row === null ? null : `Row ${row}`, column].filter(Boolean).join(', ')
    const message = `${place === '' ? 'File' : place}: found ${shown === '' ? 'nothing' : shown}, allowed ${allowed}.`
    this.items.push({ row, column, found: shown, allowed, message })
  }

  get failed(): boolean {
    return this.items.length > 0
  }
}

/** What one weather column may hold. Values at `missing` count as not there. */
export interface ValueRule {
  key: 'ghi' | 'dni' | 'dhi' | 'dryBulbC' | 'windMPerS'
  label: string
  min: number
  max: number
  unit: string
  missing: (value: number) => boolean
}

/** A row's stamp as read: civil date and hour-ending hour (0 stands for a midnight written 0:00). */
export interface RowStamp {
  year: number
  month: number
  day: number
  hour: number
}

/** Cells of a line of comma-separated text, quotes taken off. */
export function cellsOf(line: string): string[] {
  if (!line.includes('"')) return line.split(',')
  const cells: string[] = []
  let cell = ''
  let quoted = false
  for (const character of line) {
    if (character === '"') quoted = !quoted
    else if (character === ',' && !quoted) {
      cells.push(cell)
      cell = ''
    } else cell += character
  }
  cells.push(cell)
  return cells
}

/** Number in a cell, NaN where it is blank or no number. */
export function numberIn(cell: string | undefined): number {
  if (cell === undefined || cell.trim() === '') return Number.NaN
  return Number(cell)
}

/** A number of the heading, with an issue where it is absent or out of range. */
export function headingNumber(
  issues: IssueList,
  cell: string | undefined,
  column: string,
  min: number,
  max: number,
): number {
  const value = numberIn(cell)
  if (!(value >= min && value <= max)) {
    issues.add(1, column, cell?.trim() ?? '', `a number from ${min} to ${max}`)
  }
  return value
}

/** Reads one value of a row into the year; missing ones become NaN, wrong ones an issue. */
export function readValue(
  year: WeatherYear,
  index: number,
  row: number,
  cell: string | undefined,
  rule: ValueRule,
  issues: IssueList,
): void {
  const value = numberIn(cell)
  if (rule.missing(value) || (Number.isNaN(value) && (cell ?? '').trim() === '')) {
    year[rule.key][index] = Number.NaN
    return
  }
  if (!(value >= rule.min && value <= rule.max)) {
    issues.add(row, rule.label, cell!.trim(), `${rule.min} to ${rule.max} ${rule.unit}`)
  }
  year[rule.key][index] = value
}

/**
 * Places rows by their stamps. The first row must be 1 January 01:00 and each the next hour; a jump
 * ahead is a gap, a step back a repeated or misplaced row. Both are issues, read on after them.
 */
export class StampSequence {
  readonly gaps: string[] = []
  private next = 0

  /** Index of the row in the year, or -1 where it has no place. */
  place(stamp: RowStamp, row: number, issues: IssueList): number {
    const index = this.indexOf(stamp)
    if (index === this.next) {
      this.next++
      return index
    }
    const found = `${stamp.month}/${stamp.day} ${stamp.hour}:00`
    if (index < 0 || index < this.next) {
      issues.add(row, 'date and time', found, `${this.describe(this.next)}, the hour that follows`)
      return -1
    }
    const missing = index - this.next
    const gap = `${missing} h from ${this.describe(this.next)}`
    this.gaps.push(gap)
    issues.add(row, 'date and time', found, `${this.describe(this.next)} (${gap} missing)`)
    this.next = index + 1
    return index
  }

  /** After the last row: the hours missing at the end are an issue. */
  finish(rows: number, issues: IssueList): void {
    if (this.next < HOURS_PER_YEAR) {
      this.gaps.push(`${HOURS_PER_YEAR - this.next} h from ${this.describe(this.next)}`)
      issues.add(null, null, `${rows} hourly rows, ending early`, `${HOURS_PER_YEAR} rows`)
    } else if (rows !== HOURS_PER_YEAR) {
      issues.add(null, null, `${rows} hourly rows`, `${HOURS_PER_YEAR} rows`)
    }
  }

  private indexOf({ month, day, hour }: RowStamp): number {
    if (hour === 0) return this.midnight(month, day)
    if (!(month >= 1 && month <= 12) || !(hour >= 1 && hour <= 24)) return -1
    if (!(day >= 1 && day <= daysInMonth(month))) return -1
    let days = day - 1
    for (let m = 1; m < month; m++) days += daysInMonth(m)
    return days * 24 + hour - 1
  }

  /** Midnight written 0:00, on the day that ends or the day that begins. */
  private midnight(month: number, day: number): number {
    const expected = expectedStamp(this.next % HOURS_PER_YEAR)
    if (expected.hour !== 24) return -1
    const after = expectedStamp((this.next + 1) % HOURS_PER_YEAR)
    const ends = month === expected.month && day === expected.day
    const begins = month === after.month && day === after.day
    return ends || begins ? this.next : -1
  }

  private describe(index: number): string {
    const { month, day, hour } = expectedStamp(index % HOURS_PER_YEAR)
    return `${month}/${day} ${hour}:00`
  }
}

/**
 * Fills missing values (NaN) by a straight line between neighbors; returns how many there were.
 * More than 48 in a row, or none to lean on, is an issue.
 */
export function fillMissing(
  values: Float64Array,
  rule: Pick<ValueRule, 'label'>,
  issues: IssueList,
): number {
  let missing = 0
  for (let i = 0; i < values.length; i++) {
    if (!Number.isNaN(values[i]!)) continue
    let end = i
    while (end < values.length && Number.isNaN(values[end]!)) end++
    const length = end - i
    missing += length
    if (length > 48) issues.add(null, rule.label, `${length} hours in a row missing`, 'up to 48')
    const before = i > 0 ? values[i - 1]! : values[end]!
    const after = end < values.length ? values[end]! : before
    for (let k = 0; k < length; k++) {
      values[i + k] = before + ((after - before) * (k + 1)) / (length + 1)
    }
    i = end
  }
  return missing
}

/** Missing irradiance is never invented: each hour of it is an issue. */
export function refuseMissing(
  values: Float64Array,
  rule: Pick<ValueRule, 'label' | 'min' | 'max' | 'unit'>,
  firstRow: number,
  issues: IssueList,
): void {
  for (let i = 0; i < values.length; i++) {
    if (Number.isNaN(values[i]!)) {
      const allowed = `a measured or modeled value, ${rule.min} to ${rule.max} ${rule.unit}`
      issues.add(firstRow + i, rule.label, 'a missing value', allowed)
    }
  }
}
