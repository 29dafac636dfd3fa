import { acosOf, atan2Of, cosOf, sinOf } from '@/lib/domain/plant/elementary'

const RAD = Math.PI / 180

/** Horizontal single-axis tracker on level ground. */
export interface TrackerGeometry {
  axisAzimuthDeg: number
  maxRotationDeg: number
  groundCoverRatio: number
  backtrack: boolean
}

/**
 * Rotation of a horizontal single-axis tracker, radians. With an axis azimuth of 180 positive
 * faces west. `cross` is the sun's component across the axis, `up` the cosine of the zenith.
 * Source: true tracking and backtracking after Lorenzo, Narvarte & Munoz (2011) and
 * Anderson & Mikofski (2020), NREL/TP-5K00-76626; no row shades another, ground level.
 */
export function trackerRotation(
  cross: number,
  up: number,
  groundCoverRatio: number,
  maxRotationRad: number,
  backtrack: boolean,
): number {
  let rotation = atan2Of(cross, up)
  if (backtrack) {
    const share = Math.abs(cosOf(rotation)) / groundCoverRatio
    if (share < 1) rotation -= Math.sign(rotation) * acosOf(share)
  }
  return Math.min(Math.max(rotation, -maxRotationRad), maxRotationRad)
}

/** Rotation in degrees for a sun given by apparent zenith and azimuth in degrees. */
export function trackerRotationDeg(
  zenithDeg: number,
  azimuthDeg: number,
  tracker: TrackerGeometry,
): number {
  const cross = sinOf(zenithDeg * RAD) * sinOf((azimuthDeg - tracker.axisAzimuthDeg) * RAD)
  const rotation = trackerRotation(
    cross,
    cosOf(zenithDeg * RAD),
    tracker.groundCoverRatio,
    tracker.maxRotationDeg * RAD,
    tracker.backtrack,
  )
  return rotation / RAD
}

/** Tilt and azimuth of the plane at a rotation, degrees. */
export function trackerPlane(
  rotationDeg: number,
  axisAzimuthDeg: number,
): { tiltDeg: number; azimuthDeg: number } {
  const turn = rotationDeg === 0 ? 0 : rotationDeg > 0 ? 90 : -90
  return { tiltDeg: Math.abs(rotationDeg), azimuthDeg: (axisAzimuthDeg + turn + 360) % 360 }
}

/** Angle of incidence, degrees, for a sun and a plane in degrees. Source: Duffie & Beckman. */
export function incidenceAngleDeg(
  zenithDeg: number,
  azimuthDeg: number,
  tiltDeg: number,
  planeAzimuthDeg: number,
): number {
  const cosine =
    cosOf(zenithDeg * RAD) * cosOf(tiltDeg * RAD) +
    sinOf(zenithDeg * RAD) * sinOf(tiltDeg * RAD) * cosOf((azimuthDeg - planeAzimuthDeg) * RAD)
  return acosOf(Math.min(Math.max(cosine, -1), 1)) / RAD
}
