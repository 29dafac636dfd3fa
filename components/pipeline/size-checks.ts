import { decimalOf } from '@/components/pipeline/new-application-draft'
import { fastTrackLimitMw } from '@/lib/domain/grid/fast-track-limit'

/** The key of the library's procedure that the limits of fast track belong to. */
export const fastTrackKey = 'federal_fast_track'

interface TypedSize {
  poiVoltageKv: string
  requestedMw: string
  onMainline: boolean
}

/**
 * What speaks against fast track at this size and voltage, in words; null while it fits or a
 * figure is missing. A hint, never a refusal: the tariff in force decides.
 */
export function fastTrackHint(procedureKey: string | undefined, typed: TypedSize): string | null {
  const kv = decimalOf(typed.poiVoltageKv)
  const mw = decimalOf(typed.requestedMw)
  if (procedureKey !== fastTrackKey || !kv || !mw || !(kv > 0) || !(mw > 0)) return null
  const limitMw = fastTrackLimitMw(kv, typed.onMainline)
  if (limitMw !== null && mw <= limitMw) return null
  const where = typed.onMainline ? `${kv} kV on a mainline` : `${kv} kV`
  const reach =
    limitMw === null
      ? 'Above 69 kV there is no fast track'
      : `At ${where} the fast track reaches ${limitMw} MW`
  return `${reach}; ${mw} MW goes to the study process. Check the tariff in force.`
}

/** "DC/AC 1.25": array at standard test conditions over the limit at the POI; null while one is missing. */
export function ratioHint(typed: { requestedMw: string; dcMw: string }): string | null {
  const mw = decimalOf(typed.requestedMw)
  const dc = decimalOf(typed.dcMw)
  return mw && dc && mw > 0 && dc > 0 ? `DC/AC ${(dc / mw).toFixed(2)} at the POI` : null
}
