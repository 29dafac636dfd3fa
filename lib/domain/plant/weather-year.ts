/** Where a weather year came from. A synthetic year is invented and stays marked everywhere. */
export type WeatherKind = 'tmy3' | 'epw' | 'synthetic'

/** Heading of a weather year. Longitude east positive, offset of local standard time. */
export interface WeatherMeta {
  stationId: string
  name: string
  region: string
  latitudeDeg: number
  longitudeDeg: number
  elevationM: number
  utcOffsetHours: number
  kind: WeatherKind
}

/**
 * 8,760 hours. Row n covers the 60 minutes before its stamp (`hour` 1 to 24, hour-ending, local
 * standard time, on the calendar day `year`-`month`-`day`). Irradiance is Wh/m2 in that hour.
 */
export interface WeatherYear {
  meta: WeatherMeta
  year: Int16Array
  month: Uint8Array
  day: Uint8Array
  hour: Uint8Array
  ghi: Float64Array
  dni: Float64Array
  dhi: Float64Array
  dryBulbC: Float64Array
  windMPerS: Float64Array
}

/** One thing wrong with a file. `row` counts lines from 1; `column` is the name or position read. */
export interface WeatherIssue {
  row: number | null
  column: string | null
  found: string
  allowed: string
  message: string
}

/** How the file's clock agrees with the sun: shift that would fit best, and how well. */
export interface ClosureCheck {
  hoursTested: number
  /** Root mean square of GHI - (DNI cosZ + DHI) over hours with GHI > 50, as stamped. */
  rmsWhPerM2: number
  bestShiftHours: number
  bestRmsWhPerM2: number
  hoursOver100: number
  agrees: boolean
  words: string
}

/** One hour that cannot be right, kept in the year and named for the reader. */
export interface DefectHour {
  row: number
  stamp: string
  kind: 'ghi_above_possible' | 'dni_above_extraterrestrial'
  found: number
  allowed: number
  message: string
}

export interface WeatherReport {
  rowsRead: number
  gaps: string[]
  /** Missing hours filled in by a straight line; irradiance is never filled. */
  missingHours: { dryBulb: number; wind: number }
  /** Rows whose source flag on a value read is "?" (TMY3). */
  flaggedHours: number
  annual: { ghiKwhPerM2: number; dniKwhPerM2: number; dhiKwhPerM2: number }
  dryBulbC: { mean: number; min: number; max: number }
  meanWindMPerS: number
  /** Year printed most often in each month, January first. */
  sourceYears: number[]
  closure: ClosureCheck
  defectHours: DefectHour[]
  warnings: string[]
}

export type WeatherResult =
  | { ok: true; year: WeatherYear; report: WeatherReport }
  | { ok: false; errors: WeatherIssue[]; truncated: boolean }

export const HOURS_PER_YEAR = 8760

/** An issue list stops here; the reader says that more were found. */
export const WEATHER_ISSUE_CAP = 50

/** Empty year of 8,760 hours under a heading. */
export function emptyWeatherYear(meta: WeatherMeta): WeatherYear {
  const floats = () => new Float64Array(HOURS_PER_YEAR)
  return {
    meta,
    year: new Int16Array(HOURS_PER_YEAR),
    month: new Uint8Array(HOURS_PER_YEAR),
    day: new Uint8Array(HOURS_PER_YEAR),
    hour: new Uint8Array(HOURS_PER_YEAR),
    ghi: floats(),
    dni: floats(),
    dhi: floats(),
    dryBulbC: floats(),
    windMPerS: floats(),
  }
}

/** `2003-02-21 18:00`, hour-ending, of a row. */
export function stampOf(year: WeatherYear, index: number): string {
  const two = (value: number) => String(value).padStart(2, '0')
  const on = `${year.year[index]}-${two(year.month[index]!)}-${two(year.day[index]!)}`
  return `${on} ${two(year.hour[index]!)}:00`
}
