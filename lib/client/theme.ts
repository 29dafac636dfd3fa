export const themes = ['light', 'dark', 'system'] as const
export type Theme = (typeof themes)[number]

export const themeCookie = 'theme'
const yearSeconds = 365 * 24 * 60 * 60

/** The theme a cookie names; anything else counts as "system". */
export function themeOf(value: string | undefined): Theme {
  return themes.find((theme) => theme === value) ?? 'system'
}

/** Shows the theme at once and keeps it for a year, so that the next page arrives in it. */
export function chooseTheme(theme: Theme): void {
  document.documentElement.dataset.theme = theme
  document.cookie = `${themeCookie}=${theme}; path=/; max-age=${yearSeconds}; samesite=lax`
}

/** The theme now shown on this page. */
export function shownTheme(): Theme {
  return themeOf(document.documentElement.dataset.theme)
}
