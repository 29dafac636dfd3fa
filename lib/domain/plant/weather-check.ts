import { sunYear, type SunYear } from '@/lib/domain/plant/sun'
import { SunTrack } from '@/lib/domain/plant/sun-track'
import type { IssueList } from '@/lib/domain/plant/weather-rows'
import {
  stampOf,
  type ClosureCheck,
  type DefectHour,
  type WeatherReport,
  type WeatherYear,
} from '@/lib/domain/plant/weather-year'

/** Closure is tested where there is light enough to tell, Wh/m2. */
const CLOSURE_FROM_GHI = 50
/** Root mean square past which the three components do not belong together, Wh/m2. */
const CLOSURE_LIMIT = 100
/** Below this no shifted clock can fit better, Wh/m2. */
const CLOSURE_SURE = 10
const SHIFTS = [-0.5, 0.5, -1, 1, -1.5, 1.5, -2, 2]
const DEFECT_CAP = 50

/** What the reader already counted. */
export interface ReadCounts {
  missing: { dryBulb: number; wind: number }
  flaggedHours: number
  gaps: string[]
}

/**
 * Report of a year that was read: sums, extremes, source years, closure, defect hours, warnings.
 * Components that agree with the sun at no clock shift are issues, not warnings.
 */
export function checkWeather(
  year: WeatherYear,
  counts: ReadCounts,
  issues: IssueList,
): WeatherReport {
  const closure = closureCheck(year)
  refuseNonsense(year, closure, issues)
  const defectHours = findDefectHours(year, sunYear(year))
  const report: WeatherReport = {
    rowsRead: year.hour.length,
    gaps: counts.gaps,
    missingHours: counts.missing,
    flaggedHours: counts.flaggedHours,
    annual: {
      ghiKwhPerM2: sum(year.ghi) / 1000,
      dniKwhPerM2: sum(year.dni) / 1000,
      dhiKwhPerM2: sum(year.dhi) / 1000,
    },
    dryBulbC: {
      mean: sum(year.dryBulbC) / year.dryBulbC.length,
      min: year.dryBulbC.reduce((low, value) => Math.min(low, value)),
      max: year.dryBulbC.reduce((high, value) => Math.max(high, value)),
    },
    meanWindMPerS: sum(year.windMPerS) / year.windMPerS.length,
    sourceYears: sourceYears(year),
    closure,
    defectHours,
    warnings: [],
  }
  report.warnings.push(...warningsOf(report))
  return report
}

/**
 * How well GHI agrees with DNI cosZ + DHI, as stamped and with the clock moved by up to 2 h.
 * The right half-hour is unmistakable in a sound file (pv-reference.md section 6).
 */
export function closureCheck(year: WeatherYear): ClosureCheck {
  const track = new SunTrack()
  const asStamped = residual(year, 0, track)
  let bestShiftHours = 0
  let bestRms = asStamped.rms
  for (const shift of asStamped.rms < CLOSURE_SURE ? [] : SHIFTS) {
    const { rms } = residual(year, shift, track)
    if (rms < bestRms - 1) {
      bestRms = rms
      bestShiftHours = shift
    }
  }
  const agrees = bestShiftHours === 0 && bestRms <= CLOSURE_LIMIT
  return {
    hoursTested: asStamped.hours,
    rmsWhPerM2: asStamped.rms,
    bestShiftHours,
    bestRmsWhPerM2: bestRms,
    hoursOver100: asStamped.over100,
    agrees,
    words: closureWords(bestShiftHours, asStamped.rms, bestRms),
  }
}

function residual(year: WeatherYear, shiftHours: number, track: SunTrack) {
  const sun = sunYear(year, { shiftHours, track })
  const { ghi, dni, dhi } = year
  let squares = 0
  let hours = 0
  let over100 = 0
  for (let i = 0; i < ghi.length; i++) {
    if (ghi[i]! <= CLOSURE_FROM_GHI) continue
    const difference = ghi[i]! - dni[i]! * Math.max(sun.up[i]!, 0) - dhi[i]!
    squares += difference * difference
    hours++
    if (Math.abs(difference) > 100) over100++
  }
  return { rms: hours > 0 ? Math.sqrt(squares / hours) : 0, hours, over100 }
}

function closureWords(shift: number, rms: number, bestRms: number): string {
  const stamped = `${rms.toFixed(1)} Wh/m2 as stamped`
  if (bestRms > CLOSURE_LIMIT) {
    return `GHI, DNI and DHI agree with the sun at no clock shift within 2 h (${stamped}, ${bestRms.toFixed(1)} at best).`
  }
  if (shift === 0) return `The clock agrees with the sun (closure ${stamped}).`
  const size = Math.abs(shift) === 1 ? '1 hour' : `${Math.abs(shift)} hours`
  const direction = shift > 0 ? 'later' : 'earlier'
  return `The sun fits best ${size} ${direction} than the stamps say (closure ${stamped}, ${bestRms.toFixed(1)} so moved): check hour-ending stamps, daylight saving time and UTC offset.`
}

function refuseNonsense(year: WeatherYear, closure: ClosureCheck, issues: IssueList): void {
  const annual = sum(year.ghi) / 1000
  if (annual < 300 || annual > 3200) {
    issues.add(null, 'GHI', `${annual.toFixed(0)} kWh/m2 in the year`, '300 to 3200 kWh/m2')
    return
  }
  if (closure.bestRmsWhPerM2 <= CLOSURE_LIMIT) return
  const exchanged = exchangedColumns(year, closure.bestRmsWhPerM2)
  const found = exchanged ?? `a closure error of ${closure.bestRmsWhPerM2.toFixed(0)} Wh/m2`
  issues.add(
    null,
    'GHI, DNI, DHI',
    found,
    `GHI within ${CLOSURE_LIMIT} Wh/m2 (rms) of DNI cosZ + DHI at the latitude, longitude and UTC offset of the heading`,
  )
}

/** Which two columns, exchanged, would agree; null where no exchange helps. */
function exchangedColumns(year: WeatherYear, rms: number): string | null {
  const { ghi, dni, dhi } = year
  const trials: [string, WeatherYear][] = [
    ['GHI and DNI', { ...year, ghi: dni, dni: ghi }],
    ['DNI and DHI', { ...year, dni: dhi, dhi: dni }],
    ['GHI and DHI', { ...year, ghi: dhi, dhi: ghi }],
  ]
  const track = new SunTrack()
  for (const [names, trial] of trials) {
    const tried = residual(trial, 0, track).rms
    if (tried < CLOSURE_LIMIT / 2 && tried < rms / 2) return `${names} exchanged`
  }
  return null
}

/** Hours above what the sun can give: GHI > 1.25 I0 cosZ + 50, or DNI > I0. */
export function findDefectHours(year: WeatherYear, sun: SunYear): DefectHour[] {
  const defects: DefectHour[] = []
  for (let i = 0; i < year.ghi.length && defects.length < DEFECT_CAP; i++) {
    const normal = sun.extraterrestrial[i]!
    const possible = 1.25 * normal * Math.max(sun.up[i]!, 0) + 50
    if (year.ghi[i]! > possible) defects.push(defect(year, i, 'ghi_above_possible', possible))
    if (year.dni[i]! > normal) defects.push(defect(year, i, 'dni_above_extraterrestrial', normal))
  }
  return defects
}

function defect(year: WeatherYear, i: number, kind: DefectHour['kind'], limit: number): DefectHour {
  const isGhi = kind === 'ghi_above_possible'
  const found = isGhi ? year.ghi[i]! : year.dni[i]!
  const what = isGhi ? 'GHI' : 'DNI'
  const stamp = stampOf(year, i)
  const message = `${stamp}: ${what} ${found} Wh/m2, at most ${limit.toFixed(0)} possible with this sun.`
  return { row: i + 1, stamp, kind, found, allowed: Math.round(limit), message }
}

/** Year printed at mid-month, January first. */
function sourceYears(year: WeatherYear): number[] {
  const years = new Array<number>(12).fill(0)
  for (let i = 0; i < year.hour.length; i++) {
    if (year.day[i] === 15) years[year.month[i]! - 1] = year.year[i]!
  }
  return years
}

function warningsOf(report: WeatherReport): string[] {
  const { missingHours, defectHours, closure, flaggedHours } = report
  const warnings: string[] = []
  if (!closure.agrees) warnings.push(closure.words)
  if (missingHours.dryBulb > 0) warnings.push(`${missingHours.dryBulb} h of dry bulb filled in.`)
  if (missingHours.wind > 0) warnings.push(`${missingHours.wind} h of wind filled in.`)
  if (flaggedHours > 0) warnings.push(`${flaggedHours} h carry the source flag "?".`)
  warnings.push(...defectHours.slice(0, 5).map((hour) => hour.message))
  if (defectHours.length > 5) warnings.push(`${defectHours.length - 5} further defect hours.`)
  return warnings
}

function sum(values: Float64Array): number {
  let total = 0
  for (const value of values) total += value
  return total
}
