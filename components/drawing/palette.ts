/**
 * The colors and font families a drawing is made with. Every drawing takes one as an argument, so
 * that page, PNG and the night sheet get the same lines. Values are hex: presentation attributes
 * reach documents that know no style sheet.
 */
export interface Palette {
  page: string
  sheet: string
  ink: string
  ink2: string
  /** Ticks and lines ahead only, never text under 18 px: it misses AA as text. */
  ink3: string
  rule: string
  rule2: string
  /** Closed, done, the limit. */
  copper: string
  /** Their side. */
  blue: string
  late: string
  soon: string
  ok: string
  sans: string
  mono: string
}

/** The font's own name first: it is what PNG are set in. Pages load it under the layout's variable. */
const families = {
  sans: 'Archivo, Arial, sans-serif',
  mono: "'Chivo Mono', chivoMono, 'Liberation Mono', monospace",
}

export const lightPalette: Palette = {
  page: '#f3f5f2',
  sheet: '#fbfcfa',
  ink: '#15242c',
  ink2: '#4a5a62',
  ink3: '#7d8a90',
  rule: '#cfd6d3',
  rule2: '#e3e8e5',
  copper: '#b2501b',
  blue: '#1d5876',
  late: '#a81e2b',
  soon: '#8a6100',
  ok: '#2c6a4b',
  ...families,
}

export const darkPalette: Palette = {
  page: '#10181d',
  sheet: '#162129',
  ink: '#e6ecea',
  ink2: '#a8b5b9',
  ink3: '#72828a',
  rule: '#33434c',
  rule2: '#233139',
  copper: '#e08a4a',
  blue: '#86bcd8',
  late: '#f0908f',
  soon: '#dcb04c',
  ok: '#83c3a2',
  ...families,
}

/** For paper: the same inks on a white sheet. */
export const printPalette: Palette = { ...lightPalette, page: '#ffffff', sheet: '#ffffff' }

/** The palette of a theme, `light` when the theme is not `dark`. */
export function paletteOf(theme: 'light' | 'dark'): Palette {
  return theme === 'dark' ? darkPalette : lightPalette
}
