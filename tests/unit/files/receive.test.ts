import { createHash, randomBytes } from 'node:crypto'
import { mkdtemp, readdir, readFile, rm, utimes, writeFile, mkdir } from 'node:fs/promises'
import { createServer, request as httpRequest, type Server } from 'node:http'
import type { AddressInfo } from 'node:net'
import { tmpdir } from 'node:os'
import path from 'node:path'
import { Readable } from 'node:stream'
import { afterEach, beforeEach, describe, expect, it } from 'vitest'
import { createFolderStore } from '@/lib/files/folder-store'
import { receiveUpload } from '@/lib/files/receive'
import type { FileStore } from '@/lib/files/store'

const mb = 1_000_000
let root: string
let store: FileStore

beforeEach(async () => {
  root = await mkdtemp(path.join(tmpdir(), 'lineside-files-'))
  store = createFolderStore(root)
})
afterEach(() => rm(root, { recursive: true, force: true }))

const sha256 = (bytes: Uint8Array) => createHash('sha256').update(bytes).digest('hex')
const incoming = () => readdir(store.incomingDir).catch(() => [] as string[])

async function keptFiles(): Promise<string[]> {
  const names = await readdir(root, { recursive: true })
  return names.filter((name) => /^[0-9a-f]{2}\/[0-9a-f]{64}$/.test(name))
}

function upload(
  body: Uint8Array | ReadableStream<Uint8Array>,
  headers: Record<string, string> = {},
) {
  return new Request('http://lineside.test/api/files', {
    method: 'POST',
    body: body as BodyInit,
    headers: { 'x-file-name': 'letter.pdf', ...headers },
    duplex: 'half',
  } as RequestInit)
}

/** A body in pieces that counts how many of them were asked for. */
function pieces(count: number, bytesEach: number, failAfter = Infinity) {
  const asked = { pieces: 0, cancelled: false }
  const body = new ReadableStream<Uint8Array>(
    {
      pull(controller) {
        if (asked.pieces >= failAfter) return controller.error(new Error('connection reset'))
        if (asked.pieces === count) return controller.close()
        asked.pieces += 1
        controller.enqueue(new Uint8Array(bytesEach).fill(asked.pieces % 251))
      },
      cancel() {
        asked.cancelled = true
      },
    },
    { highWaterMark: 0 },
  )
  return { body, asked }
}

describe('what arrives is what was sent', () => {
  it('a file of 30 MB arrives with equal SHA-256', async () => {
    const bytes = randomBytes(30 * mb)
    const received = await receiveUpload(
      upload(bytes, { 'content-length': String(bytes.length), 'x-content-sha256': sha256(bytes) }),
      { limitBytes: 50 * mb, store },
    )
    expect(received).toMatchObject({
      sha256: sha256(bytes),
      size: bytes.length,
      name: 'letter.pdf',
    })
    const kept = await readFile(path.join(root, received.sha256.slice(0, 2), received.sha256))
    expect(kept.equals(bytes)).toBe(true)
    expect(await incoming()).toEqual([])
  })

  it('the same bytes under two names are kept once', async () => {
    const bytes = randomBytes(1000)
    const options = { limitBytes: mb, store }
    const first = await receiveUpload(upload(bytes, { 'x-file-name': 'a.pdf' }), options)
    const second = await receiveUpload(upload(bytes, { 'x-file-name': 'b.pdf' }), options)
    expect([first.name, second.name]).toEqual(['a.pdf', 'b.pdf'])
    expect(await keptFiles()).toEqual([`${first.sha256.slice(0, 2)}/${first.sha256}`])
    expect(await incoming()).toEqual([])
  })

  it('a file of exactly the limit is taken', async () => {
    const received = await receiveUpload(upload(randomBytes(4096)), { limitBytes: 4096, store })
    expect(received.size).toBe(4096)
  })
})

describe('what is refused leaves nothing', () => {
  afterEach(async () => {
    expect(await incoming()).toEqual([])
    expect(await keptFiles()).toEqual([])
  })

  it('a Content-Length above the limit is refused before a byte is read', async () => {
    const { body, asked } = pieces(20, mb)
    await expect(
      receiveUpload(upload(body, { 'content-length': String(20 * mb) }), {
        limitBytes: 10 * mb,
        store,
      }),
    ).rejects.toMatchObject({ code: 'too_large' })
    expect(asked.pieces).toBe(0)
  })

  it('a body that passes the limit on its way is refused at that point and read no further', async () => {
    const { body, asked } = pieces(20, mb)
    await expect(receiveUpload(upload(body), { limitBytes: 5 * mb, store })).rejects.toMatchObject({
      code: 'too_large',
      message: 'The file is larger than the 5 MB allowed here.',
    })
    expect(asked.pieces).toBeLessThan(10)
    expect(asked.cancelled).toBe(true)
  })

  it('fewer bytes than Content-Length says are refused', async () => {
    const request = upload(randomBytes(900), { 'content-length': '1000' })
    await expect(receiveUpload(request, { limitBytes: mb, store })).rejects.toMatchObject({
      code: 'unreadable',
      message: '900 of 1000 bytes arrived; nothing was kept. Send the file again.',
    })
  })

  it('bytes that differ from the SHA-256 of the sender are refused', async () => {
    const request = upload(randomBytes(900), { 'x-content-sha256': 'a'.repeat(64) })
    await expect(receiveUpload(request, { limitBytes: mb, store })).rejects.toMatchObject({
      code: 'unreadable',
    })
  })

  it('a body that breaks off is refused', async () => {
    const { body } = pieces(5, 1000, 3)
    await expect(receiveUpload(upload(body), { limitBytes: mb, store })).rejects.toMatchObject({
      code: 'unreadable',
    })
  })

  it.each([
    ['an empty body', new Uint8Array(0), {}, 'The file is empty.'],
    ['a name that is missing', randomBytes(9), { 'x-file-name': '' }, /x-file-name is missing/],
    ['a name not URI-encoded', randomBytes(9), { 'x-file-name': '%E0%A4' }, /not URI-encoded/],
    ['a SHA-256 of 10 digits', randomBytes(9), { 'x-content-sha256': '0123456789' }, /64 hexadec/],
    ['a Content-Length in words', randomBytes(9), { 'content-length': 'many' }, /no number/],
  ])('%s is refused', async (_name, body, headers: Record<string, string>, message) => {
    await expect(
      receiveUpload(upload(body, headers), { limitBytes: mb, store }),
    ).rejects.toMatchObject({ code: 'unreadable', message: expect.stringMatching(message) })
  })
})

describe('bytes left by a process that died', () => {
  it('are removed a day later by the next upload, younger ones are left alone', async () => {
    await mkdir(store.incomingDir, { recursive: true })
    const old = path.join(store.incomingDir, 'old')
    const young = path.join(store.incomingDir, 'young')
    await writeFile(old, 'x')
    await writeFile(young, 'x')
    const twoDaysAgo = new Date(Date.now() - 48 * 3600 * 1000)
    await utimes(old, twoDaysAgo, twoDaysAgo)
    await receiveUpload(upload(randomBytes(10)), { limitBytes: mb, store })
    expect(await incoming()).toEqual(['young'])
  })
})

describe('through a real connection', () => {
  let server: Server
  let port: number
  let outcome: Promise<unknown>

  beforeEach(async () => {
    let settle: (value: unknown) => void = () => undefined
    outcome = new Promise((resolve) => (settle = resolve))
    server = createServer((incomingRequest, answer) => {
      const headers = Object.entries(incomingRequest.headers).map(([k, v]) => [k, String(v)])
      const request = new Request('http://lineside.test/api/files', {
        method: 'POST',
        headers: headers as [string, string][],
        body: Readable.toWeb(incomingRequest) as unknown as BodyInit,
        duplex: 'half',
      } as RequestInit)
      receiveUpload(request, { limitBytes: 50 * mb, store }).then(
        (received) => {
          settle(received)
          answer.end(JSON.stringify(received))
        },
        (error: unknown) => {
          settle(error)
          if (!answer.destroyed) answer.writeHead(400).end()
        },
      )
    })
    await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve))
    port = (server.address() as AddressInfo).port
  })
  afterEach(() => new Promise((resolve) => server.close(resolve)))

  it('30 MB arrive with equal SHA-256', async () => {
    const bytes = randomBytes(30 * mb)
    const answer = await fetch(`http://127.0.0.1:${port}/`, {
      method: 'POST',
      body: bytes,
      headers: { 'x-file-name': 'study.pdf' },
    })
    expect(await answer.json()).toMatchObject({ sha256: sha256(bytes), size: bytes.length })
  })

  it('a sender that hangs up half-way leaves nothing', async () => {
    const sender = httpRequest({
      port,
      host: '127.0.0.1',
      method: 'POST',
      headers: { 'x-file-name': 'study.pdf', 'content-length': String(mb) },
    })
    sender.on('error', () => undefined)
    sender.write(randomBytes(100_000), () => sender.destroy())
    expect(await outcome).toMatchObject({ code: 'unreadable' })
    expect(await incoming()).toEqual([])
    expect(await keptFiles()).toEqual([])
  })
})
