import { randomUUID } from 'node:crypto'
import { eq } from 'drizzle-orm'
import { describe, expect, test } from 'vitest'
import { attempts, people } from '@/db/schema/people'
import { limitSignIn } from '@/lib/http/limited-sign-in'
import { signInLimits, takeTry } from '@/lib/services/limiter'
import { invitePerson } from '@/lib/services/people'
import { signIn } from '@/lib/services/sign-in'
import { addPerson, seedContext, testPassword } from '@/tests/integration/signed-in-as'
import { useTestDatabase } from '@/tests/setup/database'

const database = useTestDatabase()
const now = new Date('2026-12-01T12:00:00Z')
const later = (minutes: number) => new Date(now.getTime() + minutes * 60_000)
const visit = () => ({ db: database().db, now, requestId: 'test' })

describe('the pair', () => {
  test('a right pair opens and says at which session version', async () => {
    const { id, email } = await addPerson(visit().db, ['developer'])
    expect(await signIn(visit(), { email, password: testPassword })).toEqual({ id, version: 1 })
  })

  test('a wrong password, an unknown address, a disabled person and an open invitation open nothing', async () => {
    const { db } = visit()
    const known = await addPerson(db, ['developer'])
    const disabled = await addPerson(db, ['engineer'])
    await db.update(people).set({ active: false }).where(eq(people.id, disabled.id))
    const invited = `${randomUUID()}@people.test`
    const input = { id: randomUUID(), name: 'Invited', email: invited, zone: 'UTC' }
    await invitePerson(seedContext(db), { ...input, roles: ['liaison'] })
    const answers = [
      await signIn(visit(), { email: known.email, password: 'another password' }),
      await signIn(visit(), { email: 'nobody@people.test', password: testPassword }),
      await signIn(visit(), { email: disabled.email, password: testPassword }),
      await signIn(visit(), { email: invited, password: '' }),
    ]
    expect(answers).toEqual([null, null, null, null])
  })

  test('a password is kept as an Argon2id hash', async () => {
    const { id } = await addPerson(visit().db, ['developer'])
    const [row] = await visit().db.select().from(people).where(eq(people.id, id))
    expect(row?.passwordHash).toMatch(/^\$argon2id\$v=19\$m=19456,t=2,p=1\$/)
  })
})

describe('the limiter in the database', () => {
  const limitsOf = (email: string) => signInLimits(email, randomUUID())

  test('of thirty tries of one address at the same moment ten are let through', async () => {
    const { db } = visit()
    const limits = limitsOf('crowd@people.test')
    const tries = Array.from({ length: 30 }, () => takeTry(db, limits, now))
    const settled = await Promise.allSettled(tries)
    expect(settled.filter(({ status }) => status === 'fulfilled')).toHaveLength(10)
  })

  test('an address that is blocked opens again when its window has passed', async () => {
    const { db } = visit()
    const limits = limitsOf('patient@people.test')
    for (let count = 0; count < 10; count += 1) await takeTry(db, limits, now)
    await expect(takeTry(db, limits, later(14))).rejects.toMatchObject({
      code: 'too_often',
      retryAfterSeconds: 60,
      message: 'Too many tries. Wait 1 minute, then try again.',
    })
    await expect(takeTry(db, limits, later(15))).resolves.toBeUndefined()
  })

  test('one network address has a hundred tries over all addresses', async () => {
    const { db } = visit()
    const network = randomUUID()
    for (let count = 0; count < 100; count += 1) {
      await takeTry(db, signInLimits(`spray-${count}@people.test`, network), now)
    }
    const next = takeTry(db, signInLimits('spray-last@people.test', network), now)
    await expect(next).rejects.toMatchObject({ code: 'too_often' })
  })
})

describe('the rows of the limiter', () => {
  test('of a window that closed a day ago are gone at the next new address', async () => {
    const { db } = visit()
    const key = (email: string) => `sign-in:address:${email}`
    await takeTry(db, signInLimits('long.ago@people.test', 'old'), later(-25 * 60))
    await takeTry(db, signInLimits('today@people.test', 'new'), now)
    const kept = (await db.select().from(attempts)).map((row) => row.key)
    expect(kept).toContain(key('today@people.test'))
    expect(kept).not.toContain(key('long.ago@people.test'))
  })
})

describe('the handler in front of the library', () => {
  const post = (email: string, password: string) =>
    new Request('http://localhost/api/auth/callback/credentials', {
      method: 'POST',
      headers: { 'content-type': 'application/x-www-form-urlencoded' },
      body: new URLSearchParams({ email, password, json: 'true' }),
    })

  // The library behind it needs a running server: browser tests sign in through both.
  async function attempt(email: string, password: string): Promise<Response> {
    return limitSignIn(post(email, password), async () => {
      const person = await signIn(visit(), { email, password })
      const headers = { 'set-cookie': 'next-auth.session-token=sealed; Path=/; HttpOnly' }
      return new Response(null, person ? { headers } : { status: 401 })
    })
  }

  test('the eleventh wrong try is answered 429 with the seconds to wait, and a right pair with it', async () => {
    const { email } = await addPerson(visit().db, ['developer'])
    for (let count = 0; count < 10; count += 1) {
      expect((await attempt(email, 'wrong')).status).toBe(401)
    }
    const refused = await attempt(email, testPassword)
    expect(refused.status).toBe(429)
    expect(refused.headers.get('content-type')).toBe('application/problem+json')
    const seconds = Number(refused.headers.get('retry-after'))
    expect(seconds).toBeGreaterThan(14 * 60)
    expect(seconds).toBeLessThanOrEqual(15 * 60)
  })

  test('a success gives the tries back', async () => {
    const { email } = await addPerson(visit().db, ['developer'])
    for (let round = 0; round < 3; round += 1) {
      for (let count = 0; count < 8; count += 1) await attempt(email, 'wrong')
      expect((await attempt(email, testPassword)).status).toBe(200)
    }
  })

  test('the address is counted the same in any case of its letters', async () => {
    const { email } = await addPerson(visit().db, ['developer'])
    for (let count = 0; count < 10; count += 1) await attempt(email.toUpperCase(), 'wrong')
    expect((await attempt(` ${email}`, 'wrong')).status).toBe(429)
  })

  test('a body past ten thousand bytes is refused before it is read as a sign-in', async () => {
    const answer = await attempt('large@people.test', 'x'.repeat(20_000))
    expect(answer.status).toBe(413)
  })
})
