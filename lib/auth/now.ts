/**
 * The instant of this request. Tests may move it: LINESIDE_NOW_OFFSET_SECONDS counts outside
 * production, or where LINESIDE_TEST=1 says that a production build is under test.
 */
export function requestNow(): Date {
  const offset = Number(process.env.LINESIDE_NOW_OFFSET_SECONDS ?? 0)
  const isTestable = process.env.NODE_ENV !== 'production' || process.env.LINESIDE_TEST === '1'
  return new Date(Date.now() + (isTestable && Number.isFinite(offset) ? offset * 1000 : 0))
}
