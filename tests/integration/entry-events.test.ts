import { randomBytes } from 'node:crypto'
import { mkdtemp, rm } from 'node:fs/promises'
import { tmpdir } from 'node:os'
import path from 'node:path'
import { eq } from 'drizzle-orm'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { getDb } from '@/db/client'
import { facts, obligations } from '@/db/schema/applications'
import { factEvidence } from '@/db/schema/correspondence'
import { entryInput, type EntryInputGiven } from '@/lib/schemas/entry'
import { listRepliesOwed, recordEntry } from '@/lib/services/entries'
import {
  createBareApplication,
  createBareUtility,
  type BareApplication,
} from '../setup/bare-application'
import { useTestDatabase } from '../setup/database'
import { call, correspondenceNow, counts, filed, post, upload } from '../setup/entry-inputs'
import { createSignedPerson, type SignedPerson } from '../setup/person'

useTestDatabase()

let folder: string
let liaison: SignedPerson
let utility: Awaited<ReturnType<typeof createBareUtility>>

beforeAll(async () => {
  folder = await mkdtemp(path.join(tmpdir(), 'lineside-entries-'))
  process.env.FILES_DIR = folder
  liaison = await createSignedPerson(['liaison'])
  utility = await createBareUtility()
})
afterAll(() => rm(folder, { recursive: true, force: true }))

const newApplication = () => createBareApplication(utility)
const record = (input: EntryInputGiven, person = liaison) =>
  recordEntry(person.ctx(correspondenceNow), entryInput.parse(input))

describe('one action records an entry and the events it proves', () => {
  it('for all requests it concerns, with entry and files as their evidence', async () => {
    const [one, two] = [await newApplication(), await newApplication()]
    const file = await upload(liaison, randomBytes(60), 'confirmation.pdf')
    const input = call(one, {
      channel: 'email',
      applications: [{ applicationId: one.id }, { applicationId: two.id }],
      attachments: [{ sha256: file.sha256, name: file.name }],
      facts: [filed(one), filed(two)],
    })
    const answer = await post(liaison, input)
    expect(answer.status).toBe(201)
    expect((await answer.json()).evidenceOf).toHaveLength(2)
    for (const fact of input.facts ?? []) {
      const evidence = await getDb()
        .select({ entryId: factEvidence.entryId, fileSha256: factEvidence.fileSha256 })
        .from(factEvidence)
        .where(eq(factEvidence.factId, fact.id))
      expect(evidence).toHaveLength(2)
      expect(evidence).toContainEqual({ entryId: input.id, fileSha256: null })
      expect(evidence).toContainEqual({ entryId: null, fileSha256: file.sha256 })
      const steps = await getDb()
        .select({ step: obligations.step, status: obligations.status, dueOn: obligations.dueOn })
        .from(obligations)
        .where(eq(obligations.applicationId, fact.applicationId))
      expect(steps).toContainEqual({ step: 'filed', status: 'done', dueOn: null })
      expect(steps).toContainEqual({ step: 'determined', status: 'open', dueOn: '2024-12-16' })
    }
  })

  it('sent twice records them once', async () => {
    const application = await newApplication()
    const input = call(application, { facts: [filed(application)] })
    await Promise.all([record(input), record(input)])
    const rows = await getDb().select().from(facts).where(eq(facts.applicationId, application.id))
    expect(rows.filter((fact) => fact.kind === 'happened')).toHaveLength(1)
  })

  it('a refused event leaves nothing, each fault under the path of its event', async () => {
    const [one, two, three] = [
      await newApplication(),
      await newApplication(),
      await newApplication(),
    ]
    const before = await counts()
    const answer = await post(
      liaison,
      call(one, {
        applications: [one, two, three].map(({ id }) => ({ applicationId: id })),
        facts: [filed(one, { outcome: 'approved' }), filed(two), filed(three, { step: 'none' })],
      }),
    )
    expect(answer.status).toBe(422)
    const { fields } = (await answer.json()) as { fields: { path: string }[] }
    expect(fields.map((field) => field.path)).toEqual(['facts.0.outcome', 'facts.2.step'])
    expect(await counts()).toEqual(before)
  })

  it('an event of an application that the entry does not concern is refused', async () => {
    const [one, two] = [await newApplication(), await newApplication()]
    const answer = await post(liaison, call(one, { facts: [filed(two)] }))
    expect(answer.status).toBe(422)
    expect((await answer.json()).fields).toMatchObject([{ path: 'facts.0.applicationId' }])
  })

  it('two entries about the same requests in opposite order both get through', async () => {
    const [one, two] = [await newApplication(), await newApplication()]
    const about = (order: BareApplication[], step: object) =>
      record(
        call(one, {
          applications: order.map(({ id }) => ({ applicationId: id })),
          facts: order.map((application) => filed(application, step)),
        }),
      )
    const scheduled = { kind: 'stated', dueOn: '2024-12-20', outcome: undefined }
    await expect(
      Promise.all([about([one, two], {}), about([two, one], scheduled)]),
    ).resolves.toHaveLength(2)
  })
})

describe('a reply owed', () => {
  it('by us is listed, the soonest first, until something out answers it', async () => {
    const application = await newApplication()
    const owe = (replyOwedOn: string) =>
      record(call(application, { direction: 'in', replyOwedBy: 'us', replyOwedOn }))
    const [late, soon] = [await owe('2024-12-20'), await owe('2024-12-06')]
    const owed = async () =>
      (await listRepliesOwed(liaison.ctx()))
        .filter((entry) => entry.applications.some((a) => a.applicationId === application.id))
        .map((entry) => entry.id)
    expect(await owed()).toEqual([soon.id, late.id])
    await record(call(application, { direction: 'in', answersId: soon.id }))
    expect(await owed()).toEqual([soon.id, late.id])
    await record(call(application, { direction: 'out', answersId: soon.id }))
    expect(await owed()).toEqual([late.id])
  })

  it('stays settled when the entry is revised after the answer', async () => {
    const application = await newApplication()
    const owing = { direction: 'in', replyOwedBy: 'us', replyOwedOn: '2024-12-06' } as const
    const first = await record(call(application, owing))
    await record(call(application, { answersId: first.id }))
    const revised = await record(call(application, { ...owing, revisesId: first.id }))
    expect(revised.replySettled).toBe(true)
  })

  it('needs both who and when', async () => {
    const answer = await post(liaison, call(await newApplication(), { replyOwedBy: 'us' }))
    expect((await answer.json()).fields).toMatchObject([{ path: 'replyOwedOn' }])
  })
})
