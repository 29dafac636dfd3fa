import { figuresOf, type Design, type DesignTransformer } from '@/lib/domain/plant/design'

/** One element of the simplified one-line, in order from the array to the grid. */
export interface DesignElement {
  kind: 'pv_array' | 'inverter' | 'transformer' | 'poi' | 'utility'
  title: string
  subtitle?: string
  /** Connections of a transformer's windings, plant side first. */
  winding?: [string, string]
}

/** What the request says about the place where the plant meets the grid. */
export interface PoiTerms {
  poi?: string | null
  poiVoltageKv?: number | null
}

/**
 * The simplified one-line of a design: only what the design holds. Protection, metering and
 * disconnects are not part of it and are left out rather than assumed.
 */
export function oneLineOfDesign(design: Design, terms: PoiTerms = {}): DesignElement[] {
  const { inverter, exportLimitMw, transformers } = design
  const kv = terms.poiVoltageKv ?? transformers[0]?.highKv
  return [
    {
      kind: 'pv_array',
      title: 'PV array',
      subtitle: `${figuresOf(design).dcMw.toFixed(2)} MWdc`,
    },
    {
      kind: 'inverter',
      title: 'Inverters',
      subtitle: `${inverter.count} × ${megaOf(inverter.ratedKva)} MVA`,
    },
    ...transformers.toReversed().map(transformerElement),
    { kind: 'poi', title: 'POI', subtitle: `${trimmed(exportLimitMw, 1)} MWac` },
    {
      kind: 'utility',
      title: 'Utility',
      ...(kv === undefined ? {} : { subtitle: `${trimmed(kv)} kV` }),
    },
  ]
}

function transformerElement(transformer: DesignTransformer): DesignElement {
  const { name, winding } = transformer
  const symbols = windingSymbols(winding)
  return {
    kind: 'transformer',
    title: name,
    subtitle: transformerWords(transformer),
    ...(symbols && { winding: symbols }),
  }
}

/** `14 × 4.4 MVA, 5.75 %, 0.69/34.5 kV`: each one's self-cooled rating and impedance. */
export function transformerWords({
  count,
  mva,
  impedancePct,
  lowKv,
  highKv,
}: DesignTransformer): string {
  const rating = `${count > 1 ? `${count} × ` : ''}${trimmed(mva)} MVA`
  return `${rating}, ${trimmed(impedancePct)} %, ${trimmed(lowKv)}/${trimmed(highKv)} kV`
}

const symbolOf: Record<string, string> = { d: 'Δ', y: 'Y', yn: 'Y' }

/**
 * Plant side first from a vector group, whose capital letters name the high side: `Dyn11` gives
 * `['Y', 'Δ']`. Undefined where the text begins with no vector group. Source: IEC 60076-1, clause 7
 * (vector groups), from memory.
 */
export function windingSymbols(winding: string): [string, string] | undefined {
  const [, high = '', low = ''] = /^(YN|Y|D)(yn|y|d)/.exec(winding.trim()) ?? []
  const [highSide, lowSide] = [symbolOf[high.toLowerCase()], symbolOf[low]]
  return highSide && lowSide ? [lowSide, highSide] : undefined
}

/** kVA as MVA with two decimals, three where the rating has them: `4.20`, `0.385`. */
export function megaOf(kva: number): string {
  const text = (kva / 1000).toFixed(3)
  return text.endsWith('0') ? text.slice(0, -1) : text
}

/** A figure without needless zeros, but with at least so many decimals. */
export function trimmed(value: number, decimals = 0): string {
  const own = (String(Number(value.toFixed(3))).split('.')[1] ?? '').length
  return value.toFixed(Math.max(decimals, own))
}
