import { randomUUID } from 'node:crypto'
import { mkdtemp, rm } from 'node:fs/promises'
import { tmpdir } from 'node:os'
import path from 'node:path'
import { eq } from 'drizzle-orm'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { POST as postEml } from '@/app/api/entries/from-eml/route'
import { getDb } from '@/db/client'
import { entries } from '@/db/schema/correspondence'
import { entryInput, type EntryInputGiven } from '@/lib/schemas/entry'
import { recordEntry } from '@/lib/services/entries'
import { createBareApplication, createBareUtility } from '../setup/bare-application'
import { useTestDatabase } from '../setup/database'
import { call, correspondenceNow, upload } from '../setup/entry-inputs'
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

const boundary = 'part-7'
const eml = (from: string, messageId: string) =>
  [
    `From: Desk Clerk <${from}>`,
    'To: Interconnection <requests@applicant.test>',
    'Subject: =?utf-8?Q?Pr=C3=BCfbericht?= for AVE-26C-014',
    'Date: Mon, 02 Dec 2024 16:52:00 -0500',
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
    const { sha256 } = await upload(liaison, Buffer.from(text), 'notice.eml')
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
      on: '2024-12-02',
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
