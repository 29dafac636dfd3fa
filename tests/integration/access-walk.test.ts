import { readdirSync, readFileSync } from 'node:fs'
import path from 'node:path'
import { beforeAll, describe, expect, test } from 'vitest'
import type { Db } from '@/db/client'
import { can, roles, type Action, type Role } from '@/lib/domain/access'
import type { Context } from '@/lib/services/context'
import { ServiceError } from '@/lib/services/errors'
import {
  handlers,
  openPages,
  services,
  unguarded,
  type Guarded,
} from '@/tests/integration/access-table'
import { sessionCookieFor, signedInAs } from '@/tests/integration/signed-in-as'
import { useTestDatabase } from '@/tests/setup/database'

const root = path.resolve(import.meta.dirname, '../..')
const nobody = '00000000-0000-4000-8000-000000000000'
const methods = ['GET', 'HEAD', 'POST', 'PUT', 'PATCH', 'DELETE']

/** Not signed in, not allowed, or broken. */
const refusals = [401, 403, 500]

type Handler = (request: Request, next: { params: Promise<unknown> }) => Promise<Response>

const filesUnder = (folder: string, name: string) =>
  readdirSync(path.join(root, folder), { recursive: true, encoding: 'utf8' })
    .filter((file) => path.basename(file) === name)
    .map((file) => path.join(folder, file))
    .sort()

const addressOf = (file: string) =>
  `/${path.relative('app', path.dirname(file))}`.replaceAll(/\/\(\w+\)/g, '') || '/'

const moduleAt = async (file: string) =>
  (await import(path.join(root, file))) as Record<string, unknown>

async function findHandlers(): Promise<Map<string, Handler>> {
  const found = new Map<string, Handler>()
  for (const file of filesUnder('app/api', 'route.ts')) {
    const exported = await moduleAt(file)
    for (const method of methods) {
      const handler = exported[method]
      if (handler) found.set(`${method} ${addressOf(file)}`, handler as Handler)
    }
  }
  return found
}

const database = useTestDatabase()
let found: Map<string, Handler>
const tokens = new Map<Role, string>()

beforeAll(async () => {
  found = await findHandlers()
  for (const role of roles) tokens.set(role, await signedInAs(database().db, role))
})

function callOf(name: string, token?: string, sent: Partial<Guarded> = {}): [Request, never] {
  const [method = '', address = ''] = name.split(' ')
  const names = [...address.matchAll(/\[(?:\.\.\.)?(\w+)\]/g)].map((match) => match[1] ?? '')
  const params = Object.fromEntries(names.map((key) => [key, nobody]))
  const url = `http://localhost${address.replaceAll(/\[[^\]]+\]/g, nobody)}${sent.query ?? ''}`
  const hasBody = !['GET', 'HEAD'].includes(method)
  const request = new Request(url, {
    method,
    headers: {
      ...(hasBody && { 'content-type': 'application/json' }),
      ...(token && { authorization: `Bearer ${token}` }),
    },
    body: hasBody ? JSON.stringify(sent.body ?? {}) : undefined,
  })
  return [request, { params: Promise.resolve(params) } as never]
}

function ruleOf(name: string): Guarded | undefined {
  const rule = handlers[name]
  if (typeof rule === 'string') return { action: rule }
  return rule && 'action' in rule ? rule : undefined
}

describe('handlers', () => {
  test('every handler stands in the table, and nothing else does', () => {
    expect([...found.keys()].sort()).toEqual(Object.keys(handlers).sort())
  })

  test('a handler that is not open answers 401 without a session', async () => {
    const wrong: string[] = []
    for (const [name, handler] of found) {
      if (!ruleOf(name)) continue
      const { status } = await handler(...callOf(name))
      if (status !== 401) wrong.push(`${name} answered ${status}`)
    }
    expect(wrong).toEqual([])
  })

  test('an open handler answers without a session', async () => {
    const wrong: string[] = []
    for (const [name, handler] of found) {
      const rule = handlers[name]
      if (typeof rule !== 'object' || !('open' in rule) || rule.call === false) continue
      const { status } = await handler(...callOf(name))
      if (refusals.includes(status)) wrong.push(`${name} answered ${status}`)
    }
    expect(wrong).toEqual([])
  })

  test.each(roles)('%s is answered 403 exactly where the access table says no', async (role) => {
    const wrong: string[] = []
    for (const [name, handler] of found) {
      const rule = ruleOf(name)
      if (!rule) continue
      const { status } = await handler(...callOf(name, tokens.get(role), rule))
      const isRight = can([role], rule.action) ? !refusals.includes(status) : status === 403
      if (!isRight) wrong.push(`${name} (${rule.action}) answered ${status}`)
    }
    expect(wrong).toEqual([])
  })

  test('a change is refused where the cookie comes with a page of another site', async () => {
    const cookie = await sessionCookieFor(database().db, 'administrator')
    const wrong: string[] = []
    for (const [name, handler] of found) {
      if (!ruleOf(name) || name.startsWith('GET') || name.startsWith('HEAD')) continue
      const [request, next] = callOf(name)
      request.headers.set('cookie', cookie)
      request.headers.set('sec-fetch-site', 'cross-site')
      const { status } = await handler(request, next)
      if (status !== 403) wrong.push(`${name} answered ${status}`)
    }
    expect(wrong).toEqual([])
  })
})

describe('pages', () => {
  const pages = filesUnder('app', 'page.tsx')

  test('every page outside the signed-in part is known to be open', () => {
    const outside = pages.filter((file) => !file.startsWith('app/(inside)/')).map(addressOf)
    expect(outside.filter((address) => !(address in openPages))).toEqual([])
  })

  test('the signed-in part asks who is there before it shows anything', () => {
    const layout = readFileSync(path.join(root, 'app/(inside)/layout.tsx'), 'utf8')
    expect(layout).toMatch(/await pageContext\(\)/)
  })

  const reads = (file: string) => readFileSync(path.join(root, file), 'utf8')

  test('a page that calls a service takes its context from the session', () => {
    const inside = pages.filter((file) => file.startsWith('app/(inside)/'))
    const careless = inside.filter((file) => {
      const usesService = /from '@\/lib\/services\//.test(reads(file))
      return usesService && !/\b(pageContext|getPagePerson|readPage\w*)\(/.test(reads(file))
    })
    expect(careless).toEqual([])
  })

  test('what several pages read with takes its context from the session too', () => {
    const readers = filesUnder('app', '_read.ts')
    expect(readers.filter((file) => !/\bpageContext\(/.test(reads(file)))).toEqual([])
  })
})

describe('service functions', () => {
  type Service = (...args: unknown[]) => unknown
  const exported = new Map<string, Service>()

  beforeAll(async () => {
    for (const file of readdirSync(path.join(root, 'lib/services'))) {
      const functions = Object.entries(await moduleAt(`lib/services/${file}`))
      for (const [name, value] of functions) {
        if (typeof value !== 'function' || /^class\b/.test(String(value))) continue
        exported.set(`${path.basename(file, '.ts')}.${name}`, value as Service)
      }
    }
  })

  /** A function that takes an actor, or waits for something, can reach data. */
  function reachesData(service: Service): boolean {
    return /^async |^[^(]*\(\s*(ctx|tx|db|visit)\b/.test(String(service))
  }

  const untouchable = new Proxy({} as Db, {
    get: (_target, key) => {
      throw new Error(`touched the database (${String(key)}) before asking who may`)
    },
  })

  async function answerTo(held: Role[], name: string, service: Service): Promise<unknown> {
    const actor = { kind: 'person' as const, id: nobody, name: 'Nobody', roles: held, zone: 'UTC' }
    const now = new Date('2026-12-01T12:00:00Z')
    const ctx: Context = { actor, db: untouchable, now, requestId: 'walk' }
    const rule = services[name]
    const args = typeof rule === 'object' ? rule.args : [{}, {}, {}]
    try {
      await service(ctx, ...args)
      return undefined
    } catch (error) {
      return error
    }
  }

  const isForbidden = (error: unknown) =>
    error instanceof ServiceError && error.code === 'forbidden'

  test('every function that can reach data stands in the table, or is excused with a reason', () => {
    const reaching = [...exported].filter(([, service]) => reachesData(service))
    const unknown = reaching.map(([name]) => name).filter((name) => !known(name))
    expect(unknown).toEqual([])
  })

  test('the table names no function that is gone', () => {
    const listed = [...Object.keys(services), ...Object.keys(unguarded)]
    expect(listed.filter((name) => !exported.has(name))).toEqual([])
  })

  function known(name: string): boolean {
    return name in services || name in unguarded
  }

  test('a person without a role is refused before anything is touched', async () => {
    const wrong: string[] = []
    for (const name of Object.keys(services)) {
      const service = exported.get(name)
      const error = service && (await answerTo([], name, service))
      if (!isForbidden(error)) wrong.push(`${name}: ${String(error)}`)
    }
    expect(wrong).toEqual([])
  })

  test.each(roles)('%s is refused exactly where the access table says no', async (role) => {
    const wrong: string[] = []
    for (const [name, rule] of Object.entries(services)) {
      const service = exported.get(name)
      const action: Action = typeof rule === 'string' ? rule : rule.action
      const error = service && (await answerTo([role], name, service))
      const isRight = isForbidden(error) === !can([role], action)
      if (!isRight) wrong.push(`${name} (${action}): ${String(error)}`)
    }
    expect(wrong).toEqual([])
  })
})
