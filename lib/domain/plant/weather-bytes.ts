import {
  emptyWeatherYear,
  HOURS_PER_YEAR,
  type WeatherMeta,
  type WeatherYear,
} from '@/lib/domain/plant/weather-year'

const FLOATS = ['ghi', 'dni', 'dhi', 'dryBulbC', 'windMPerS'] as const
const SMALL = ['month', 'day', 'hour'] as const
const HOURS_BYTES = HOURS_PER_YEAR * (FLOATS.length * 8 + 2 + SMALL.length)

/**
 * A weather year as bytes for a browser: length of the heading (uint32), the heading as JSON padded
 * with spaces to eight bytes, GHI, DNI, DHI, dry bulb and wind as float64, the years as int16, then
 * month, day and hour as bytes, all little-endian. No digit is lost.
 */
export function packWeather(year: WeatherYear): Uint8Array<ArrayBuffer> {
  const heading = new TextEncoder().encode(paddedHeading(year.meta))
  const bytes = new Uint8Array(4 + heading.length + HOURS_BYTES)
  new DataView(bytes.buffer).setUint32(0, heading.length, true)
  bytes.set(heading, 4)
  let at = 4 + heading.length
  for (const array of arraysOf(year)) {
    bytes.set(new Uint8Array(array.buffer, array.byteOffset, array.byteLength), at)
    at += array.byteLength
  }
  return bytes
}

/** The year that `packWeather` packed. @throws RangeError for bytes of another length. */
export function unpackWeather(buffer: ArrayBuffer): WeatherYear {
  const headingLength = new DataView(buffer).getUint32(0, true)
  if (buffer.byteLength !== 4 + headingLength + HOURS_BYTES)
    throw new RangeError(`A weather year of ${buffer.byteLength} bytes cannot be read.`)
  const heading = new TextDecoder().decode(new Uint8Array(buffer, 4, headingLength))
  const year = emptyWeatherYear(JSON.parse(heading) as WeatherMeta)
  let at = 4 + headingLength
  for (const array of arraysOf(year)) {
    new Uint8Array(array.buffer).set(new Uint8Array(buffer, at, array.byteLength))
    at += array.byteLength
  }
  return year
}

function arraysOf(year: WeatherYear) {
  return [...FLOATS.map((key) => year[key]), year.year, ...SMALL.map((key) => year[key])] as (
    Float64Array | Int16Array | Uint8Array
  )[]
}

function paddedHeading(meta: WeatherMeta): string {
  const text = JSON.stringify(meta)
  const length = new TextEncoder().encode(text).length
  return text + ' '.repeat((12 - (length % 8)) % 8)
}
