import { NextRequest } from 'next/server'
import { describe, expect, test } from 'vitest'
import { nextSort } from '@/components/ui/data-table'
import { currentLink } from '@/components/ui/current-link'
import { api, routes, withQuery } from '@/lib/routes'
import { contentSecurityPolicy, proxy } from '@/proxy'

const at = (path: string, cookie?: string) =>
  proxy(new NextRequest(`http://localhost${path}`, { headers: cookie ? { cookie } : {} }))

describe('addresses', () => {
  test('a filter without a value leaves no trace', () => {
    expect(withQuery('/due', { whose: 'mine', role: '', page: undefined, late: false })).toBe(
      '/due?whose=mine&late=false',
    )
    expect(withQuery('/due', { whose: null })).toBe('/due')
  })

  test('an id is one segment, whatever it holds', () => {
    expect(routes.application('a/b', 'clocks')).toBe('/applications/a%2Fb/clocks')
    expect(api.facts('../x')).toBe('/api/applications/..%2Fx/facts')
  })

  test('the longest link that begins the path is the current one', () => {
    const tabs = ['/applications/1', '/applications/1/clocks', '/applications/1/files?kind=pdf']
    expect(currentLink('/applications/1/clocks', tabs)).toBe('/applications/1/clocks')
    expect(currentLink('/applications/1/files/9', tabs)).toBe('/applications/1/files?kind=pdf')
    expect(currentLink('/applications/12', tabs)).toBeUndefined()
  })

  test('a second press on a header turns the order', () => {
    expect(nextSort(undefined, 'left')).toEqual({ by: 'left', order: 'asc' })
    expect(nextSort({ by: 'left', order: 'asc' }, 'left')).toEqual({ by: 'left', order: 'desc' })
    expect(nextSort({ by: 'left', order: 'asc' }, 'mw')).toEqual({ by: 'mw', order: 'asc' })
  })
})

describe('before a page', () => {
  test('a visitor without a session cookie is sent to sign in and comes back', () => {
    const answer = at('/applications/1?tab=clocks')
    expect(answer.status).toBe(307)
    expect(answer.headers.get('location')).toBe(
      'http://localhost/sign-in?from=%2Fapplications%2F1%3Ftab%3Dclocks',
    )
  })

  test.each([
    routes.signIn(),
    routes.forgotPassword(),
    routes.resetPassword('abc'),
    routes.invitation('abc'),
  ])('%s opens without a session cookie', (path) => {
    expect(at(path).headers.get('location')).toBeNull()
  })

  test.each([
    'next-auth.session-token=x',
    '__Secure-next-auth.session-token=x',
    'next-auth.session-token.0=x',
  ])('a request with the cookie %s passes', (cookie) => {
    expect(at('/due', cookie).headers.get('location')).toBeNull()
  })

  test('a page whose name begins like an open one is not open', () => {
    expect(at('/sign-ins').status).toBe(307)
  })

  test('every answer has its own nonce and forbids framing and sniffing', () => {
    const policies = [at('/sign-in'), at('/sign-in')].map((answer) => answer.headers)
    const nonces = policies.map(
      (h) => h.get('content-security-policy')?.match(/'nonce-([^']+)'/)?.[1],
    )
    expect(nonces[0]).toBeTruthy()
    expect(nonces[0]).not.toBe(nonces[1])
    expect(policies[0]!.get('content-security-policy')).toContain(`frame-ancestors 'none'`)
    expect(policies[0]!.get('x-content-type-options')).toBe('nosniff')
  })

  test('outside development no inline script, inline style element or eval may run', () => {
    const policy = contentSecurityPolicy('n', false)
    const directive = (name: string) =>
      policy.split('; ').find((part) => part.startsWith(`${name} `))
    expect(directive('script-src')).toBe(`script-src 'self' 'nonce-n' 'strict-dynamic'`)
    expect(directive('style-src-elem')).toBe(`style-src-elem 'self' 'nonce-n'`)
  })
})
