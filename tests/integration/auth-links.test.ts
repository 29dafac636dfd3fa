import { randomUUID } from 'node:crypto'
import { and, desc, eq } from 'drizzle-orm'
import { describe, expect, test } from 'vitest'
import { POST as request } from '@/app/api/one-time-links/request/route'
import { notices } from '@/db/schema/applications'
import { oneTimeTokens, people } from '@/db/schema/people'
import { acceptLink, inspectLink, requestReset } from '@/lib/services/one-time-links'
import { changePerson, invitePerson, resendInvitation } from '@/lib/services/people'
import { signIn } from '@/lib/services/sign-in'
import { addPerson, seedContext, testPassword } from '@/tests/integration/signed-in-as'
import { useTestDatabase } from '@/tests/setup/database'

const database = useTestDatabase()
const now = new Date('2026-12-01T12:00:00Z')
const after = (hours: number) => new Date(now.getTime() + hours * 3_600_000)
const visitAt = (at: Date) => ({ db: database().db, now: at, requestId: 'test' })
const chosen = 'a gate closes at five'

async function invite() {
  const { db } = database()
  const email = `${randomUUID()}@people.test`
  const input = { id: randomUUID(), name: 'Invited', email, zone: 'UTC' }
  await invitePerson(seedContext(db, now), { ...input, roles: ['liaison'] })
  return { ...input, secret: await secretSentTo(email) }
}

/** The secret at the end of the link in the newest e-mail to that address. */
async function secretSentTo(email: string): Promise<string> {
  const { db } = database()
  const newest = desc(notices.createdAt)
  const [row] = await db.select().from(notices).where(eq(notices.to, email)).orderBy(newest)
  const secret = /\/(?:welcome|reset)\/(\S+)/.exec(row?.body.text ?? '')?.[1]
  if (!secret) throw new Error(`No link was sent to ${email}.`)
  return secret
}

async function countNotices(email: string): Promise<number> {
  const rows = await database().db.select().from(notices).where(eq(notices.to, email))
  return rows.length
}

describe('an invitation', () => {
  test('lets its person choose a password and sign in with it', async () => {
    const { id, email, secret } = await invite()
    const link = await inspectLink(visitAt(now), 'invitation', secret)
    expect(link).toEqual({ state: 'open', name: 'Invited', email })
    const answer = await acceptLink(visitAt(now), { secret, password: chosen })
    expect(answer).toEqual({ email })
    const signedIn = await signIn(visitAt(now), { email, password: chosen })
    expect(signedIn).toEqual({ id, version: 2 })
  })

  test('only a hash of the secret is kept with the person', async () => {
    const { id, secret } = await invite()
    const { db } = database()
    const [row] = await db.select().from(oneTimeTokens).where(eq(oneTimeTokens.personId, id))
    expect(row?.hash).toMatch(/^[0-9a-f]{64}$/)
    expect(JSON.stringify(row)).not.toContain(secret)
  })

  test('used a second time it says that it was used already', async () => {
    const { secret } = await invite()
    await acceptLink(visitAt(now), { secret, password: chosen })
    const second = acceptLink(visitAt(now), { secret, password: 'the password of a thief' })
    await expect(second).rejects.toMatchObject({
      code: 'conflict',
      message: expect.stringContaining('This link was used already'),
    })
    expect(await inspectLink(visitAt(now), 'invitation', secret)).toEqual({ state: 'used' })
  })

  test('of two submits at the same moment one is accepted', async () => {
    const { secret } = await invite()
    const submits = ['first password chosen', 'second password chosen'].map((password) =>
      acceptLink(visitAt(now), { secret, password }),
    )
    const settled = await Promise.allSettled(submits)
    expect(settled.map(({ status }) => status).sort()).toEqual(['fulfilled', 'rejected'])
  })

  test('opens for seven days and then says that it has expired', async () => {
    const { secret } = await invite()
    const state = async (hours: number) =>
      (await inspectLink(visitAt(after(hours)), 'invitation', secret)).state
    expect(await state(7 * 24 - 1)).toBe('open')
    expect(await state(7 * 24)).toBe('expired')
    const late = acceptLink(visitAt(after(7 * 24)), { secret, password: chosen })
    await expect(late).rejects.toMatchObject({ message: expect.stringContaining('has expired') })
  })

  test('sent again, the link of the one before stops working', async () => {
    const { id, email, secret } = await invite()
    await resendInvitation(seedContext(database().db, after(1)), id)
    const states = []
    for (const each of [secret, await secretSentTo(email)]) {
      states.push((await inspectLink(visitAt(after(2)), 'invitation', each)).state)
    }
    expect(states).toEqual(['expired', 'open'])
  })

  test('of a person disabled meanwhile it is not known', async () => {
    const { id, secret } = await invite()
    await changePerson(seedContext(database().db, now), id, { active: false })
    expect(await inspectLink(visitAt(now), 'invitation', secret)).toEqual({ state: 'unknown' })
    const answer = acceptLink(visitAt(now), { secret, password: chosen })
    await expect(answer).rejects.toMatchObject({ code: 'conflict' })
  })

  test('does not open as a reset link', async () => {
    const { secret } = await invite()
    expect(await inspectLink(visitAt(now), 'reset', secret)).toEqual({ state: 'unknown' })
  })
})

describe('a reset', () => {
  const ask = (email: string) =>
    request(
      new Request('http://localhost/api/one-time-links/request', {
        method: 'POST',
        headers: { 'content-type': 'application/json' },
        body: JSON.stringify({ email }),
      }),
    )

  test('is answered with one sentence for a known, an unknown and a disabled address', async () => {
    const { db } = database()
    const [known, disabled] = [
      await addPerson(db, ['developer']),
      await addPerson(db, ['developer']),
    ]
    await db.update(people).set({ active: false }).where(eq(people.id, disabled.id))
    const addresses = [known.email, 'nobody@people.test', disabled.email]
    const answers = []
    for (const email of addresses) {
      const response = await ask(email)
      answers.push([response.status, await response.text()])
    }
    expect(answers[1]).toEqual(answers[0])
    expect(answers[2]).toEqual(answers[0])
    const sent = await Promise.all(addresses.map(countNotices))
    expect(sent).toEqual([1, 0, 0])
  })

  test('asked for a fifth time within the hour is answered 429', async () => {
    const { email } = await addPerson(database().db, ['developer'])
    const statuses = []
    for (let count = 0; count < 5; count += 1) statuses.push((await ask(email)).status)
    expect(statuses).toEqual([200, 200, 200, 200, 429])
  })

  test('opens for an hour, ends older sessions and takes the place of the old password', async () => {
    const { id, email } = await addPerson(database().db, ['developer'])
    await requestReset(visitAt(now), { email })
    const secret = await secretSentTo(email)
    expect((await inspectLink(visitAt(after(1)), 'reset', secret)).state).toBe('expired')
    await acceptLink(visitAt(after(0.9)), { secret, password: chosen })
    expect(await signIn(visitAt(now), { email, password: testPassword })).toBeNull()
    const signedIn = await signIn(visitAt(now), { email, password: chosen })
    expect(signedIn).toEqual({ id, version: 2 })
  })

  test('asked twice makes two e-mails, and only the newer link opens', async () => {
    const { email } = await addPerson(database().db, ['developer'])
    await requestReset(visitAt(now), { email })
    const older = await secretSentTo(email)
    await requestReset(visitAt(after(0.1)), { email })
    expect(await countNotices(email)).toBe(2)
    expect((await inspectLink(visitAt(after(0.2)), 'reset', older)).state).toBe('expired')
  })

  test('asked by one who never accepted sends the invitation anew', async () => {
    const { id, email } = await invite()
    await requestReset(visitAt(after(1)), { email })
    const { db } = database()
    const isInvitation = and(
      eq(oneTimeTokens.personId, id),
      eq(oneTimeTokens.purpose, 'invitation'),
    )
    expect(await db.select().from(oneTimeTokens).where(isInvitation)).toHaveLength(2)
  })
})
