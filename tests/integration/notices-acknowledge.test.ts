import { randomUUID } from 'node:crypto'
import { desc, eq } from 'drizzle-orm'
import { beforeEach, describe, expect, it } from 'vitest'
import { POST as postInside } from '@/app/api/acknowledgements/route'
import { POST as postByLink } from '@/app/api/acknowledgements/by-link/route'
import { getDb } from '@/db/client'
import { acknowledgements, notices, obligations } from '@/db/schema/applications'
import { audit, people } from '@/db/schema/people'
import { roles, type Role } from '@/lib/domain/access'
import { acknowledgeByLink, inspectAcknowledgeLink } from '@/lib/services/acknowledge-links'
import { acknowledge } from '@/lib/services/acknowledgements'
import { sweepNotices } from '@/lib/services/notice-sweep'
import { jobContext } from '@/lib/worker/context'
import { createOpenObligation } from '../factories/open-obligation'
import { useTestDatabase } from '../setup/database'
import { createSignedPerson } from '../setup/person'

useTestDatabase()

const now = new Date('2026-12-03T16:00:00Z')
const visitAt = (at: string | Date = now) => ({
  db: getDb(),
  now: new Date(at),
  requestId: randomUUID(),
})

beforeEach(async () => {
  await getDb().update(obligations).set({ status: 'done' })
  await getDb().update(people).set({ active: false })
})

/** A running clock, the person who was told of it, and the secret of that e-mail. */
async function toldClock() {
  const addressee = await createSignedPerson(['developer'])
  const obligation = await createOpenObligation()
  const applicationId = obligation.applicationId!
  await sweepNotices(jobContext('sweepNotices', now))
  const [notice] = await getDb()
    .select()
    .from(notices)
    .where(eq(notices.applicationId, applicationId))
    .orderBy(desc(notices.createdAt))
  const secret = /\/acknowledge\/([\w-]+)/.exec(notice!.body.text)![1]!
  return { addressee, applicationId, secret }
}

const recorded = (applicationId: string) =>
  getDb().select().from(acknowledgements).where(eq(acknowledgements.applicationId, applicationId))

const answer = (change: object = {}) => ({
  id: randomUUID(),
  reason: 'The drawing comes on Monday.',
  untilOn: '2026-12-08',
  ...change,
})

describe('the link in a notice', () => {
  it('shows what it is about and changes nothing by being opened', async () => {
    const { addressee, applicationId, secret } = await toldClock()
    expect(await inspectAcknowledgeLink(visitAt(), secret)).toMatchObject({
      state: 'open',
      title: 'Cure the deficiency',
      dueOn: '2026-12-10',
      dueAt: '2026-12-11T00:00:00.000Z',
      personName: addressee.actor.name,
      from: '2026-12-04',
      to: '2026-12-10',
    })
    expect(await recorded(applicationId)).toEqual([])
  })

  it('acknowledges as the person it was sent to, and the audit says who', async () => {
    const { addressee, applicationId, secret } = await toldClock()
    await acknowledgeByLink(visitAt(), { secret, ...answer() })
    expect(await recorded(applicationId)).toMatchObject([
      { personId: addressee.actor.id, step: 'cure', dueOn: '2026-12-10', untilOn: '2026-12-08' },
    ])
    const [row] = await getDb().select().from(audit).where(eq(audit.subjectId, applicationId))
    expect(row).toMatchObject({ actorId: addressee.actor.id, action: 'obligation.acknowledge' })
  })

  it('submitted twice is one acknowledgment; with other contents under the same id it is refused', async () => {
    const { applicationId, secret } = await toldClock()
    const same = { secret, ...answer() }
    const [first, second] = await Promise.all([1, 2].map(() => acknowledgeByLink(visitAt(), same)))
    expect(second).toEqual(first)
    await expect(
      acknowledgeByLink(visitAt(), { ...same, reason: 'Another one.' }),
    ).rejects.toMatchObject({ code: 'conflict' })
    expect(await recorded(applicationId)).toHaveLength(1)
  })

  it.each([
    ['the due date has moved', { dueOn: '2026-12-17' }, 'moved', /now Thu 17 Dec 2026/],
    ['the clock is done', { status: 'done' as const }, 'closed', /not running any more/],
  ])('opens no more once %s', async (_, change, state, message) => {
    const { applicationId, secret } = await toldClock()
    await getDb()
      .update(obligations)
      .set(change)
      .where(eq(obligations.applicationId, applicationId))
    expect(await inspectAcknowledgeLink(visitAt(), secret)).toEqual({ state })
    await expect(acknowledgeByLink(visitAt(), { secret, ...answer() })).rejects.toMatchObject({
      code: 'conflict',
      message: expect.stringMatching(message),
    })
    expect(await recorded(applicationId)).toEqual([])
  })

  it('opens for 60 days and not a second longer', async () => {
    const { secret } = await toldClock()
    const at = (seconds: number) => new Date(now.getTime() + seconds * 1000)
    const days = 60 * 24 * 3600
    expect((await inspectAcknowledgeLink(visitAt(at(days)), secret)).state).toBe('open')
    expect((await inspectAcknowledgeLink(visitAt(at(days + 1)), secret)).state).toBe('expired')
    await expect(
      acknowledgeByLink(visitAt(at(days + 1)), { secret, ...answer() }),
    ).rejects.toMatchObject({ code: 'conflict', message: expect.stringMatching(/expired/) })
  })

  it('opens nothing for a person who has left, nor with a guessed secret', async () => {
    const { addressee, secret } = await toldClock()
    const guessed = `${secret.slice(0, -1)}${secret.endsWith('A') ? 'B' : 'A'}`
    expect(await inspectAcknowledgeLink(visitAt(), guessed)).toEqual({ state: 'unknown' })
    await getDb().update(people).set({ active: false }).where(eq(people.id, addressee.actor.id))
    expect(await inspectAcknowledgeLink(visitAt(), secret)).toEqual({ state: 'unknown' })
    await expect(acknowledgeByLink(visitAt(), { secret, ...answer() })).rejects.toMatchObject({
      code: 'conflict',
    })
  })

  it.each(['2026-12-03', '2026-12-11'])(
    'a next date of %s is refused with the allowed days',
    async (untilOn) => {
      const { secret } = await toldClock()
      await expect(
        acknowledgeByLink(visitAt(), { secret, ...answer({ untilOn }) }),
      ).rejects.toMatchObject({
        fields: [
          {
            path: 'untilOn',
            message: expect.stringMatching(/allowed is Fri 4 Dec 2026 to Thu 10 Dec 2026/),
          },
        ],
      })
    },
  )

  it('its door needs no session, names every wrong field, and refuses another site', async () => {
    const { secret } = await toldClock()
    const post = (body: object, headers: Record<string, string> = {}) =>
      postByLink(
        new Request('http://127.0.0.1/api/acknowledgements/by-link', {
          method: 'POST',
          headers,
          body: JSON.stringify(body),
        }),
      )
    const wrong = await post({ secret, id: randomUUID(), reason: ' ', untilOn: 'soon' })
    expect(wrong.status).toBe(422)
    const { fields } = (await wrong.json()) as { fields: { path: string }[] }
    expect(fields.map((field) => field.path)).toEqual(['reason', 'untilOn'])
    const foreign = await post({ secret, ...answer() }, { 'sec-fetch-site': 'cross-site' })
    expect(foreign.status).toBe(403)
  })
})

describe('from inside', () => {
  const allowed: readonly Role[] = ['developer', 'engineer', 'liaison', 'executive']

  it.each(roles)('a person with the role %s may as the access table says', async (role) => {
    const { applicationId } = await toldClock()
    const person = await createSignedPerson([role])
    const input = { applicationId, step: 'cure', instance: 1, obligation: '', dueOn: '2026-12-10' }
    const result = acknowledge(person.ctx(now), { ...input, ...answer() })
    if (allowed.includes(role)) expect((await result).personId).toBe(person.actor.id)
    else await expect(result).rejects.toMatchObject({ code: 'forbidden' })
  })

  it('a page that shows an older due date gets a conflict', async () => {
    const { addressee, applicationId } = await toldClock()
    const input = { applicationId, step: 'cure', instance: 1, obligation: '', dueOn: '2026-12-09' }
    await expect(acknowledge(addressee.ctx(now), { ...input, ...answer() })).rejects.toMatchObject({
      code: 'conflict',
      message: expect.stringMatching(/now Thu 10 Dec 2026/),
    })
  })

  it('a clock that is not there is not found', async () => {
    const { addressee } = await toldClock()
    const input = { applicationId: randomUUID(), step: 'cure', instance: 1, obligation: '' }
    await expect(
      acknowledge(addressee.ctx(now), { ...input, dueOn: '2026-12-10', ...answer() }),
    ).rejects.toMatchObject({ code: 'not_found' })
  })

  it('its door asks who is there', async () => {
    const request = new Request('http://127.0.0.1/api/acknowledgements', {
      method: 'POST',
      body: '{}',
    })
    expect((await postInside(request, { params: Promise.resolve({}) })).status).toBe(401)
  })
})
