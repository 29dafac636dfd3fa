import { type NextRequest, NextResponse } from 'next/server'
import { openSegments, routes } from '@/lib/routes'

const isDevelopment = process.env.NODE_ENV === 'development'

/**
 * The content security policy of a page. Style attributes stay open because server-rendered
 * drawings and the calendar widget carry them; style elements need the nonce, except in
 * development, where the error overlay writes its own without one.
 */
export function contentSecurityPolicy(nonce: string, development: boolean): string {
  const styles = development ? `'unsafe-inline'` : `'nonce-${nonce}'`
  const directives = {
    'default-src': `'self'`,
    'script-src': `'self' 'nonce-${nonce}' 'strict-dynamic'${development ? ` 'unsafe-eval'` : ''}`,
    'style-src': `'self' ${styles}`,
    'style-src-elem': `'self' ${styles}`,
    'style-src-attr': `'unsafe-inline'`,
    'img-src': `'self' data: blob:`,
    'font-src': `'self'`,
    'connect-src': `'self'${development ? ' ws:' : ''}`,
    'worker-src': `'self'`,
    'object-src': `'none'`,
    'base-uri': `'self'`,
    'form-action': `'self'`,
    'frame-ancestors': `'none'`,
  }
  return Object.entries(directives)
    .map(([name, value]) => `${name} ${value}`)
    .join('; ')
}

function hasSessionCookie(request: NextRequest): boolean {
  return request.cookies
    .getAll()
    .some(({ name }) => /^(__Secure-)?next-auth\.session-token(\.\d+)?$/.test(name))
}

function isOpen(pathname: string): boolean {
  return openSegments.includes(pathname.split('/')[1] ?? '')
}

function secured(response: NextResponse, policy: string): NextResponse {
  const { headers } = response
  headers.set('content-security-policy', policy)
  headers.set('x-content-type-options', 'nosniff')
  headers.set('referrer-policy', 'same-origin')
  headers.set('permissions-policy', 'camera=(), microphone=(), geolocation=(), payment=(), usb=()')
  headers.set('cross-origin-opener-policy', 'same-origin')
  return response
}

/** Sets the security headers and sends visitors without a session cookie to sign in. */
export function proxy(request: NextRequest): NextResponse {
  const nonce = Buffer.from(crypto.randomUUID()).toString('base64')
  const policy = contentSecurityPolicy(nonce, isDevelopment)
  const { pathname, search } = request.nextUrl
  if (!isOpen(pathname) && !hasSessionCookie(request)) {
    const from = pathname === '/' ? undefined : `${pathname}${search}`
    return secured(NextResponse.redirect(new URL(routes.signIn(from), request.url)), policy)
  }
  const headers = new Headers(request.headers)
  headers.set('x-nonce', nonce)
  headers.set('x-path', `${pathname}${search}`)
  headers.set('x-path', `${pathname}${search}`)
  headers.set('content-security-policy', policy)
  return secured(NextResponse.next({ request: { headers } }), policy)
}

export const config = {
  matcher: ['/((?!api/|_next/static|_next/image|icon\\.svg|fonts/|favicon\\.ico).*)'],
}
