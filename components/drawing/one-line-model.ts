export type OneLineKind =
  | 'pv_array'
  | 'inverter'
  | 'transformer'
  | 'breaker'
  | 'meter'
  | 'disconnect'
  | 'poi'
  | 'utility'
  | 'storage'

/** One element of the simplified one-line diagram, in order from the array to the grid. */
export interface OneLineElement {
  kind: OneLineKind
  title: string
  subtitle?: string
  /** Device numbers of the protection over a breaker, `27`, `59`, `81`. */
  relay?: string[]
  /** Connections of a transformer's windings, plant side first: `['Y', 'Δ']`. */
  winding?: [string, string]
}

/** Index of the element after the ownership boundary, or -1 where there is none. */
export function boundaryIndex(elements: readonly OneLineElement[]): number {
  const poi = elements.findIndex((element) => element.kind === 'poi')
  if (poi !== -1 && poi + 1 < elements.length) return poi + 1
  return elements.findIndex((element) => element.kind === 'utility')
}

/** The diagram in words: its text equivalent. */
export function describeOneLine(elements: readonly OneLineElement[]): string {
  return elements
    .map((element) => {
      const parts = [element.title, element.subtitle ?? '']
      if (element.winding !== undefined) parts.push(`windings ${element.winding.join(' to ')}`)
      if (element.relay !== undefined) parts.push(`relay functions ${element.relay.join(', ')}`)
      return parts.filter((part) => part !== '').join(', ')
    })
    .join('; then ')
}
