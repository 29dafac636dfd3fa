import type { Config } from 'tailwindcss'

/** The theme: every color is a variable of app/globals.css, so that light, dark and print share it. */
const config: Config = {
  content: ['./app/**/*.{ts,tsx}', './components/**/*.{ts,tsx}'],
  theme: {
    colors: {
      transparent: 'transparent',
      current: 'currentColor',
      film: 'var(--film)',
      sheet: 'var(--sheet)',
      ink: { DEFAULT: 'var(--ink)', 2: 'var(--ink-2)', 3: 'var(--ink-3)' },
      rule: { DEFAULT: 'var(--rule)', 2: 'var(--rule-2)' },
      copper: { DEFAULT: 'var(--copper)', 2: 'var(--copper-2)', deep: 'var(--copper-deep)' },
      'on-copper': 'var(--on-copper)',
      blue: { DEFAULT: 'var(--blue)', 2: 'var(--blue-2)' },
      late: { DEFAULT: 'var(--late)', 2: 'var(--late-2)' },
      soon: { DEFAULT: 'var(--soon)', 2: 'var(--soon-2)', ink: 'var(--soon-ink)' },
      ok: { DEFAULT: 'var(--ok)', 2: 'var(--ok-2)' },
    },
    fontFamily: {
      sans: ['var(--font-archivo)', 'Arial', 'sans-serif'],
      mono: ['var(--font-chivo-mono)', 'ui-monospace', 'monospace'],
    },
    fontSize: {
      cap: ['0.71875rem', { lineHeight: '1.4' }],
      th: ['0.75rem', { lineHeight: '1.35' }],
      sm: ['0.8125rem', { lineHeight: '1.45' }],
      base: ['0.875rem', { lineHeight: '1.45' }],
      lg: ['0.9375rem', { lineHeight: '1.3' }],
      xl: ['1.25rem', { lineHeight: '1.2' }],
      fig: ['1.5rem', { lineHeight: '1.1' }],
      title: ['1.625rem', { lineHeight: '1.15' }],
    },
    borderRadius: { none: '0', DEFAULT: '3px', full: '9999px' },
  },
}

export default config
