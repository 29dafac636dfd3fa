import { randomUUID } from 'node:crypto'
import { eq } from 'drizzle-orm'
import { beforeAll, describe, expect, test } from 'vitest'
import { notices } from '@/db/schema/applications'
import { audit, people } from '@/db/schema/people'
import type { Role } from '@/lib/domain/access'
import { createToken, listTokens, revokeToken } from '@/lib/services/api-tokens'
import type { Context } from '@/lib/services/context'
import { changePassword } from '@/lib/services/own-account'
import { changePerson, invitePerson, listPeople } from '@/lib/services/people'
import { signIn } from '@/lib/services/sign-in'
import { addPerson, seedContext, testPassword } from '@/tests/integration/signed-in-as'
import { useTestDatabase } from '@/tests/setup/database'

const database = useTestDatabase()
const db = () => database().db

async function contextFor(roles: Role[]): Promise<Context & { actor: { id: string } }> {
  const { id, name } = await addPerson(db(), roles)
  return { ...seedContext(db()), actor: { kind: 'person', id, name, roles, zone: 'UTC' } }
}

const invitation = (email = `${randomUUID()}@people.test`) => ({
  id: randomUUID(),
  name: 'Invited',
  email,
  zone: 'America/Denver',
  roles: ['liaison', 'engineer'] as Role[],
})

describe('inviting', () => {
  let administrator: Context
  beforeAll(async () => {
    administrator = await contextFor(['administrator'])
  })

  test('the same invitation sent twice, or at once, is one person and one e-mail', async () => {
    const input = invitation()
    const sent = [invitePerson(administrator, input), invitePerson(administrator, input)]
    const [first, second] = await Promise.all(sent)
    expect(second).toEqual(first)
    expect(first).toMatchObject({ standing: 'invited', roles: ['engineer', 'liaison'] })
    const rows = await db().select().from(notices).where(eq(notices.to, input.email))
    expect(rows).toHaveLength(1)
  })

  test('an address that somebody has is refused at its field, and nothing is kept', async () => {
    const { email } = await addPerson(db(), ['developer'])
    const input = invitation(email)
    await expect(invitePerson(administrator, input)).rejects.toMatchObject({
      code: 'invalid',
      fields: [{ path: 'email', message: expect.stringContaining(email) }],
    })
    expect(await db().select().from(people).where(eq(people.id, input.id))).toEqual([])
  })

  test('who invited whom is recorded, without the secret of the link', async () => {
    const input = invitation()
    await invitePerson(administrator, input)
    const rows = await db().select().from(audit).where(eq(audit.subjectId, input.id))
    expect(rows).toMatchObject([{ action: 'person.add', after: { email: input.email } }])
    expect(rows[0]?.actorName).toBe('Test administrator')
  })
})

describe('changing', () => {
  test('one cannot disable oneself', async () => {
    const ctx = await contextFor(['administrator'])
    await addPerson(db(), ['administrator'])
    await expect(changePerson(ctx, ctx.actor.id, { active: false })).rejects.toMatchObject({
      code: 'conflict',
      message: 'You cannot disable yourself. Ask another administrator to do it.',
    })
  })

  test('a last sign-in is shown in the list', async () => {
    const { id, email } = await addPerson(db(), ['developer'])
    const at = new Date('2026-11-30T16:00:00Z')
    await signIn({ db: db(), now: at, requestId: 'test' }, { email, password: testPassword })
    const { items } = await listPeople(seedContext(db()))
    expect(items.find((person) => person.id === id)?.lastSignInAt).toBe(at.toISOString())
  })
})

describe('the last administrator', () => {
  async function leaveOnly(...kept: string[]): Promise<void> {
    const { items } = await listPeople(seedContext(db()))
    const others = items.filter((person) => !kept.includes(person.id))
    for (const { id } of others)
      await db().update(people).set({ active: false }).where(eq(people.id, id))
  }

  test('can neither be disabled nor lose the role, an open invitation does not count', async () => {
    const { id } = await addPerson(db(), ['administrator'])
    await leaveOnly(id)
    await invitePerson(seedContext(db()), { ...invitation(), roles: ['administrator'] })
    for (const change of [{ active: false }, { roles: ['developer'] as Role[] }]) {
      const answer = changePerson(seedContext(db()), id, change)
      await expect(answer).rejects.toMatchObject({
        code: 'conflict',
        message: expect.stringContaining('is the last administrator who can sign in'),
      })
    }
  })

  test('of two who disable each other at the same moment one stays', async () => {
    const [first, second] = [
      await contextFor(['administrator']),
      await contextFor(['administrator']),
    ]
    await leaveOnly(first.actor.id, second.actor.id)
    await Promise.allSettled([
      changePerson(first, second.actor.id, { active: false }),
      changePerson(second, first.actor.id, { active: false }),
    ])
    const { items } = await listPeople(seedContext(db()))
    const left = items.filter(
      ({ standing, roles }) => standing === 'active' && roles.includes('administrator'),
    )
    expect(left).toHaveLength(1)
  })
})

describe('one’s own account', () => {
  test('another password needs the present one, and then ends every session', async () => {
    const ctx = await contextFor(['developer'])
    const [row] = await db().select().from(people).where(eq(people.id, ctx.actor.id))
    const email = row?.email ?? ''
    const password = 'the blade is up again'
    await expect(changePassword(ctx, { current: 'wrong', password })).rejects.toMatchObject({
      code: 'invalid',
      fields: [{ path: 'current' }],
    })
    await changePassword(ctx, { current: testPassword, password })
    const visit = { db: db(), now: new Date(), requestId: 'test' }
    expect(await signIn(visit, { email, password: testPassword })).toBeNull()
    expect(await signIn(visit, { email, password })).toMatchObject({ version: 2 })
  })

  test('the secret of a token is told once and kept as a hash', async () => {
    const ctx = await contextFor(['developer'])
    const token = await createToken(ctx, { id: randomUUID(), name: 'Nightly export' })
    expect(token.secret).toMatch(/^ls_[\w-]{43}$/)
    const listed = await listTokens(ctx)
    expect(listed.items).toMatchObject([{ id: token.id, name: 'Nightly export' }])
    expect(JSON.stringify(listed)).not.toContain(token.secret)
    const again = createToken(ctx, { id: token.id, name: 'Nightly export' })
    await expect(again).rejects.toMatchObject({ code: 'conflict' })
  })

  test('a token of somebody else is not there to revoke', async () => {
    const [owner, other] = [await contextFor(['developer']), await contextFor(['administrator'])]
    const { id } = await createToken(owner, { id: randomUUID(), name: 'Mine' })
    await expect(revokeToken(other, id)).rejects.toMatchObject({ code: 'not_found' })
    await revokeToken(owner, id)
    expect(await listTokens(owner)).toEqual({ items: [] })
  })
})
