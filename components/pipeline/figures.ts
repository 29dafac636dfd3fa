import type { Pipeline, PipelineRow } from '@/lib/schemas/application'

const smallNumbers = [
  'none',
  'one',
  'two',
  'three',
  'four',
  'five',
  'six',
  'seven',
  'eight',
  'nine',
]

/** A small count in words, "one missed"; from ten on in figures. */
export function countInWords(count: number): string {
  return smallNumbers[count] ?? String(count)
}

/** "12 applications". */
export function applicationsWords(count: number): string {
  return count === 1 ? '1 application' : `${count} applications`
}

/** What we owe within ten business days, the missed ones named: "6, one missed". */
export function owedWords({ owedInTenDays, missed }: Pipeline['totals']): string {
  return missed > 0 ? `${owedInTenDays}, ${countInWords(missed)} missed` : String(owedInTenDays)
}

/** Megawatts with at least one decimal and at most three, "2.8", "0.125"; a dash where unknown. */
export function megawattWords(mw: number | null): string {
  if (mw === null) return '—'
  return mw.toLocaleString('en-US', { minimumFractionDigits: 1, maximumFractionDigits: 3 })
}

/**
 * The DC/AC ratio: array power at standard test conditions, MWdc, over the limit at the POI, MWac.
 * Two decimals; a dash where one of them is unknown.
 */
export function dcAcWords({ dcMw, mwAc }: Pick<PipelineRow, 'dcMw' | 'mwAc'>): string {
  return dcMw === null || !mwAc ? '—' : (dcMw / mwAc).toFixed(2)
}
