import type { Palette } from '@/components/drawing/palette'

/**
 * The palette for drawings on a page: the theme's own variables, so that a drawing follows light,
 * dark and print without script. Documents and PNG take the hex palettes instead.
 */
export const pagePalette: Palette = {
  page: 'var(--film)',
  sheet: 'var(--sheet)',
  ink: 'var(--ink)',
  ink2: 'var(--ink-2)',
  ink3: 'var(--ink-3)',
  rule: 'var(--rule)',
  rule2: 'var(--rule-2)',
  copper: 'var(--copper)',
  blue: 'var(--blue)',
  late: 'var(--late)',
  soon: 'var(--soon)',
  ok: 'var(--ok)',
  sans: 'var(--font-archivo), Arial, sans-serif',
  mono: 'var(--font-chivo-mono), monospace',
}
