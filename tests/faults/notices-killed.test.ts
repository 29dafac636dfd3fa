import { spawn, type ChildProcess } from 'node:child_process'
import { randomUUID } from 'node:crypto'
import { once } from 'node:events'
import path from 'node:path'
import { setTimeout as after } from 'node:timers/promises'
import { afterAll, expect, it, vi } from 'vitest'
import { getDb } from '@/db/client'
import { notices } from '@/db/schema/applications'
import { queueNotices } from '@/lib/services/notices'
import { useTestDatabase } from '../setup/database'
import { createSignedPerson } from '../setup/person'
import { startReceiver, type Receiver } from '../setup/smtp-receiver'

const database = useTestDatabase()

const noticeCount = 300
const kills = 8
const mostBetweenKills = 30
const root = path.join(import.meta.dirname, '../..')

const seed = Number(process.env.FAULT_SEED ?? Date.now() % 1_000_000)
const random = seededRandom(seed)
const running = new Set<ChildProcess>()

// A test that failed half-way must not leave a worker behind.
afterAll(() => {
  for (const child of running) child.kill('SIGKILL')
})

/** Numbers from 0 to 1 that a seed fixes: mulberry32, public domain (from memory). */
function seededRandom(start: number): () => number {
  let state = start >>> 0
  return () => {
    state = (state + 0x6d2b79f5) >>> 0
    let mixed = Math.imul(state ^ (state >>> 15), state | 1)
    mixed ^= mixed + Math.imul(mixed ^ (mixed >>> 7), mixed | 61)
    return ((mixed ^ (mixed >>> 14)) >>> 0) / 4_294_967_296
  }
}

function startWorker(smtpUrl: string): ChildProcess {
  const child = spawn(process.execPath, ['--import', 'tsx', 'lib/worker/send.ts'], {
    cwd: root,
    stdio: ['ignore', 'ignore', 'inherit'],
    env: {
      ...process.env,
      DATABASE_URL: database().appUrl,
      SMTP_URL: smtpUrl,
      NEXTAUTH_URL: 'http://127.0.0.1:3000',
      NOTICE_POLL_SECONDS: '1',
      LOG_LEVEL: 'error',
    },
  })
  running.add(child)
  child.once('exit', () => running.delete(child))
  return child
}

async function queueAll(): Promise<void> {
  const person = await createSignedPerson(['developer'])
  const queued = Array.from({ length: noticeCount }, (_, no) => ({
    subjectKind: 'exhibit' as const,
    subjectKey: randomUUID(),
    rung: 'check',
    personId: person.actor.id,
    to: 'developer@demo.test',
    body: { subject: `Notice ${no}`, text: `Text of ${no}`, html: `<p>Text of ${no}</p>` },
  }))
  await getDb().transaction((tx) => queueNotices(person.ctx(), tx, queued))
}

/** Lets a worker hand over some messages, then kills it at a random instant within the next ones. */
async function killOne(server: Receiver): Promise<number> {
  const child = startWorker(server.url)
  const enough = server.received.length + 1 + Math.floor(random() * mostBetweenKills)
  await vi.waitUntil(() => server.received.length >= enough, { timeout: 60_000, interval: 1 })
  // The instant of the kill is what is tried here: nothing is waited for.
  await after(random() * 60)
  const ended = once(child, 'exit')
  child.kill('SIGKILL')
  await ended
  return server.received.length
}

it(`${noticeCount} notices all arrive though the worker is killed ${kills} times, with one repeat a kill at most`, async () => {
  const server = await startReceiver({ beforeAccept: () => after(5 + random() * 25) })
  await queueAll()
  const receivedAtKill: number[] = []
  for (let no = 0; no < kills; no += 1) receivedAtKill.push(await killOne(server))

  const last = startWorker(server.url)
  const ids = () => new Set(server.received.map((one) => one.messageId))
  const rows = () => getDb().select().from(notices)
  await vi.waitUntil(async () => (await rows()).every((row) => row.acceptedAt !== null), {
    timeout: 240_000,
    interval: 250,
  })
  const ended = once(last, 'exit')
  last.kill('SIGTERM')
  const [exitCode] = (await ended) as [number | null]
  await server.stop()

  const repeats = server.received.length - ids().size
  console.log(
    `seed ${seed}: ${kills} kills after ${receivedAtKill.join(', ')} messages; ` +
      `${ids().size} of ${noticeCount} notices arrived, ${repeats} repeated`,
  )
  expect(receivedAtKill.at(-1)).toBeLessThan(noticeCount)
  expect([...ids()].sort()).toEqual((await rows()).map((row) => row.messageId).sort())
  expect(ids().size).toBe(noticeCount)
  expect(repeats).toBeLessThanOrEqual(kills)
  expect(exitCode).toBe(0)
})
