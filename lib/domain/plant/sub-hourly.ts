import { percentile } from '@/lib/domain/plant/duration'
import { limitHour, type AcSide } from '@/lib/domain/plant/limits'
import type { PreparedYear } from '@/lib/domain/plant/plane'
import type { Plant } from '@/lib/domain/plant/plant'
import { acSideOf, litDcKw } from '@/lib/domain/plant/year'

/** Loss that hourly means hide, in percentage points of `limitedFraction`; not in the totals. */
export interface SubHourlyAllowance {
  /** Half of the partly cloudy hours split into two states. */
  lowPoints: number
  /** All of them. */
  highPoints: number
  account: string
  source: string
}

const CLEAR_SHARE = 0.95
const CLOUD_LEVEL = 0.3

const SOURCE =
  'Two-state bound of our own, no source; direction and size in Mikofski et al. (doi 10.1109/JPHOTOV.2023.3238512) and Kharait et al. 2020 (doi 10.1109/PVSC45281.2020.9300911)'

/**
 * How much more the limits may take within the hour than the hourly mean shows. Each partly cloudy
 * hour is split into a clear level (95th percentile of DC power of that month and hour) and a cloud
 * level (30 % of it) with the same mean (pv-reference.md section 8, own check 2). A synthetic bound,
 * to be shown beside the loss and never added to it.
 */
export function subHourlyAllowance(prepared: PreparedYear, plant: Plant): SubHourlyAllowance {
  const dc = litDcKw(prepared, plant)
  const side = acSideOf(plant)
  const clear = clearLevels(prepared, dc)
  const hourly = { available: 0, exported: 0 }
  const split = { available: 0, exported: 0 }
  for (let k = 0; k < dc.length; k++) {
    const kw = dc[k]!
    const i = prepared.lit[k]!
    const high = clear[slotOf(prepared, i)]!
    const low = high * CLOUD_LEVEL
    add(hourly, kw, 1, side)
    if (kw <= low || kw >= high) {
      add(split, kw, 1, side)
      continue
    }
    const share = (kw - low) / (high - low)
    add(split, high, share, side)
    add(split, low, 1 - share, side)
  }
  const highPoints = Math.max(100 * (lossOf(split) - lossOf(hourly)), 0)
  return { ...allowance(highPoints), source: SOURCE }
}

function allowance(highPoints: number) {
  const lowPoints = highPoints / 2
  const account = `Within the hour the limits may take ${lowPoints.toFixed(1)} to ${highPoints.toFixed(1)} points more than hourly means show; not in the total.`
  return { lowPoints, highPoints, account }
}

interface Sums {
  available: number
  exported: number
}

function add(sums: Sums, kw: number, share: number, side: AcSide): void {
  const hour = limitHour(kw, side)
  sums.available += share * hour.unclippedKw * (1 - side.acLossFraction)
  sums.exported += share * hour.exportKw
}

function lossOf({ available, exported }: Sums): number {
  return available > 0 ? 1 - exported / available : 0
}

function slotOf({ weather }: PreparedYear, i: number): number {
  return (weather.month[i]! - 1) * 24 + weather.hour[i]! - 1
}

/** 95th percentile of DC power of each month and hour, over every day of the month. */
function clearLevels(prepared: PreparedYear, dc: Float64Array): Float64Array {
  const slots = Array.from({ length: 288 }, () => ({ lit: [] as number[], hours: 0 }))
  for (let i = 0; i < prepared.weather.hour.length; i++) slots[slotOf(prepared, i)]!.hours++
  for (let k = 0; k < dc.length; k++) slots[slotOf(prepared, prepared.lit[k]!)]!.lit.push(dc[k]!)
  return Float64Array.from(slots, ({ lit, hours }) =>
    percentile(Float64Array.from(lit).sort(), CLEAR_SHARE, hours - lit.length),
  )
}
