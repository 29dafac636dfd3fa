import type { Terms } from '@/lib/domain/clocks/facts'
import { formatDate } from '@/lib/domain/format-date'

export interface TermField {
  key: keyof Terms
  label: string
  unit?: string
  kind: 'text' | 'number' | 'date'
}

/** What a request is made of, in the order it is read. */
export const termFields: readonly TermField[] = [
  { key: 'requestNo', label: 'Request number', kind: 'text' },
  { key: 'poi', label: 'Point of interconnection', kind: 'text' },
  { key: 'poiVoltageKv', label: 'Voltage at the POI', unit: 'kV', kind: 'number' },
  { key: 'requestedMw', label: 'Requested at the POI', unit: 'MWac', kind: 'number' },
  { key: 'studiedMw', label: 'Studied at the POI', unit: 'MWac', kind: 'number' },
  { key: 'grantedMw', label: 'Granted at the POI', unit: 'MWac', kind: 'number' },
  { key: 'installedMw', label: 'Installed at the POI', unit: 'MWac', kind: 'number' },
  { key: 'dcMw', label: 'Array', unit: 'MWdc', kind: 'number' },
  { key: 'technology', label: 'Technology', kind: 'text' },
  { key: 'storageMw', label: 'Storage power', unit: 'MW', kind: 'number' },
  { key: 'storageMwh', label: 'Storage energy', unit: 'MWh', kind: 'number' },
  { key: 'serviceType', label: 'Service type', kind: 'text' },
  { key: 'codOn', label: 'Commercial operation date', kind: 'date' },
]

/** `48.0 MWac`: megawatts with one decimal, more where the value has them. */
export function formatMegawatts(value: number, unit: string): string {
  const decimals = Math.max(1, (String(value).split('.')[1] ?? '').length)
  return `${value.toFixed(Math.min(3, decimals))} ${unit}`
}

/** The megawatts that count now: installed, granted, studied, requested, the furthest known. */
export function currentMegawatts(terms: Terms): number | undefined {
  return terms.installedMw ?? terms.grantedMw ?? terms.studiedMw ?? terms.requestedMw
}

/** `48.0 MWac / 62.4 MWdc` as far as known. */
export function sizeWords(terms: Terms): string {
  const ac = currentMegawatts(terms)
  const words = [
    ac === undefined ? '' : formatMegawatts(ac, 'MWac'),
    terms.dcMw === undefined ? '' : formatMegawatts(terms.dcMw, 'MWdc'),
  ].filter((word) => word !== '')
  return words.length === 0 ? 'not given yet' : words.join(' / ')
}

/** Every term that is set, each as a person reads it: "Array 62.4 MWdc". */
export function termWords(terms: Terms): string[] {
  return termFields.flatMap(({ key, label, unit, kind }) => {
    const value = terms[key]
    if (value === undefined || value === null) return []
    if (kind === 'date') return [`${label} ${formatDate(String(value))}`]
    return [`${label} ${String(value)}${unit ? ` ${unit}` : ''}`]
  })
}
