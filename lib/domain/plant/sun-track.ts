import { geocentricSun, type GeocentricSun } from '@/lib/domain/plant/sun-geocentric'

/** Days between two computed places. */
const SPACING = 2

/**
 * Geocentric places every other day with cubic interpolation between them, within 1e-5 degree of
 * the full algorithm (a reference test measures it). Keeps what it computed, so one track can serve
 * several passes over the same year.
 */
export class SunTrack {
  private readonly places = new Map<number, GeocentricSun>()
  private readonly around: GeocentricSun[] = []
  private segment = Number.NaN
  private readonly now: GeocentricSun = {
    rightAscension: 0,
    declination: 0,
    siderealCorrection: 0,
    radiusAu: 1,
  }

  /** Place at a Julian day (UT); the same object each time, overwritten by the next call. */
  at(jd: number): GeocentricSun {
    const position = jd / SPACING
    const segment = Math.floor(position)
    if (segment !== this.segment) this.load(segment)
    const t = position - segment
    const [a, b, c, d] = this.around as [GeocentricSun, GeocentricSun, GeocentricSun, GeocentricSun]
    const wa = (-t * (t - 1) * (t - 2)) / 6
    const wb = ((t + 1) * (t - 1) * (t - 2)) / 2
    const wc = (-(t + 1) * t * (t - 2)) / 2
    const wd = ((t + 1) * t * (t - 1)) / 6
    const { now } = this
    now.rightAscension =
      wa * a.rightAscension + wb * b.rightAscension + wc * c.rightAscension + wd * d.rightAscension
    now.declination =
      wa * a.declination + wb * b.declination + wc * c.declination + wd * d.declination
    now.siderealCorrection =
      b.siderealCorrection + t * (c.siderealCorrection - b.siderealCorrection)
    now.radiusAu = b.radiusAu + t * (c.radiusAu - b.radiusAu)
    return now
  }

  /** The four places around a segment, right ascension rising through a full turn. */
  private load(segment: number): void {
    this.segment = segment
    this.around.length = 0
    let before = Number.NEGATIVE_INFINITY
    for (let k = -1; k <= 2; k++) {
      const place = { ...this.place(segment + k) }
      while (place.rightAscension < before - Math.PI) place.rightAscension += 2 * Math.PI
      before = place.rightAscension
      this.around.push(place)
    }
  }

  private place(node: number): GeocentricSun {
    let place = this.places.get(node)
    if (place === undefined) {
      place = geocentricSun(node * SPACING)
      this.places.set(node, place)
    }
    return place
  }
}
