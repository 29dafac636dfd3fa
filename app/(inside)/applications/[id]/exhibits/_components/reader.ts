import { civilDateAt, formatShortDate } from '@/lib/domain/format-date'

/** Who looks at the page, and what this person may do. */
export interface Reader {
  id: string
  zone: string
  todayOn: string
  mayPrepare: boolean
  mayCheck: boolean
  mayIssue: boolean
}

/** A frozen calculation to choose from. */
export interface CalculationChoice {
  no: number
  designNo: number
  synthetic: boolean
  weatherName: string
  recordedAt: string
}

/** The day of an instant as this person reads it: "30 Nov". */
export function dayWords(at: string, { zone, todayOn }: Reader): string {
  return formatShortDate(civilDateAt(at, zone), todayOn)
}

/** The ends of a SHA-256, enough to compare by eye. */
export function shortHash(sha256: string): string {
  return `${sha256.slice(0, 4)}…${sha256.slice(-4)}`
}
