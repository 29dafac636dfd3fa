import { randomUUID } from 'node:crypto'
import { and, eq, like } from 'drizzle-orm'
import { beforeEach, describe, expect, it } from 'vitest'
import { getDb } from '@/db/client'
import { acknowledgements, assignments, notices, obligations } from '@/db/schema/applications'
import { people } from '@/db/schema/people'
import type { Role } from '@/lib/domain/access'
import { listNotices } from '@/lib/services/notice-list'
import { sweepDigests } from '@/lib/services/notice-digest'
import { sweepNotices } from '@/lib/services/notice-sweep'
import { queueNotice } from '@/lib/services/notices'
import { jobContext } from '@/lib/worker/context'
import { createBareApplication, createOpenObligation } from '../factories/open-obligation'
import { useTestDatabase } from '../setup/database'
import { createSignedPerson } from '../setup/person'

useTestDatabase()

const sweep = (now: string) => sweepNotices(jobContext('sweepNotices', new Date(now)))

/** 9 in the morning in Denver. */
const morningOf = (on: string) => `${on}T16:00:00Z`

async function noticesAbout(applicationId: string) {
  return getDb()
    .select()
    .from(notices)
    .where(like(notices.subjectKey, `application/${applicationId}/%`))
    .orderBy(notices.createdAt, notices.id)
}

// Obligations of earlier tests would be swept with those of this one.
beforeEach(async () => {
  await getDb().update(obligations).set({ status: 'done' })
  await getDb().update(people).set({ active: false })
})

const person = (...roles: Role[]) => createSignedPerson(roles)

describe('a sweep', () => {
  it('queues one notice to the person who owes it, and says when, where and what follows', async () => {
    const developer = await person('developer')
    await person('engineer')
    const { applicationId } = await createOpenObligation()
    expect(await sweep(morningOf('2026-12-03'))).toBe(1)
    const [notice] = await noticesAbout(applicationId!)
    expect(notice).toMatchObject({
      personId: developer.actor.id,
      rung: 'ahead-5',
      dueOn: '2026-12-10',
    })
    expect(notice?.body.subject).toMatch(
      /^Due in 5 business days: Cure the deficiency, Project \d+$/,
    )
    for (const text of [
      'Thu 10 Dec 2026, 5 pm MT',
      'Left: 5 business days',
      'The request is withdrawn and loses its queue position.',
      'First: Send what the deficiency letter names.',
      `/applications/${applicationId}`,
      '/acknowledge/',
    ]) {
      expect(notice?.body.text).toContain(text)
      expect(notice?.body.html).toContain(text.replace('Left: ', ''))
    }
  })

  it('says nothing twice: not when run again, not when the clock was computed anew', async () => {
    await person('developer')
    const { applicationId } = await createOpenObligation()
    await sweep(morningOf('2026-12-03'))
    await getDb()
      .update(obligations)
      .set({ atSeq: 9, title: 'Cure it' })
      .where(eq(obligations.applicationId, applicationId!))
    expect(await sweep(morningOf('2026-12-04'))).toBe(0)
    expect(await noticesAbout(applicationId!)).toHaveLength(1)
  })

  it('two sweeps at the same moment queue a notice once', async () => {
    await person('developer')
    const { applicationId } = await createOpenObligation()
    const at = morningOf('2026-12-03')
    const added = await Promise.all([sweep(at), sweep(at), sweep(at)])
    expect(added.reduce((sum, one) => sum + one, 0)).toBe(1)
    expect(await noticesAbout(applicationId!)).toHaveLength(1)
  })

  it('an extension notifies again, by the new date', async () => {
    await person('developer')
    const { applicationId } = await createOpenObligation()
    await sweep(morningOf('2026-12-03'))
    await getDb()
      .update(obligations)
      .set({ dueOn: '2026-12-17', dueAt: new Date('2026-12-18T00:00:00Z') })
      .where(eq(obligations.applicationId, applicationId!))
    expect(await sweep(morningOf('2026-12-04'))).toBe(1)
    expect(await sweep(morningOf('2026-12-09'))).toBe(0)
    expect(await sweep(morningOf('2026-12-10'))).toBe(1)
    const told = await noticesAbout(applicationId!)
    expect(told.map((one) => [one.rung, one.dueOn])).toEqual([
      ['ahead-5', '2026-12-10'],
      ['ahead-10', '2026-12-17'],
      ['ahead-5', '2026-12-17'],
    ])
  })

  it('an acknowledged clock is silent until its next date', async () => {
    const developer = await person('developer')
    const { applicationId } = await createOpenObligation()
    await sweep(morningOf('2026-12-03'))
    await getDb().insert(acknowledgements).values({
      applicationId: applicationId!,
      step: 'cure',
      instance: 1,
      dueOn: '2026-12-10',
      personId: developer.actor.id,
      reason: 'The drawing comes on Monday.',
      untilOn: '2026-12-09',
    })
    expect(await sweep(morningOf('2026-12-08'))).toBe(0)
    expect(await sweep(morningOf('2026-12-09'))).toBe(1)
    expect((await noticesAbout(applicationId!)).at(-1)?.rung).not.toBe('ahead-2')
  })

  it('an earlier date in the letter of the utility is the one it goes by', async () => {
    await person('developer')
    const { applicationId } = await createOpenObligation({
      statedDueOn: '2026-12-07',
      dueAt: new Date('2026-12-08T00:00:00Z'),
    })
    await sweep(morningOf('2026-12-07'))
    const [notice] = await noticesAbout(applicationId!)
    expect(notice).toMatchObject({ rung: 'today', dueOn: '2026-12-07' })
    expect(notice?.body.subject).toMatch(/^Due today, 5 pm MT: /)
  })

  it('a step is told by its own obligations, not once more by itself', async () => {
    await person('developer')
    const applicationId = await createBareApplication()
    await createOpenObligation({ applicationId })
    await createOpenObligation({ applicationId, obligation: 'deposit', title: 'Post the deposit' })
    await sweep(morningOf('2026-12-03'))
    const told = await noticesAbout(applicationId)
    expect(told.map((one) => one.subjectKey.split('/').at(-1))).toEqual(['deposit'])
  })

  it('the nearest and latest assignment decides who hears it', async () => {
    const [first, second] = [await person('engineer'), await person('engineer')]
    const { applicationId } = await createOpenObligation()
    const assign = (step: string, personId: string, at: string) =>
      getDb()
        .insert(assignments)
        .values({ applicationId: applicationId!, step, personId, recordedAt: new Date(at) })
    await assign('cure', first.actor.id, '2026-11-01T00:00:00Z')
    await assign('cure', second.actor.id, '2026-11-02T00:00:00Z')
    await assign('*', first.actor.id, '2026-11-03T00:00:00Z')
    await sweep(morningOf('2026-12-03'))
    const told = await noticesAbout(applicationId!)
    expect(told.map((one) => one.personId)).toEqual([second.actor.id])
  })

  it.each(['stopped', 'waiting', 'done', 'closed'] as const)(
    'a clock that is %s is quiet',
    async (status) => {
      await person('developer')
      await createOpenObligation({ status })
      expect(await sweep(morningOf('2026-12-10'))).toBe(0)
    },
  )

  it('an obligation that cannot be read does not silence the others', async () => {
    await person('developer')
    await createOpenObligation({ zone: 'Nowhere/Atall' })
    const { applicationId } = await createOpenObligation()
    expect(await sweep(morningOf('2026-12-03'))).toBe(1)
    expect(await noticesAbout(applicationId!)).toHaveLength(1)
  })
})

describe('the morning digest', () => {
  const digests = (now: string) => sweepDigests(jobContext('sweepNotices', new Date(now)))

  it('goes once a morning to whoever holds something near, and to nobody else', async () => {
    const developer = await person('developer')
    await person('engineer')
    await createOpenObligation()
    expect(await digests(morningOf('2026-12-03'))).toBe(1)
    expect(await digests('2026-12-03T17:00:00Z')).toBe(0)
    expect(await digests(morningOf('2026-12-04'))).toBe(1)
    const told = await getDb()
      .select()
      .from(notices)
      .where(eq(notices.personId, developer.actor.id))
      .orderBy(notices.dueOn)
    expect(told.map((one) => one.body.subject)).toEqual([
      'Your clocks, Thu 3 Dec 2026: 1 near',
      'Your clocks, Fri 4 Dec 2026: 1 near',
    ])
    expect(told[0]?.body.text).toContain('5 BD: Cure the deficiency')
  })

  it('leaves out what is acknowledged until a later day', async () => {
    const developer = await person('developer')
    const { applicationId } = await createOpenObligation()
    await getDb().insert(acknowledgements).values({
      applicationId: applicationId!,
      step: 'cure',
      instance: 1,
      dueOn: '2026-12-10',
      personId: developer.actor.id,
      reason: 'In hand.',
      untilOn: '2026-12-08',
    })
    expect(await digests(morningOf('2026-12-07'))).toBe(0)
    expect(await digests(morningOf('2026-12-08'))).toBe(1)
  })
})

describe('the list of notices', () => {
  it('shows an invitation to administrators and its addressee, and never a text', async () => {
    const [administrator, developer, invited] = [
      await person('administrator'),
      await person('developer'),
      await person('liaison'),
    ]
    const subject = `Invitation ${randomUUID()}`
    await getDb().transaction((tx) =>
      queueNotice(administrator.ctx(), tx, {
        subjectKind: 'person',
        subjectKey: invited.actor.id,
        rung: 'invitation',
        personId: invited.actor.id,
        to: 'invited@demo.test',
        body: { subject, text: 'secret words', html: '<p>secret words</p>' },
      }),
    )
    const subjectsFor = async (reader: typeof developer) =>
      (await listNotices(reader.ctx(), { state: 'waiting' })).items.map((one) => one.subject)
    expect(await subjectsFor(administrator)).toContain(subject)
    expect(await subjectsFor(invited)).toContain(subject)
    expect(await subjectsFor(developer)).not.toContain(subject)
    expect(JSON.stringify(await listNotices(administrator.ctx(), {}))).not.toContain('secret words')
  })

  it('continues where a page ended, without a gap or a repeat', async () => {
    const developer = await person('developer')
    const applicationId = await createBareApplication()
    await getDb().transaction(async (tx) => {
      for (let no = 0; no < 130; no += 1)
        await queueNotice(developer.ctx(new Date(1.8e12 + (no % 7))), tx, {
          subjectKind: 'exhibit',
          subjectKey: `${applicationId}-${no}`,
          applicationId,
          rung: 'check',
          personId: developer.actor.id,
          to: 'x@demo.test',
          body: { subject: `No ${no}`, text: '', html: '' },
        })
    })
    const first = await listNotices(developer.ctx(), { applicationId })
    const rest = await listNotices(developer.ctx(), { applicationId, before: first.next })
    expect([first.items.length, rest.items.length, rest.next]).toEqual([100, 30, undefined])
    expect(new Set([...first.items, ...rest.items].map((one) => one.id)).size).toBe(130)
    expect(first.counts).toEqual({ sent: 0, waiting: 130, failed: 0 })
    await getDb()
      .delete(notices)
      .where(and(eq(notices.applicationId, applicationId)))
  })
})
