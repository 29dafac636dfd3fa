import { cosOf, sinOf } from '@/lib/domain/plant/elementary'
import { incidenceModifier } from '@/lib/domain/plant/incidence'
import {
  groundReflected,
  hayDaviesSky,
  isotropicSky,
  perezSky,
} from '@/lib/domain/plant/irradiance'
import type { Mounting, PlaneInputs } from '@/lib/domain/plant/plant'
import { sunYear, type SunYear } from '@/lib/domain/plant/sun'
import { trackerRotation } from '@/lib/domain/plant/tracker'
import type { WeatherYear } from '@/lib/domain/plant/weather-year'

const RAD = Math.PI / 180

/** Irradiance on the modules, hour by hour, Wh/m2. */
export interface PreparedYear {
  weather: WeatherYear
  inputs: PlaneInputs
  sun: SunYear
  /** Rows with any irradiance; every other row is 0 throughout. */
  lit: Uint16Array
  beam: Float64Array
  sky: Float64Array
  ground: Float64Array
  /** Beam, sky and ground together, before incidence loss. */
  poa: Float64Array
  /** After incidence loss, which is taken from the beam only. */
  effective: Float64Array
  /** Cosine of the angle of incidence; 0 while the sun is down. */
  cosIncidence: Float64Array
}

/** Orientation of the plane in one hour, reused between hours. */
interface Plane {
  cosTilt: number
  sinTilt: number
  cosIncidence: number
}

type Orient = (plane: Plane, east: number, north: number, up: number) => void

/**
 * Sun position and irradiance on the plane for every hour of a weather year.
 * With the sun down at mid-hour the beam is dropped, the sky is isotropic and a tracker lies flat.
 * Pass `sun` to reuse positions of the same weather year.
 */
export function prepareYear(
  weather: WeatherYear,
  inputs: PlaneInputs,
  sun: SunYear = sunYear(weather),
): PreparedYear {
  const prepared = emptyPrepared(weather, inputs, sun)
  const orient = orientation(inputs.mounting)
  const plane: Plane = { cosTilt: 1, sinTilt: 0, cosIncidence: 0 }
  for (const i of prepared.lit) {
    if (sun.up[i]! > 0) {
      orient(plane, sun.east[i]!, sun.north[i]!, sun.up[i]!)
      sunlitHour(prepared, i, plane)
    } else {
      orient(plane, 0, 0, 0)
      darkHour(prepared, i, plane)
    }
  }
  return prepared
}

function emptyPrepared(weather: WeatherYear, inputs: PlaneInputs, sun: SunYear): PreparedYear {
  const count = weather.hour.length
  const lit: number[] = []
  for (let i = 0; i < count; i++) {
    if (weather.ghi[i] !== 0 || weather.dni[i] !== 0 || weather.dhi[i] !== 0) lit.push(i)
  }
  return {
    weather,
    inputs,
    sun,
    lit: Uint16Array.from(lit),
    beam: new Float64Array(count),
    sky: new Float64Array(count),
    ground: new Float64Array(count),
    poa: new Float64Array(count),
    effective: new Float64Array(count),
    cosIncidence: new Float64Array(count),
  }
}

function sunlitHour(out: PreparedYear, i: number, plane: Plane): void {
  const { weather, inputs, sun } = out
  const dni = weather.dni[i]!
  const beam = dni * Math.max(plane.cosIncidence, 0)
  const sky = skyDiffuse(out, i, plane, sun.extraterrestrial[i]!)
  const ground = groundReflected(weather.ghi[i]!, inputs.albedo, plane.cosTilt)
  const passed = beam > 0 ? beam * incidenceModifier(inputs.incidence, plane.cosIncidence) : 0
  out.cosIncidence[i] = plane.cosIncidence
  store(out, i, beam, sky, ground, passed)
}

function darkHour(out: PreparedYear, i: number, plane: Plane): void {
  const sky = isotropicSky(out.weather.dhi[i]!, plane.cosTilt)
  const ground = groundReflected(out.weather.ghi[i]!, out.inputs.albedo, plane.cosTilt)
  store(out, i, 0, sky, ground, 0)
}

function store(
  out: PreparedYear,
  i: number,
  beam: number,
  sky: number,
  ground: number,
  passed: number,
): void {
  out.beam[i] = beam
  out.sky[i] = sky
  out.ground[i] = ground
  out.poa[i] = beam + sky + ground
  out.effective[i] = passed + sky + ground
}

function skyDiffuse(out: PreparedYear, i: number, plane: Plane, extraterrestrial: number): number {
  const dhi = out.weather.dhi[i]!
  const dni = out.weather.dni[i]!
  const { cosTilt, sinTilt, cosIncidence } = plane
  const up = out.sun.up[i]!
  switch (out.inputs.transposition) {
    case 'perez_1990':
      return perezSky(dhi, dni, extraterrestrial, up, cosIncidence, cosTilt, sinTilt)
    case 'hay_davies_1980':
      return hayDaviesSky(dhi, dni, extraterrestrial, up, cosIncidence, cosTilt)
    case 'isotropic':
      return isotropicSky(dhi, cosTilt)
  }
}

/** How a mounting turns the sun's direction into a plane; a zero vector means the sun is down. */
function orientation(mounting: Mounting): Orient {
  return mounting.kind === 'fixed'
    ? fixedPlane(mounting.tiltDeg, mounting.azimuthDeg)
    : trackingPlane(mounting)
}

function fixedPlane(tiltDeg: number, azimuthDeg: number): Orient {
  const cosTilt = cosOf(tiltDeg * RAD)
  const sinTilt = sinOf(tiltDeg * RAD)
  const east = sinTilt * sinOf(azimuthDeg * RAD)
  const north = sinTilt * cosOf(azimuthDeg * RAD)
  return (plane, sunEast, sunNorth, sunUp) => {
    plane.cosTilt = cosTilt
    plane.sinTilt = sinTilt
    plane.cosIncidence = clampUnit(sunEast * east + sunNorth * north + sunUp * cosTilt)
  }
}

function trackingPlane(tracker: Extract<Mounting, { kind: 'single_axis_tracker' }>): Orient {
  const axisCos = cosOf(tracker.axisAzimuthDeg * RAD)
  const axisSin = sinOf(tracker.axisAzimuthDeg * RAD)
  const maxRotation = tracker.maxRotationDeg * RAD
  const { groundCoverRatio, backtrack } = tracker
  return (plane, sunEast, sunNorth, sunUp) => {
    const cross = sunEast * axisCos - sunNorth * axisSin
    const rotation =
      sunUp > 0 ? trackerRotation(cross, sunUp, groundCoverRatio, maxRotation, backtrack) : 0
    const sinRotation = sinOf(rotation)
    plane.cosTilt = cosOf(rotation)
    plane.sinTilt = Math.abs(sinRotation)
    plane.cosIncidence = clampUnit(cross * sinRotation + sunUp * plane.cosTilt)
  }
}

function clampUnit(value: number): number {
  return value > 1 ? 1 : value < -1 ? -1 : value
}
