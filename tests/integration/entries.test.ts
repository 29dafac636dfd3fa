import { randomBytes, randomUUID } from 'node:crypto'
import { mkdtemp, rm } from 'node:fs/promises'
import { tmpdir } from 'node:os'
import path from 'node:path'
import { eq, sql } from 'drizzle-orm'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { POST as postEml } from '@/app/api/entries/from-eml/route'
import { GET as getEntries, POST as postEntry } from '@/app/api/entries/route'
import { POST as postFile } from '@/app/api/files/route'
import { getDb } from '@/db/client'
import { facts, obligations } from '@/db/schema/applications'
import { entries, factEvidence } from '@/db/schema/correspondence'
import { audit } from '@/db/schema/people'
import { entryInput, type EntryInputGiven } from '@/lib/schemas/entry'
import type { UploadedFile } from '@/lib/schemas/file'
import { getEntry, listEntries, listRepliesOwed, recordEntry } from '@/lib/services/entries'
import {
  createBareApplication,
  createBareUtility,
  type BareApplication,
} from '../setup/bare-application'
import { useTestDatabase } from '../setup/database'
import { createSignedPerson, type SignedPerson } from '../setup/person'

useTestDatabase()

const now = new Date('2026-12-01T18:00:00Z')
let folder: string
let liaison: SignedPerson
let utility: Awaited<ReturnType<typeof createBareUtility>>

beforeAll(async () => {
  folder = await mkdtemp(path.join(tmpdir(), 'lineside-entries-'))
  process.env.LINESIDE_FILES_DIR = folder
  liaison = await createSignedPerson(['liaison'])
  utility = await createBareUtility()
})
afterAll(() => rm(folder, { recursive: true, force: true }))

const noParams = { params: Promise.resolve({}) }
const newApplication = () => createBareApplication(utility)
const record = (input: EntryInputGiven, person = liaison) =>
  recordEntry(person.ctx(now), entryInput.parse(input))

function call(application: BareApplication, more: Partial<EntryInputGiven> = {}): EntryInputGiven {
  return {
    id: randomUUID(),
    on: '2026-11-30',
    time: '16:30',
    channel: 'call',
    direction: 'out',
    parties: 'Interconnection desk',
    subject: 'Is the request complete?',
    applications: [{ applicationId: application.id }],
    ...more,
  }
}

const filed = (application: BareApplication, more: object = {}) => ({
  id: randomUUID(),
  applicationId: application.id,
  kind: 'happened' as const,
  step: 'filed',
  sentOn: '2026-11-30',
  receivedOn: '2026-11-30',
  outcome: 'done',
  ...more,
})

async function upload(
  bytes: Uint8Array<ArrayBuffer>,
  name: string,
  person = liaison,
): Promise<UploadedFile> {
  const request = new Request('http://lineside.test/api/files', {
    method: 'POST',
    headers: { ...person.headers, 'x-file-name': encodeURIComponent(name) },
    body: bytes,
  })
  return (await postFile(request, noParams)).json()
}

function post(body: unknown, person = liaison): Promise<Response> {
  const request = new Request('http://lineside.test/api/entries', {
    method: 'POST',
    headers: person.headers,
    body: JSON.stringify(body),
  })
  return postEntry(request, noParams)
}

async function counts() {
  const { rows } = await getDb().execute<Record<string, string>>(sql`select
    (select count(*) from entries) as entries, (select count(*) from entry_applications) as concerned,
    (select count(*) from file_links) as links, (select count(*) from facts) as facts,
    (select count(*) from fact_evidence) as evidence, (select count(*) from audit) as audit`)
  return rows[0]
}

describe('an entry', () => {
  it('is read in the zone of the organization, the application’s operator if none is named', async () => {
    const application = await newApplication()
    const entry = await record(call(application))
    expect(entry).toMatchObject({
      at: '2026-11-30T23:30:00.000Z',
      zone: 'America/Denver',
      on: '2026-11-30',
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
    const older = await record(call(one, { on: '2026-11-20', applications: both }))
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
    expect((await post(call(application), executive)).status).toBe(403)
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
      call(application, {
        organizationId: randomUUID(),
        answersId: randomUUID(),
        applications: [{ applicationId: application.id }, { applicationId: randomUUID() }],
        attachments: [{ sha256: 'a'.repeat(64), name: 'never sent.pdf' }],
        on: '2027-03-01',
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
      record(call(application, { on: '2026-03-08', time: '02:30' })),
    ).rejects.toMatchObject({ fields: [{ path: 'time' }] })
  })

  it('cannot carry a file that only its hash is known of', async () => {
    const other = await createSignedPerson(['liaison'])
    const file = await upload(randomBytes(40), 'term sheet.pdf', other)
    const application = await newApplication()
    await expect(
      record(call(application, { attachments: [{ sha256: file.sha256, name: 'mine.pdf' }] })),
    ).rejects.toMatchObject({ fields: [{ path: 'attachments.0.sha256' }] })
  })

  it('shows a restricted file to those named, and to others that there is one', async () => {
    const application = await newApplication()
    const file = await upload(randomBytes(40), 'letter of credit.pdf')
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
    const [mine, theirs] = [await upload(randomBytes(40), 'a'), await upload(randomBytes(40), 'b')]
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

describe('one action records an entry and the events it proves', () => {
  it('for all requests it concerns, with entry and files as their evidence', async () => {
    const [one, two] = [await newApplication(), await newApplication()]
    const file = await upload(randomBytes(60), 'confirmation.pdf')
    const input = call(one, {
      channel: 'email',
      applications: [{ applicationId: one.id }, { applicationId: two.id }],
      attachments: [{ sha256: file.sha256, name: file.name }],
      facts: [filed(one), filed(two)],
    })
    const answer = await post(input)
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
      expect(steps).toContainEqual({ step: 'determined', status: 'open', dueOn: '2026-12-14' })
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
    const answer = await post(call(one, { facts: [filed(two)] }))
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
    const scheduled = { kind: 'stated', dueOn: '2026-12-20', outcome: undefined }
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
    const [late, soon] = [await owe('2026-12-20'), await owe('2026-12-04')]
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
    const owing = { direction: 'in', replyOwedBy: 'us', replyOwedOn: '2026-12-04' } as const
    const first = await record(call(application, owing))
    await record(call(application, { answersId: first.id }))
    const revised = await record(call(application, { ...owing, revisesId: first.id }))
    expect(revised.replySettled).toBe(true)
  })

  it('needs both who and when', async () => {
    const answer = await post(call(await newApplication(), { replyOwedBy: 'us' }))
    expect((await answer.json()).fields).toMatchObject([{ path: 'replyOwedOn' }])
  })
})

const boundary = 'part-7'
const eml = (from: string, messageId: string) =>
  [
    `From: Desk Clerk <${from}>`,
    'To: Interconnection <requests@applicant.test>',
    'Subject: =?utf-8?Q?Pr=C3=BCfbericht?= for AVE-26C-014',
    'Date: Mon, 30 Nov 2026 16:52:00 -0500',
    `Message-ID: <${messageId}>`,
    'MIME-Version: 1.0',
    `Content-Type: multipart/mixed; boundary="${boundary}"`,
    '',
    `--${boundary}`,
    'Content-Type: text/plain; charset=utf-8',
    '',
    'The determination is attached.',
    `--${boundary}`,
    'Content-Type: application/pdf',
    'Content-Disposition: attachment; filename="determination.pdf"',
    'Content-Transfer-Encoding: base64',
    '',
    Buffer.from('%PDF-1.7\n1 0 obj').toString('base64'),
    `--${boundary}--`,
    '',
  ].join('\r\n')

describe('an e-mail file', () => {
  async function read(text: string) {
    const { sha256 } = await upload(Buffer.from(text), 'notice.eml')
    const request = new Request('http://lineside.test/api/entries/from-eml', {
      method: 'POST',
      headers: liaison.headers,
      body: JSON.stringify({ sha256, name: 'notice.eml', zone: 'America/Denver' }),
    })
    return postEml(request, noParams)
  }

  it('fills the form: when in the zone asked for, who, subject, text and the files inside', async () => {
    const id = `${randomUUID()}@utility.test`
    expect(await (await read(eml('clerk@utility.test', id))).json()).toMatchObject({
      on: '2026-11-30',
      time: '14:52',
      direction: 'in',
      parties: 'Desk Clerk <clerk@utility.test>',
      subject: 'Prüfbericht for AVE-26C-014',
      text: 'The determination is attached.',
      messageId: `<${id}>`,
      attachments: [
        { name: 'notice.eml', type: 'message/rfc822' },
        { name: 'determination.pdf', type: 'application/pdf', size: 16 },
      ],
      recordedAs: null,
    })
  })

  it('sent by one of our people is out, and names the other side', async () => {
    const answer = await read(eml(`${liaison.actor.id}@demo.test`, randomUUID()))
    expect(await answer.json()).toMatchObject({
      direction: 'out',
      parties: 'Interconnection <requests@applicant.test>',
    })
  })

  it('recorded already says so, and cannot be recorded twice', async () => {
    const application = await newApplication()
    const messageId = `<${randomUUID()}@utility.test>`
    const entry = await record(call(application, { channel: 'email', messageId }))
    const answer = await read(eml('clerk@utility.test', messageId.slice(1, -1)))
    expect((await answer.json()).recordedAs).toBe(entry.id)
    await expect(record(call(application, { channel: 'email', messageId }))).rejects.toMatchObject({
      code: 'conflict',
    })
    const kept = await getDb().select().from(entries).where(eq(entries.messageId, messageId))
    expect(kept).toHaveLength(1)
  })

  it('that is no e-mail is refused', async () => {
    expect((await read('Request,MW\nAVE-26C-014,48\n')).status).toBe(422)
  })
})
