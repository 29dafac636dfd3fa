/**
 * Which of these links the page stands under: the longest whose path is the page's own or begins it
 * at a segment. Undefined when none does.
 */
export function currentLink(pathname: string, hrefs: readonly string[]): string | undefined {
  const path = (href: string) => href.split('?')[0] ?? href
  return hrefs
    .filter((href) => pathname === path(href) || pathname.startsWith(`${path(href)}/`))
    .sort((a, b) => path(b).length - path(a).length)[0]
}
