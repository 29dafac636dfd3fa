/** The path to go on to after sign-in: one of this site, or none. Never another site's address. */
export function sameSitePath(from: string | undefined): string | undefined {
  if (!from?.startsWith('/')) return undefined
  // Browsers read a backslash as a slash and drop tabs and line breaks: resolve it as they do.
  const url = URL.canParse(from, 'http://here.invalid') && new URL(from, 'http://here.invalid')
  if (!url || url.host !== 'here.invalid' || url.pathname.startsWith('//')) return undefined
  return `${url.pathname}${url.search}${url.hash}`
}
