import { assembleYear, linesOf, MAX_ROWS, refused } from '@/lib/domain/plant/weather-assemble'
import {
  cellsOf,
  headingNumber,
  IssueList,
  numberIn,
  type RowStamp,
  type ValueRule,
} from '@/lib/domain/plant/weather-rows'
import type { WeatherMeta, WeatherResult } from '@/lib/domain/plant/weather-year'

/** Positions count from 0; missing values as the format states them. */
const COLUMNS: { position: number; rule: ValueRule }[] = [
  {
    position: 13,
    rule: { key: 'ghi', label: 'GHI', min: 0, max: 1600, unit: 'Wh/m2', missing: (v) => v >= 9999 },
  },
  {
    position: 14,
    rule: { key: 'dni', label: 'DNI', min: 0, max: 1500, unit: 'Wh/m2', missing: (v) => v >= 9999 },
  },
  {
    position: 15,
    rule: { key: 'dhi', label: 'DHI', min: 0, max: 1000, unit: 'Wh/m2', missing: (v) => v >= 9999 },
  },
  {
    position: 6,
    rule: {
      key: 'dryBulbC',
      label: 'Dry-bulb',
      min: -70,
      max: 60,
      unit: 'C',
      missing: (v) => v === 99.9,
    },
  },
  {
    position: 21,
    rule: {
      key: 'windMPerS',
      label: 'Wind speed',
      min: 0,
      max: 60,
      unit: 'm/s',
      missing: (v) => v === 999,
    },
  },
]

/** Whether a text opens like an EnergyPlus weather file. */
export function looksLikeEpw(lines: string[]): boolean {
  return /^LOCATION,/i.test(lines[0] ?? '')
}

/**
 * Reads an EnergyPlus weather file (EPW): LOCATION and further heading lines up to DATA PERIODS,
 * then 8,760 rows, hour 1 to 24, hour-ending, local standard time. The albedo column is not read.
 * Source: EnergyPlus Auxiliary Programs, weather data format (public documentation).
 */
export function readEpw(text: string): WeatherResult {
  const issues = new IssueList()
  const lines = linesOf(text)
  const meta = headingOf(cellsOf(lines[0] ?? ''), issues)
  const periods = lines.slice(0, 20).findIndex((line) => /^DATA PERIODS,/i.test(line))
  if (periods < 0) {
    issues.add(null, 'DATA PERIODS', 'no such line', 'a line DATA PERIODS within the first 20')
  } else {
    const perHour = lines[periods]!.split(',')[2]
    if (numberIn(perHour) !== 1) {
      issues.add(periods + 1, 'records per hour', perHour?.trim() ?? '', '1')
    }
  }
  if (issues.failed) return refused(issues)
  return assembleYear(
    meta,
    {
      firstRow: periods + 2,
      lines: lines.slice(periods + 1, periods + 1 + MAX_ROWS),
      columns: COLUMNS,
      stampOf,
      stampAllowed: 'year, month, day and hour 1 to 24',
      isFlagged: () => false,
    },
    issues,
  )
}

function headingOf(cells: string[], issues: IssueList): WeatherMeta {
  return {
    stationId: cells[5]?.trim() ?? '',
    name: cells[1]?.trim() ?? '',
    region: cells[2]?.trim() ?? '',
    latitudeDeg: headingNumber(issues, cells[6], 'latitude', -90, 90),
    longitudeDeg: headingNumber(issues, cells[7], 'longitude', -180, 180),
    utcOffsetHours: headingNumber(issues, cells[8], 'UTC offset', -12, 14),
    elevationM: headingNumber(issues, cells[9], 'elevation', -430, 6000),
    kind: 'epw',
  }
}

function stampOf(cells: string[]): RowStamp | null {
  const [year, month, day, hour] = cells.slice(0, 4).map(numberIn) as [
    number,
    number,
    number,
    number,
  ]
  const whole = [year, month, day, hour].every(Number.isInteger)
  return whole && year >= 1900 && year <= 2100 && hour >= 1 ? { year, month, day, hour } : null
}
