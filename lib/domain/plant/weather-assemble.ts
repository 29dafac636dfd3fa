import { checkWeather } from '@/lib/domain/plant/weather-check'
import {
  fillMissing,
  IssueList,
  readValue,
  refuseMissing,
  StampSequence,
  type RowStamp,
  type ValueRule,
} from '@/lib/domain/plant/weather-rows'
import {
  emptyWeatherYear,
  HOURS_PER_YEAR,
  type WeatherMeta,
  type WeatherResult,
  type WeatherYear,
} from '@/lib/domain/plant/weather-year'

/** How one format lays out its hourly rows. */
export interface RowLayout {
  /** Line of the first hourly row, counted from 1. */
  firstRow: number
  lines: string[]
  /** Position of each value in a row. */
  columns: { rule: ValueRule; position: number }[]
  stampOf: (cells: string[]) => RowStamp | null
  stampAllowed: string
  /** Whether a row carries a doubt flag on one of the values read. */
  isFlagged: (cells: string[]) => boolean
}

/** Reads the hourly rows of either format into a year with its report, or every issue found. */
export function assembleYear(
  meta: WeatherMeta,
  layout: RowLayout,
  issues: IssueList,
): WeatherResult {
  const year = emptyWeatherYear(meta)
  const { flaggedHours, gaps } = readRows(year, layout, issues)
  if (issues.failed) return refused(issues)
  const missing = settleMissing(year, layout, issues)
  if (issues.failed) return refused(issues)
  const report = checkWeather(year, { missing, flaggedHours, gaps }, issues)
  return issues.failed ? refused(issues) : { ok: true, year, report }
}

/** The refusing result with its issues. */
export function refused(issues: IssueList): WeatherResult {
  return { ok: false, errors: issues.items, truncated: issues.truncated }
}

function readRows(year: WeatherYear, layout: RowLayout, issues: IssueList) {
  const sequence = new StampSequence()
  let flaggedHours = 0
  for (let k = 0; k < layout.lines.length && !issues.truncated; k++) {
    const cells = layout.lines[k]!.split(',')
    const row = layout.firstRow + k
    const stamp = layout.stampOf(cells)
    if (stamp === null) {
      issues.add(row, 'date and time', cells.slice(0, 4).join(','), layout.stampAllowed)
      continue
    }
    const index = sequence.place(stamp, row, issues)
    if (index < 0) continue
    storeStamp(year, index, stamp)
    for (const { rule, position } of layout.columns) {
      readValue(year, index, row, cells[position], rule, issues)
    }
    if (layout.isFlagged(cells)) flaggedHours++
  }
  if (!issues.truncated) sequence.finish(layout.lines.length, issues)
  return { flaggedHours, gaps: sequence.gaps }
}

function storeStamp(year: WeatherYear, index: number, stamp: RowStamp): void {
  const dayIndex = index - (index % 24)
  year.hour[index] = (index % 24) + 1
  const sameDay = stamp.hour !== 0 || index === dayIndex
  year.year[index] = sameDay ? stamp.year : year.year[index - 1]!
  year.month[index] = sameDay ? stamp.month : year.month[index - 1]!
  year.day[index] = sameDay ? stamp.day : year.day[index - 1]!
}

function settleMissing(year: WeatherYear, layout: RowLayout, issues: IssueList) {
  const missing = { dryBulb: 0, wind: 0 }
  for (const { rule } of layout.columns) {
    const values = year[rule.key]
    if (rule.key === 'dryBulbC') missing.dryBulb = fillMissing(values, rule, issues)
    else if (rule.key === 'windMPerS') missing.wind = fillMissing(values, rule, issues)
    else refuseMissing(values, rule, layout.firstRow, issues)
  }
  return missing
}

/** Lines of a text without the blank ones at its end. */
export function linesOf(text: string): string[] {
  const lines = text.split(/\r\n|\n|\r/)
  while (lines.length > 0 && lines[lines.length - 1]!.replaceAll(',', '').trim() === '') lines.pop()
  return lines
}

/** Rows past which a file is not read on. */
export const MAX_ROWS = HOURS_PER_YEAR + 48
