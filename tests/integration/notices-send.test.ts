import { randomUUID } from 'node:crypto'
import { eq, isNotNull } from 'drizzle-orm'
import { afterEach, beforeEach, describe, expect, it } from 'vitest'
import { getDb, getPool } from '@/db/client'
import { notices } from '@/db/schema/applications'
import { smtpMailer } from '@/lib/mail/smtp'
import { listNotices } from '@/lib/services/notice-list'
import { leaseSeconds, sendNotices } from '@/lib/services/notice-send'
import { queueNotice } from '@/lib/services/notices'
import { jobContext } from '@/lib/worker/context'
import { useTestDatabase } from '../setup/database'
import { createSignedPerson, type SignedPerson } from '../setup/person'
import { startReceiver, type Receiver, type ReceiverOptions } from '../setup/smtp-receiver'

useTestDatabase()

const start = new Date('2026-12-03T16:00:00Z')
const after = (seconds: number) => new Date(start.getTime() + seconds * 1000)

let reader: SignedPerson
const open: { stop(): Promise<void> | void }[] = []

beforeEach(async () => {
  reader = await createSignedPerson(['developer'])
})

afterEach(async () => {
  for (const one of open.splice(0).reverse()) await one.stop()
  await getDb().delete(notices)
})

async function receiver(options?: ReceiverOptions): Promise<Receiver> {
  const started = await startReceiver(options)
  open.push(started)
  return started
}

function mailerTo(url: string) {
  const mailer = smtpMailer({ url, from: 'Lineside <notices@lineside.example>' })
  open.push({ stop: () => mailer.close() })
  return mailer
}

async function queue(count: number, body: Partial<{ text: string }> = {}): Promise<void> {
  await getDb().transaction(async (tx) => {
    for (let no = 0; no < count; no += 1)
      await queueNotice(reader.ctx(start), tx, {
        subjectKind: 'exhibit',
        subjectKey: randomUUID(),
        rung: 'check',
        personId: reader.actor.id,
        to: `person${no}@demo.test`,
        body: { subject: `Notice ${no}`, text: 'Words', html: '<p>Words</p>', ...body },
      })
  })
}

const send = (mailer: ReturnType<typeof mailerTo>, now = start) =>
  sendNotices(jobContext('sendNotices', now), { mailer })

async function drain(mailer: ReturnType<typeof mailerTo>, now = start): Promise<number> {
  let accepted = 0
  for (;;) {
    const result = await send(mailer, now)
    accepted += result.accepted
    if (result.taken === 0 || result.unreachable) return accepted
  }
}

const list = async () => (await listNotices(reader.ctx(start), {})).items

describe('sending', () => {
  it('a queued notice nudges the sender, many notices make one nudge', async () => {
    await queue(3)
    await queue(2)
    const { rows } = await getPool().query(
      `select task_identifier from graphile_worker.jobs where key = 'sendNotices'`,
    )
    expect(rows).toEqual([{ task_identifier: 'sendNotices' }])
  })

  it('every notice arrives once, whole, under the Message-ID of its row', async () => {
    const server = await receiver()
    await queue(12)
    expect(await drain(mailerTo(server.url))).toBe(12)
    const rows = await getDb().select().from(notices)
    expect(server.received.map((one) => one.messageId).sort()).toEqual(
      rows.map((row) => row.messageId).sort(),
    )
    const { mail, to } = server.received.find((one) => one.mail.subject === 'Notice 3')!
    expect([to, mail.from?.text, mail.text?.trim(), mail.html]).toEqual([
      'person3@demo.test',
      '"Lineside" <notices@lineside.example>',
      'Words',
      '<p>Words</p>',
    ])
    expect((await list()).every((one) => one.state === 'sent' && !one.nextAttemptAt)).toBe(true)
  })

  it('two workers at once send each notice once', async () => {
    const server = await receiver()
    await queue(40)
    const sent = await Promise.all([drain(mailerTo(server.url)), drain(mailerTo(server.url))])
    expect(sent.reduce((sum, one) => sum + one, 0)).toBe(40)
    expect(new Set(server.received.map((one) => one.messageId)).size).toBe(40)
    expect(server.received).toHaveLength(40)
  })

  it('messages travel side by side, but none is accepted before the one ahead of it is settled', async () => {
    const senders = new Set<string>()
    const settled: [number, number][] = []
    const server = await receiver({
      onRecipient: (_address, session, done) => {
        senders.add(String(session.remotePort))
        done()
      },
      async beforeAccept() {
        const rows = await getDb().select().from(notices).where(isNotNull(notices.acceptedAt))
        settled.push([server.received.length, rows.length])
      },
    })
    await queue(10)
    const mailer = mailerTo(server.url)
    await drain(mailer)
    expect(senders.size).toBe(mailer.connections)
    expect(settled).toEqual(Array.from({ length: 10 }, (_, no) => [no, no]))
  })

  it('links of one person leave our copy once the message is delivered', async () => {
    const server = await receiver()
    await queue(1, { text: 'Open http://lineside.example/acknowledge/abc_DEF-123 now' })
    await drain(mailerTo(server.url))
    expect(server.received[0]?.mail.text).toContain('/acknowledge/abc_DEF-123')
    const [row] = await getDb().select().from(notices)
    expect(row?.body.text).toBe('Open http://lineside.example/acknowledge/… now')
  })
})

describe('when it does not go out', () => {
  it('a dead mail server delays and never loses', async () => {
    const server = await receiver()
    const mailer = mailerTo(server.url)
    await server.stop()
    await queue(12)
    const { accepted, unreachable } = await send(mailer)
    expect([accepted, unreachable]).toEqual([0, true])
    const failed = (await list()).filter((one) => one.state === 'failed')
    expect(failed).toHaveLength(mailer.connections)
    expect(failed[0]).toMatchObject({
      attempts: 1,
      reason: expect.stringMatching(/^The mail server could not be reached/),
      nextAttemptAt: after(15).toISOString(),
    })
    const again = await receiver({ port: server.port })
    expect(await drain(mailer, after(5))).toBe(12 - mailer.connections)
    expect(await drain(mailer, after(15))).toBe(mailer.connections)
    expect(new Set(again.received.map((one) => one.messageId)).size).toBe(12)
    expect((await list()).every((one) => one.state === 'sent' && one.reason === null)).toBe(true)
  })

  it('an address that the server refuses for good is given up at once, with its reason', async () => {
    const server = await receiver({
      onRecipient: (_address, _session, done) =>
        done(Object.assign(new Error('No such person here'), { responseCode: 550 })),
    })
    await queue(1)
    const mailer = mailerTo(server.url)
    await send(mailer)
    expect(await list()).toMatchObject([
      {
        state: 'failed',
        reason: 'The mail server refused the address: 550 No such person here',
        attempts: 1,
        nextAttemptAt: null,
      },
    ])
    expect((await send(mailer, after(86_400))).taken).toBe(0)
  })

  it('a refusal for now is tried again with growing pauses, and the reason stays to be read', async () => {
    const server = await receiver({
      onRecipient: (_address, _session, done) =>
        done(Object.assign(new Error('Try later'), { responseCode: 451 })),
    })
    await queue(1)
    const mailer = mailerTo(server.url)
    const pauses: number[] = []
    for (let now = start, no = 0; no < 9; no += 1) {
      expect((await send(mailer, now)).taken).toBe(1)
      const [notice] = await list()
      expect(notice?.reason).toBe('The mail server answered: 451 Try later')
      const next = new Date(notice!.nextAttemptAt!)
      pauses.push((next.getTime() - now.getTime()) / 1000)
      now = next
    }
    expect(pauses).toEqual([15, 30, 60, 120, 240, 480, 900, 900, 900])
  })

  it('one refused address holds up nobody else', async () => {
    const server = await receiver({
      onRecipient: ({ address }, _session, done) =>
        address === 'person1@demo.test'
          ? done(Object.assign(new Error('Unknown'), { responseCode: 550 }))
          : done(),
    })
    await queue(4)
    expect(await drain(mailerTo(server.url))).toBe(3)
  })

  it('rows of a worker that died wait for the end of its lease, then go out', async () => {
    const server = await receiver()
    await queue(2)
    await getDb()
      .update(notices)
      .set({ leaseUntil: after(leaseSeconds) })
    const mailer = mailerTo(server.url)
    expect((await send(mailer, after(leaseSeconds - 1))).taken).toBe(0)
    expect((await send(mailer, after(leaseSeconds))).accepted).toBe(2)
  })

  it('a notice queued in a transaction that fails is not there', async () => {
    const key = randomUUID()
    const broken = getDb().transaction(async (tx) => {
      const body = { subject: 'S', text: 'T', html: 'H' }
      const about = { subjectKind: 'exhibit', subjectKey: key, rung: 'check' } as const
      await queueNotice(reader.ctx(), tx, {
        ...about,
        personId: reader.actor.id,
        to: 'x@demo.test',
        body,
      })
      throw new Error('rolled back')
    })
    await expect(broken).rejects.toThrow('rolled back')
    expect(await getDb().select().from(notices).where(eq(notices.subjectKey, key))).toEqual([])
  })
})
