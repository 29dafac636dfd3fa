import { eq, sql } from 'drizzle-orm'
import { encode } from 'next-auth/jwt'
import { afterEach, describe, expect, test } from 'vitest'
import { apiTokens, people } from '@/db/schema/people'
import { contextOf } from '@/lib/auth/context-of'
import { networkAddressOf } from '@/lib/auth/network-address'
import { sessionCookieName } from '@/lib/auth/session-token'
import { changePerson } from '@/lib/services/people'
import { addPerson, seedContext, sessionCookie, tokenFor } from '@/tests/integration/signed-in-as'
import { useTestDatabase } from '@/tests/setup/database'

const database = useTestDatabase()
const db = () => database().db

const request = (headers: Record<string, string>, method = 'GET') =>
  new Request('http://lineside.test/api/me', { method, headers })

const withCookie = (cookie: string) => contextOf(request({ cookie }), 'test')
const withToken = (token: string) =>
  contextOf(request({ authorization: `Bearer ${token}` }), 'test')

describe('a session cookie', () => {
  test('speaks for its person with the roles of this moment', async () => {
    const { id, name } = await addPerson(db(), ['liaison'])
    const cookie = await sessionCookie(id)
    const actor = { kind: 'person', id, name, zone: 'America/Denver' }
    expect((await withCookie(cookie)).actor).toEqual({ ...actor, roles: ['liaison'] })
    await changePerson(seedContext(db()), id, { roles: ['engineer', 'developer'] })
    expect((await withCookie(cookie)).actor).toEqual({ ...actor, roles: ['developer', 'engineer'] })
  })

  test('speaks for nobody once the person is disabled, nor after enabling again', async () => {
    const { id } = await addPerson(db(), ['liaison'])
    const cookie = await sessionCookie(id)
    await changePerson(seedContext(db()), id, { active: false })
    await expect(withCookie(cookie)).rejects.toMatchObject({ code: 'unsigned' })
    await changePerson(seedContext(db()), id, { active: true })
    await expect(withCookie(cookie)).rejects.toMatchObject({ code: 'unsigned' })
  })

  test('speaks for nobody once the session version has moved on', async () => {
    const { id } = await addPerson(db(), ['liaison'])
    const cookie = await sessionCookie(id)
    const next = { sessionVersion: sql`${people.sessionVersion} + 1` }
    await db().update(people).set(next).where(eq(people.id, id))
    await expect(withCookie(cookie)).rejects.toMatchObject({ code: 'unsigned' })
    await expect(withCookie(await sessionCookie(id, 2))).resolves.toBeDefined()
  })

  test('ends twelve hours after the sign-in, however often it was renewed', async () => {
    const { id } = await addPerson(db(), ['liaison'])
    const ago = (hours: number) => new Date(Date.now() - hours * 3_600_000)
    await expect(withCookie(await sessionCookie(id, 1, ago(11)))).resolves.toBeDefined()
    const old = withCookie(await sessionCookie(id, 1, ago(13)))
    await expect(old).rejects.toMatchObject({ code: 'unsigned' })
  })

  test('sealed with another secret, or torn, it is no session', async () => {
    const { id } = await addPerson(db(), ['administrator'])
    const token = { sub: id, version: 1, signedInAt: Math.floor(Date.now() / 1000) }
    const foreign = await encode({ token, secret: 'the secret of somebody else' })
    for (const sealed of [foreign, foreign.slice(0, 40), '', 'x']) {
      const answer = withCookie(`${sessionCookieName()}=${sealed}`)
      await expect(answer).rejects.toMatchObject({ code: 'unsigned' })
    }
  })
})

describe('an API token', () => {
  test('speaks for its person, and when it was used is noted', async () => {
    const { id } = await addPerson(db(), ['executive'])
    const context = await withToken(await tokenFor(db(), id))
    expect(context.actor).toMatchObject({ id, roles: ['executive'] })
    const [row] = await db().select().from(apiTokens).where(eq(apiTokens.personId, id))
    expect(row?.lastUsedAt).toEqual(context.now)
  })

  test('revoked, unknown or of a disabled person it is refused', async () => {
    const { id } = await addPerson(db(), ['executive'])
    const [revoked, good] = [await tokenFor(db(), id), await tokenFor(db(), id)]
    const { hashOfSecret } = await import('@/lib/services/secrets')
    const isRevoked = eq(apiTokens.hash, hashOfSecret(revoked))
    await db().update(apiTokens).set({ revokedAt: new Date() }).where(isRevoked)
    await expect(withToken(revoked)).rejects.toMatchObject({ code: 'unsigned' })
    await expect(withToken('ls_nothing')).rejects.toMatchObject({ code: 'unsigned' })
    await expect(withToken(good)).resolves.toBeDefined()
    await changePerson(seedContext(db()), id, { active: false })
    await expect(withToken(good)).rejects.toMatchObject({ code: 'unsigned' })
  })

  test('a bad token beside a good cookie is refused', async () => {
    const { id } = await addPerson(db(), ['executive'])
    const headers = { cookie: await sessionCookie(id), authorization: 'Bearer ls_nothing' }
    await expect(contextOf(request(headers), 'test')).rejects.toMatchObject({ code: 'unsigned' })
  })
})

describe('a change with a cookie', () => {
  const cases: [string, Record<string, string>, 'passes' | 'refused'][] = [
    ['from a page of this site', { 'sec-fetch-site': 'same-origin' }, 'passes'],
    ['from no page at all', {}, 'passes'],
    ['with the origin of this host', { origin: 'http://lineside.test' }, 'passes'],
    ['from a page of another site', { 'sec-fetch-site': 'cross-site' }, 'refused'],
    ['from another host of the same site', { 'sec-fetch-site': 'same-site' }, 'refused'],
    ['with the origin of another host', { origin: 'http://elsewhere.test' }, 'refused'],
    ['with a hidden origin', { origin: 'null' }, 'refused'],
    [
      'whose forwarded host is forged',
      { origin: 'http://elsewhere.test', 'x-forwarded-host': 'elsewhere.test' },
      'refused',
    ],
  ]

  test.each(cases)('%s %o: %s', async (_name, headers, expected) => {
    const { id } = await addPerson(db(), ['administrator'])
    const cookie = await sessionCookie(id)
    const sent = request({ cookie, host: 'lineside.test', ...headers }, 'POST')
    const answer = contextOf(sent, 'test')
    if (expected === 'passes') await expect(answer).resolves.toBeDefined()
    else await expect(answer).rejects.toMatchObject({ code: 'forbidden' })
  })

  test('a token is carried by a program: no origin is asked', async () => {
    const { id } = await addPerson(db(), ['administrator'])
    const authorization = `Bearer ${await tokenFor(db(), id)}`
    const sent = request({ authorization, origin: 'http://elsewhere.test' }, 'POST')
    await expect(contextOf(sent, 'test')).resolves.toBeDefined()
  })
})

describe('the network address', () => {
  const forwarded = request({ 'x-forwarded-for': '203.0.113.9, 198.51.100.7' })
  afterEach(() => {
    delete process.env.TRUST_PROXY
  })

  test('a forwarded header without a proxy of ours is not believed', () => {
    expect(networkAddressOf(forwarded)).toBe('direct')
  })

  test('behind a proxy of ours the entry that it added counts', () => {
    process.env.TRUST_PROXY = '1'
    expect(networkAddressOf(forwarded)).toBe('198.51.100.7')
  })
})
