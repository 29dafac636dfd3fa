import { createHash, randomBytes, randomUUID } from 'node:crypto'
import { mkdtemp, readdir, rm } from 'node:fs/promises'
import { tmpdir } from 'node:os'
import path from 'node:path'
import { eq } from 'drizzle-orm'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { GET } from '@/app/api/files/[id]/route'
import { POST } from '@/app/api/files/route'
import { getDb } from '@/db/client'
import { fileLinks, files } from '@/db/schema/correspondence'
import { audit } from '@/db/schema/people'
import { attachmentLimitBytes } from '@/lib/schemas/file'
import { findAttachable } from '@/lib/services/files'
import { useTestDatabase } from '../setup/database'
import { createSignedPerson, type SignedPerson } from '../setup/person'

useTestDatabase()

let folder: string
let liaison: SignedPerson
let executive: SignedPerson

beforeAll(async () => {
  folder = await mkdtemp(path.join(tmpdir(), 'lineside-files-'))
  process.env.FILES_DIR = folder
  liaison = await createSignedPerson(['liaison'])
  executive = await createSignedPerson(['executive'])
})
afterAll(() => rm(folder, { recursive: true, force: true }))

const sha256 = (bytes: Uint8Array) => createHash('sha256').update(bytes).digest('hex')
const noParams = { params: Promise.resolve({}) }

function streamed(bytes: Uint8Array): ReadableStream<Uint8Array> {
  let offset = 0
  return new ReadableStream({
    pull(controller) {
      if (offset >= bytes.length) return controller.close()
      controller.enqueue(bytes.subarray(offset, (offset += 64 * 1024)))
    },
  })
}

function upload(
  person: SignedPerson | null,
  bytes: Uint8Array,
  headers: Record<string, string> = {},
) {
  const request = new Request('http://lineside.test/api/files', {
    method: 'POST',
    headers: { ...person?.headers, 'x-file-name': 'letter.pdf', ...headers },
    body: streamed(bytes),
    duplex: 'half',
  } as RequestInit)
  return POST(request, noParams)
}

function download(person: SignedPerson, linkId: string) {
  const request = new Request(`http://lineside.test/api/files/${linkId}`, {
    headers: person.headers,
  })
  return GET(request, { params: Promise.resolve({ id: linkId }) })
}

async function linkTo(sha: string, name: string, restrictedTo?: string[]): Promise<string> {
  const place = { subjectKind: 'project' as const, subjectId: randomUUID(), sha256: sha, name }
  const [link] = await getDb()
    .insert(fileLinks)
    .values({ ...place, restrictedTo })
    .returning()
  return link?.id ?? ''
}

const recordedFile = async (sha: string) =>
  (await getDb().select().from(files).where(eq(files.sha256, sha)))[0]

describe('an upload', () => {
  it('of 30 MB arrives with equal SHA-256 and comes back byte by byte', async () => {
    const bytes = randomBytes(30_000_000)
    const stated = { 'content-length': String(bytes.length), 'x-content-sha256': sha256(bytes) }
    const answer = await upload(liaison, bytes, stated)
    expect(answer.status).toBe(201)
    const received = await answer.json()
    expect(received).toMatchObject({ sha256: sha256(bytes), size: bytes.length })
    const back = await download(liaison, await linkTo(received.sha256, 'study.bin'))
    expect(sha256(new Uint8Array(await back.arrayBuffer()))).toBe(sha256(bytes))
  })

  it('above the limit gets 413 and nothing is recorded', async () => {
    const answer = await upload(liaison, randomBytes(1000), {
      'content-length': String(attachmentLimitBytes + 1),
    })
    expect(answer.status).toBe(413)
    expect(await answer.json()).toMatchObject({ code: 'too_large', status: 413 })
  })

  it('that arrives short gets 400 and nothing is recorded', async () => {
    const bytes = randomBytes(1000)
    const answer = await upload(liaison, bytes, { 'content-length': '1001' })
    expect(answer.status).toBe(400)
    expect(await recordedFile(sha256(bytes))).toBeUndefined()
    expect(await readdir(path.join(folder, 'incoming'))).toEqual([])
  })

  it('of the same bytes twice is one file and two lines in the record', async () => {
    const bytes = randomBytes(500)
    await upload(liaison, bytes, { 'x-file-name': 'first.pdf' })
    await upload(liaison, bytes, { 'x-file-name': 'second.pdf' })
    const lines = await getDb()
      .select({ after: audit.after, actorId: audit.actorId })
      .from(audit)
      .where(eq(audit.subjectId, sha256(bytes)))
    expect(lines.map((line) => (line.after as { name: string }).name).sort()).toEqual([
      'first.pdf',
      'second.pdf',
    ])
    expect(lines.every((line) => line.actorId === liaison.actor.id)).toBe(true)
  })

  it('takes a name in any script', async () => {
    const name = 'Prüfbericht 変電所.pdf'
    const answer = await upload(liaison, randomBytes(50), {
      'x-file-name': encodeURIComponent(name),
    })
    expect(await answer.json()).toMatchObject({ name })
  })

  it('by a person who only reads is refused before its body is read', async () => {
    const answer = await upload(executive, randomBytes(50))
    expect(answer.status).toBe(403)
  })

  it('without a session is refused', async () => {
    expect((await upload(null, randomBytes(50))).status).toBe(401)
  })
})

describe('a download', () => {
  it('of a page of HTML is plain bytes to save, sandboxed and never sniffed', async () => {
    const html = Buffer.from('<!doctype html><script>alert(1)</script>')
    const { sha256: sha } = await (await upload(liaison, html)).json()
    const answer = await download(executive, await linkTo(sha, 'Müller.html'))
    expect(Object.fromEntries(answer.headers)).toMatchObject({
      'content-type': 'application/octet-stream',
      'content-disposition':
        'attachment; filename="Muller.html"; filename*=UTF-8\'\'M%C3%BCller.html',
      'content-security-policy': "sandbox; default-src 'none'",
      'x-content-type-options': 'nosniff',
    })
  })

  it('of a restricted file opens for the people named and is not there for others', async () => {
    const { sha256: sha } = await (await upload(liaison, randomBytes(80))).json()
    const link = await linkTo(sha, 'letter of credit.pdf', [liaison.actor.id])
    expect((await download(liaison, link)).status).toBe(200)
    const refused = await download(executive, link)
    expect(refused.status).toBe(404)
    expect(await refused.text()).not.toContain('letter of credit')
  })

  it.each([randomUUID(), 'no-uuid'])('of a place that does not exist (%s) is 404', async (id) => {
    expect((await download(liaison, id)).status).toBe(404)
  })

  it('says so when the store lost the bytes', async () => {
    const { sha256: sha } = await (await upload(liaison, randomBytes(90))).json()
    const link = await linkTo(sha, 'lost.pdf')
    await rm(path.join(folder, sha.slice(0, 2), sha))
    expect((await download(liaison, link)).status).toBe(503)
  })
})

describe('a hash alone opens nothing', () => {
  it('a file may be attached by who uploaded it and by who may open it elsewhere', async () => {
    const { sha256: own } = await (await upload(liaison, randomBytes(70))).json()
    const other = await createSignedPerson(['liaison'])
    const may = async (person: SignedPerson) =>
      (await findAttachable(person.ctx(), getDb(), [own])).has(own)
    expect([await may(liaison), await may(other)]).toEqual([true, false])
    await linkTo(own, 'secret.pdf', [liaison.actor.id])
    expect(await may(other)).toBe(false)
    await linkTo(own, 'open.pdf')
    expect(await may(other)).toBe(true)
  })
})
