import { acosOf, cosOf, expOf, powOf } from '@/lib/domain/plant/elementary'
import { dayNumber, daysInMonth, expectedStamp } from '@/lib/domain/plant/calendar-day'
import { airMass } from '@/lib/domain/plant/irradiance'
import { sunYear, type SunYear } from '@/lib/domain/plant/sun'
import { refused } from '@/lib/domain/plant/weather-assemble'
import { checkWeather } from '@/lib/domain/plant/weather-check'
import { IssueList } from '@/lib/domain/plant/weather-rows'
import {
  emptyWeatherYear,
  HOURS_PER_YEAR,
  type WeatherMeta,
  type WeatherResult,
  type WeatherYear,
} from '@/lib/domain/plant/weather-year'

/** Mean of one month: global horizontal in kWh/m2 a day, dry bulb in C, wind in m/s. */
export interface MonthlyMean {
  ghiKwhPerM2Day: number
  dryBulbC: number
  windMPerS: number
}

export interface SyntheticInputs {
  site: Omit<WeatherMeta, 'kind'>
  /** January to December. */
  months: readonly MonthlyMean[]
}

/** Printed in every row; any year without 29 February would do. */
const YEAR = 2001
/** Clearest day against the clear-sky formula. */
const CLEAREST = 1.03
/** Steps of additive sequences that fill an interval evenly (inverses of the golden and plastic ratios). */
const STEPS = { sky: 0.6180339887, hour: 0.7548776662, warm: 0.5698402909, wind: 0.3819660113 }

/**
 * An invented hourly year that meets twelve monthly means of GHI, temperature and wind. No
 * randomness: days follow an evenly filling sequence, so the same inputs give the same hours.
 *
 * Clear-sky GHI: Haurwitz (1945). Diffuse share: Erbs, Klein & Duffie (1982), the beam held below
 * the clear-sky beam of Meinel & Meinel (1976). The mix of clear and cloudy days and the daily
 * course of temperature and wind are plain assumptions without a source. Marked `synthetic`.
 * Twelve months that the sun cannot give at this latitude are an issue.
 */
export function syntheticYear(inputs: SyntheticInputs): WeatherResult {
  const issues = new IssueList()
  if (inputs.months.length !== 12) {
    issues.add(null, 'months', `${inputs.months.length} months`, '12 months')
    return refused(issues)
  }
  const year = stampedYear({ ...inputs.site, kind: 'synthetic' })
  const sun = sunYear(year, { everyHour: true })
  for (let month = 1; month <= 12; month++) {
    fillMonth(year, sun, month, inputs.months[month - 1]!, issues)
  }
  if (issues.failed) return refused(issues)
  const counts = { missing: { dryBulb: 0, wind: 0 }, flaggedHours: 0, gaps: [] }
  const report = checkWeather(year, counts, issues)
  return issues.failed ? refused(issues) : { ok: true, year, report }
}

function stampedYear(meta: WeatherMeta): WeatherYear {
  const year = emptyWeatherYear(meta)
  for (let i = 0; i < HOURS_PER_YEAR; i++) {
    const { month, day, hour } = expectedStamp(i)
    year.year[i] = YEAR
    year.month[i] = month
    year.day[i] = day
    year.hour[i] = hour
  }
  return year
}

function fillMonth(
  year: WeatherYear,
  sun: SunYear,
  month: number,
  mean: MonthlyMean,
  issues: IssueList,
): void {
  const first = (dayNumber(YEAR, month, 1) - dayNumber(YEAR, 1, 1)) * 24
  const hours = daysInMonth(month) * 24
  const clear = clearSkySum(sun, first, hours)
  const wanted = mean.ghiKwhPerM2Day * 1000 * daysInMonth(month)
  if (wanted > clear * 1.1 || !(wanted > clear * 0.05)) {
    const most = ((clear * 1.1) / 1000 / daysInMonth(month)).toFixed(2)
    const least = ((clear * 0.05) / 1000 / daysInMonth(month)).toFixed(2)
    const allowed = `${least} to ${most} kWh/m2 a day at this latitude`
    issues.add(null, `GHI of month ${month}`, String(mean.ghiKwhPerM2Day), allowed)
    return
  }
  fillGlobal(year, sun, first, hours, wanted, clear)
  splitGlobal(year, sun, first, hours)
  fillTemperature(year, first, hours, mean.dryBulbC)
  fillWind(year, first, hours, mean.windMPerS)
}

/** Clear-sky global horizontal, W/m2, by the cosine of the zenith. Source: Haurwitz (1945). */
export function haurwitzClearSky(cosZenith: number): number {
  return cosZenith > 0 ? 1098 * cosZenith * expOf(-0.057 / cosZenith) : 0
}

/** Diffuse share of global by the clearness index. Source: Erbs, Klein & Duffie (1982). */
export function erbsDiffuseFraction(kt: number): number {
  if (kt <= 0.22) return 1 - 0.09 * kt
  if (kt > 0.8) return 0.165
  return 0.9511 + kt * (-0.1604 + kt * (4.388 + kt * (-16.638 + kt * 12.336)))
}

function clearSkySum(sun: SunYear, first: number, hours: number): number {
  let sum = 0
  for (let i = first; i < first + hours; i++) sum += haurwitzClearSky(sun.up[i]!)
  return sum
}

/** Clear days are many where the mean is high; the month's sum is met exactly. */
function fillGlobal(
  year: WeatherYear,
  sun: SunYear,
  first: number,
  hours: number,
  wanted: number,
  clear: number,
): void {
  const meanIndex = wanted / clear
  const clearest = Math.max(CLEAREST, meanIndex * 1.01)
  const exponent = clearest / meanIndex - 1
  for (let i = first; i < first + hours; i++) {
    const dayIndex = clearest * powOf(spread(Math.floor(i / 24), STEPS.sky), exponent)
    const swing = 0.6 * Math.min(dayIndex, clearest - dayIndex)
    const index = dayIndex + swing * (spread(i, STEPS.hour) - 0.5)
    year.ghi[i] = index * haurwitzClearSky(sun.up[i]!)
  }
  scaleBelow(year.ghi, sun, first, hours, wanted, clearest)
}

/** Scales toward the wanted sum without passing the clearest sky, in a few rounds. */
function scaleBelow(
  ghi: Float64Array,
  sun: SunYear,
  first: number,
  hours: number,
  wanted: number,
  clearest: number,
): void {
  for (let round = 0; round < 20; round++) {
    const factor = wanted / sumOf(ghi, first, hours)
    for (let i = first; i < first + hours; i++) {
      ghi[i] = Math.min(ghi[i]! * factor, clearest * haurwitzClearSky(sun.up[i]!))
    }
  }
}

/** Beam and diffuse from global, closing exactly: GHI = DNI cosZ + DHI. */
function splitGlobal(year: WeatherYear, sun: SunYear, first: number, hours: number): void {
  for (let i = first; i < first + hours; i++) {
    const up = sun.up[i]!
    const global = year.ghi[i]!
    if (up <= 0 || global <= 0) continue
    const normal = sun.extraterrestrial[i]!
    const diffuse = global * erbsDiffuseFraction(global / (normal * up))
    const clearBeam = normal * powOf(0.7, powOf(airMass(acosOf(up)), 0.678))
    const beam = Math.min((global - diffuse) / up, clearBeam)
    year.dni[i] = beam
    year.dhi[i] = global - beam * up
  }
}

/** Daily course with its peak at 15:00, wider on clear days, and warmer and cooler days. */
function fillTemperature(year: WeatherYear, first: number, hours: number, mean: number): void {
  for (let i = first; i < first + hours; i++) {
    const day = Math.floor(i / 24)
    const swing = 4 + 4 * spread(day, STEPS.sky)
    const drift = 6 * (spread(day, STEPS.warm) - 0.5)
    year.dryBulbC[i] = drift + swing * dailyCourse(year.hour[i]!)
  }
  const offset = mean - sumOf(year.dryBulbC, first, hours) / hours
  for (let i = first; i < first + hours; i++) year.dryBulbC[i]! += offset
}

function fillWind(year: WeatherYear, first: number, hours: number, mean: number): void {
  for (let i = first; i < first + hours; i++) {
    const day = 0.6 + 0.8 * spread(Math.floor(i / 24), STEPS.wind)
    year.windMPerS[i] = day * (1 + 0.35 * dailyCourse(year.hour[i]!))
  }
  const factor = (mean * hours) / sumOf(year.windMPerS, first, hours)
  for (let i = first; i < first + hours; i++) year.windMPerS[i]! *= factor
}

/** 1 at the hour that ends at 15:00, -1 twelve hours away. */
function dailyCourse(hour: number): number {
  return cosOf((2 * Math.PI * (hour - 15)) / 24)
}

/** Evenly filling value between 0 and 1 at a position. */
function spread(position: number, step: number): number {
  return ((position + 0.5) * step) % 1
}

function sumOf(values: Float64Array, first: number, count: number): number {
  let sum = 0
  for (let i = first; i < first + count; i++) sum += values[i]!
  return sum
}
