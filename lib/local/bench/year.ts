import { existsSync, readFileSync } from 'node:fs'
import { prepareYear } from '@/lib/domain/plant/plane'
import type { Plant } from '@/lib/domain/plant/plant'
import { sunYear } from '@/lib/domain/plant/sun'
import { readWeather } from '@/lib/domain/plant/weather'
import type { WeatherYear } from '@/lib/domain/plant/weather-year'
import { estimateYear, planeInputsOf, runYear } from '@/lib/domain/plant/year'

const WARM_UP = 20
const RUNS = 20
const STATION_FILE = new URL('../../../../shared/reference/weather/723170TYA.CSV', import.meta.url)

const PLANT: Plant = {
  dcKw: 62_390,
  inverterAcKw: 58_800,
  inverterEfficiency: 0.987,
  poiLimitKw: 48_000,
  acLossFraction: 0.019,
  mounting: { kind: 'fixed', tiltDeg: 25, azimuthDeg: 180 },
  dcLossFraction: 0.112,
  gammaPerC: -0.003,
  albedo: 0.2,
  transposition: 'perez_1990',
  incidence: 'ashrae',
  cellTemperature: { model: 'faiman', u0: 25, u1: 6.84 },
}

const TRACKER: Plant = {
  ...PLANT,
  mounting: {
    kind: 'single_axis_tracker',
    axisAzimuthDeg: 180,
    maxRotationDeg: 60,
    groundCoverRatio: 0.35,
    backtrack: true,
  },
}

function medianMs(work: () => unknown): number {
  for (let k = 0; k < WARM_UP; k++) work()
  const times: number[] = []
  for (let k = 0; k < RUNS; k++) {
    const start = performance.now()
    work()
    times.push(performance.now() - start)
  }
  times.sort((a, b) => a - b)
  return (times[RUNS / 2 - 1]! + times[RUNS / 2]!) / 2
}

function load(): WeatherYear {
  const result = readWeather(readFileSync(STATION_FILE, 'utf8'))
  if (!result.ok) throw new Error(result.errors.map((issue) => issue.message).join(' '))
  return result.year
}

function report(name: string, work: () => unknown): void {
  console.log(`${name.padEnd(52)} ${medianMs(work).toFixed(2)} ms`)
}

if (existsSync(STATION_FILE)) {
  const weather = load()
  const text = readFileSync(STATION_FILE, 'utf8')
  const sun = sunYear(weather)
  const prepared = prepareYear(weather, planeInputsOf(PLANT), sun)
  console.log(`Year with nine ratios, 8,760 hours, median of ${RUNS} after ${WARM_UP} runs`)
  report('whole year, fixed tilt', () => estimateYear(weather, PLANT))
  report('whole year, single-axis tracker', () => estimateYear(weather, TRACKER))
  report('  sun position', () => sunYear(weather))
  report('  plane of array, sun given', () => prepareYear(weather, planeInputsOf(PLANT), sun))
  report('  chain after the plane (a field moves)', () => runYear(prepared, PLANT))
  report('reading and checking the weather file', () => readWeather(text))
} else {
  console.log(
    `No year to run: ${STATION_FILE.pathname.split('/').slice(-4).join('/')} is not there.`,
  )
}
