export interface ComboOption {
  value: string
  label: string
  /** A second line, also searched. */
  detail?: string
}

const plain = (text: string) => text.normalize('NFD').replace(/\p{M}/gu, '').toLowerCase()

/**
 * The options in which every typed word begins a word or stands inside one, in any order; those
 * whose label begins with the text come first. All of them for an empty text.
 */
export function filterOptions(options: readonly ComboOption[], text: string): ComboOption[] {
  const words = plain(text).split(/\s+/).filter(Boolean)
  const found = options.filter((option) => {
    const hay = plain(`${option.label} ${option.detail ?? ''}`)
    return words.every((word) => hay.includes(word))
  })
  const first = plain(text.trim())
  const rank = (option: ComboOption) => (plain(option.label).startsWith(first) ? 0 : 1)
  return found.sort((a, b) => rank(a) - rank(b))
}
