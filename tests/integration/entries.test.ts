import { randomBytes, randomUUID } from 'node:crypto'
import { mkdtemp, rm } from 'node:fs/promises'
import { tmpdir } from 'node:os'
import path from 'node:path'
import { eq } from 'drizzle-orm'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { GET as getEntries } from '@/app/api/entries/route'
import { getDb } from '@/db/client'
import { audit } from '@/db/schema/people'
import { entryInput, type EntryInputGiven } from '@/lib/schemas/entry'
import { getEntry, listEntries, recordEntry } from '@/lib/services/entries'
import { createBareApplication, createBareUtility } from '../setup/bare-application'
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

const noParams = { params: Promise.resolve({}) }
const newApplication = () => createBareApplication(utility)
const record = (input: EntryInputGiven, person = liaison) =>
  recordEntry(person.ctx(correspondenceNow), entryInput.parse(input))

describe('an entry', () => {
  it('is read in the zone of the organization, the application’s operator if none is named', async () => {
    const application = await newApplication()
    const entry = await record(call(application))
    expect(entry).toMatchObject({
      at: '2024-12-02T23:30:00.000Z',
      zone: 'America/Denver',
      on: '2024-12-02',
      time: '16:30',
      recordedBy: liaison.actor.name,
    })
  })

  it.each([
    ['call', 'internal'],
    ['letter', 'shareable'],
  ] as const)('by %s is %s unless told otherwise', async (channel, visibility) => {
    const entry = await record(call(await newApplication(), { channel }))
    expect(entry.visibility).toBe(visibility)
  })

  it('sent twice is one entry, with one line in the record', async () => {
    const input = call(await newApplication())
    const answers = await Promise.all([record(input), record(input), record(input)])
    expect(new Set(answers.map((answer) => JSON.stringify(answer))).size).toBe(1)
    const lines = await getDb().select().from(audit).where(eq(audit.subjectId, input.id))
    expect(lines.map((line) => line.action)).toEqual(['entry.record'])
  })

  it('with the same id and other content is a conflict, and the first stays', async () => {
    const input = call(await newApplication())
    await record(input)
    await expect(record({ ...input, subject: 'Other' })).rejects.toMatchObject({ code: 'conflict' })
    expect((await getEntry(liaison.ctx(), input.id)).subject).toBe(input.subject)
  })

  it('is listed for each application it concerns, newest first, page by page', async () => {
    const [one, two] = [await newApplication(), await newApplication()]
    const both = [{ applicationId: one.id }, { applicationId: two.id }]
    const older = await record(call(one, { on: '2024-11-22', applications: both }))
    const newer = await record(call(one))
    const subjects = async (applicationId: string) =>
      (await listEntries(liaison.ctx(), { applicationId })).items.map((entry) => entry.id)
    expect(await subjects(one.id)).toEqual([newer.id, older.id])
    expect(await subjects(two.id)).toEqual([older.id])
    const first = await listEntries(liaison.ctx(), { applicationId: one.id, limit: 1 })
    const second = await listEntries(liaison.ctx(), {
      applicationId: one.id,
      limit: 1,
      after: first.next,
    })
    expect([...first.items, ...second.items].map((entry) => entry.id)).toEqual([newer.id, older.id])
    expect(second.next).toBeUndefined()
  })

  it('is found by words in subject, text or parties, where % and _ are plain characters', async () => {
    const application = await newApplication()
    const entry = await record(call(application, { text: 'Loading is 95% on feeder_7' }))
    const find = async (words: string) =>
      (await listEntries(liaison.ctx(), { applicationId: application.id, find: words })).items
        .length
    expect(await Promise.all(['FEEDER_7', '95%', 'feeder17', '9%5'].map(find))).toEqual([
      1, 1, 0, 0,
    ])
    expect(entry.text).toContain('95%')
  })

  it('may be recorded by those who keep correspondence, read by everybody', async () => {
    const application = await newApplication()
    const executive = await createSignedPerson(['executive'])
    expect((await post(executive, call(application))).status).toBe(403)
    await record(call(application))
    const request = new Request(
      `http://lineside.test/api/entries?applicationId=${application.id}`,
      { headers: executive.headers },
    )
    const answer = await (await getEntries(request, noParams)).json()
    expect(answer.items).toHaveLength(1)
  })

  it('with faults is refused with every field at once, nothing is kept', async () => {
    const application = await newApplication()
    const before = await counts()
    const answer = await post(
      liaison,
      call(application, {
        organizationId: randomUUID(),
        answersId: randomUUID(),
        applications: [{ applicationId: application.id }, { applicationId: randomUUID() }],
        attachments: [{ sha256: 'a'.repeat(64), name: 'never sent.pdf' }],
        on: '2999-03-01',
      }),
    )
    expect(answer.status).toBe(422)
    const { fields } = (await answer.json()) as { fields: { path: string }[] }
    expect(fields.map((field) => field.path).sort()).toEqual([
      'answersId',
      'applications.1.applicationId',
      'attachments.0.sha256',
      'on',
      'organizationId',
    ])
    expect(await counts()).toEqual(before)
  })

  it('at an hour that the clocks skipped is refused', async () => {
    const application = await newApplication()
    // Source: Energy Policy Act of 2005, section 110: daylight time begins the second Sunday of March.
    await expect(
      record(call(application, { on: '2024-03-10', time: '02:30' })),
    ).rejects.toMatchObject({ fields: [{ path: 'time' }] })
  })

  it('cannot carry a file that only its hash is known of', async () => {
    const other = await createSignedPerson(['liaison'])
    const file = await upload(other, randomBytes(40), 'term sheet.pdf')
    const application = await newApplication()
    await expect(
      record(call(application, { attachments: [{ sha256: file.sha256, name: 'mine.pdf' }] })),
    ).rejects.toMatchObject({ fields: [{ path: 'attachments.0.sha256' }] })
  })

  it('shows a restricted file to those named, and to others that there is one', async () => {
    const application = await newApplication()
    const file = await upload(liaison, randomBytes(40), 'letter of credit.pdf')
    const executive = await createSignedPerson(['executive'])
    const attachment = { sha256: file.sha256, name: file.name, restrictedTo: [liaison.actor.id] }
    const entry = await record(call(application, { attachments: [attachment] }))
    expect(entry).toMatchObject({ attachments: [{ name: file.name }], closedAttachments: 0 })
    const seen = await getEntry(executive.ctx(), entry.id)
    expect(seen).toMatchObject({ attachments: [], closedAttachments: 1 })
  })
})

describe('a revision', () => {
  it('takes the place of the entry, which stays readable', async () => {
    const application = await newApplication()
    const first = await record(call(application))
    const second = await record(
      call(application, { revisesId: first.id, subject: 'Is it complete? Yes, on Friday' }),
    )
    expect(second.revisions).toBe(1)
    const { items } = await listEntries(liaison.ctx(), { applicationId: application.id })
    expect(items.map((entry) => entry.id)).toEqual([second.id])
    expect((await getEntry(liaison.ctx(), first.id)).subject).toBe(first.subject)
  })

  it('of an entry that somebody revised in between is a conflict', async () => {
    const application = await newApplication()
    const first = await record(call(application))
    await record(call(application, { revisesId: first.id }))
    await expect(record(call(application, { revisesId: first.id }))).rejects.toMatchObject({
      code: 'conflict',
    })
  })

  it('keeps restricted files restricted, also those that who revises cannot see', async () => {
    const application = await newApplication()
    const [mine, theirs] = [
      await upload(liaison, randomBytes(40), 'a'),
      await upload(liaison, randomBytes(40), 'b'),
    ]
    const other = await createSignedPerson(['engineer'])
    const both = [liaison.actor.id, other.actor.id]
    const first = await record(
      call(application, {
        attachments: [
          { sha256: mine.sha256, name: 'mine', restrictedTo: [liaison.actor.id] },
          { sha256: theirs.sha256, name: 'both', restrictedTo: both },
        ],
      }),
    )
    const second = await record(
      call(application, {
        revisesId: first.id,
        attachments: [{ sha256: theirs.sha256, name: 'both' }],
      }),
      other,
    )
    expect(second).toMatchObject({ attachments: [{ name: 'both' }], closedAttachments: 1 })
    const executive = await createSignedPerson(['executive'])
    expect(await getEntry(executive.ctx(), second.id)).toMatchObject({ closedAttachments: 2 })
  })

  it('keeps the events that the first entry proves', async () => {
    const application = await newApplication()
    const first = await record(call(application, { facts: [filed(application)] }))
    const second = await record(call(application, { revisesId: first.id, subject: 'Filed' }))
    expect(second.evidenceOf).toMatchObject([{ title: 'File the request', outcome: 'done' }])
  })
})
