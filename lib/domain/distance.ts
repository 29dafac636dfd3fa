export interface Place {
  latitudeDeg: number
  longitudeDeg: number
}

/** Mean radius of the earth, km. Source: IUGG mean radius R1. */
const EARTH_RADIUS_KM = 6371.0088

/** Great-circle distance between two places, km, by the haversine formula (published, public domain). */
export function distanceKm(a: Place, b: Place): number {
  const rad = (deg: number) => (deg * Math.PI) / 180
  const half = (from: number, to: number) => Math.sin(rad(to - from) / 2) ** 2
  const h =
    half(a.latitudeDeg, b.latitudeDeg) +
    Math.cos(rad(a.latitudeDeg)) *
      Math.cos(rad(b.latitudeDeg)) *
      half(a.longitudeDeg, b.longitudeDeg)
  return 2 * EARTH_RADIUS_KM * Math.asin(Math.min(1, Math.sqrt(h)))
}
