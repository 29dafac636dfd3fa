import { Readable } from 'node:stream'
import { createTransport } from 'nodemailer'
import MailComposer from 'nodemailer/lib/mail-composer'
import SmtpPool from 'nodemailer/lib/smtp-pool'
import type { Delivery, Mailer, OutgoingMessage } from '@/lib/domain/delivery'
import { failureOf } from '@/lib/mail/failure'
import { oneAtATime, type Turn } from '@/lib/mail/one-at-a-time'

export interface SmtpOptions {
  /** `smtp://[user:password@]host:port`, or `smtps://…`. */
  url: string
  /** Address that notices come from. */
  from: string
  connections?: number
}

type PoolOptions = ConstructorParameters<typeof SmtpPool>[0]

// Together shorter than the lease of a notice, so that no other worker takes it meanwhile.
const connectMs = 10_000
const silenceMs = 15_000
const turnMs = 15_000

/**
 * Sends through several SMTP connections. Connecting and the message itself travel side by side;
 * the closing dot, upon which the server accepts, is given by one message at a time, until that
 * message is settled. So a process killed at any instant leaves at most one message that was
 * accepted without our knowing (RFC 5321, section 4.1.1.4: the end of mail data hands over).
 */
export function smtpMailer({ url, from, connections = 5 }: SmtpOptions): Mailer & {
  close(): void
} {
  // The pool is made by hand: given a url, createTransport takes nothing else of its options.
  const pool = new SmtpPool({
    pool: true,
    url,
    maxConnections: connections,
    // A message whose connection broke is ours to try again: its stream has been read.
    maxRequeues: 0,
    connectionTimeout: connectMs,
    greetingTimeout: connectMs,
    socketTimeout: silenceMs,
    dnsTimeout: connectMs,
  } as PoolOptions)
  const transport = createTransport(pool)
  const gate = oneAtATime()

  async function deliver(message: OutgoingMessage, settle: () => Promise<void>): Promise<Delivery> {
    const raw = await composed(message, from)
    const visit = gateVisit(gate)
    try {
      const envelope = { from: addressOf(from), to: [message.to] }
      await transport.sendMail({ envelope, raw: Readable.from(heldBack(raw, visit.enter)) })
    } catch (error) {
      visit.leave()
      return failureOf(error)
    }
    try {
      await settle()
      return { outcome: 'accepted' }
    } finally {
      visit.leave()
    }
  }
  return { connections, deliver, close: () => transport.close() }
}

async function* heldBack(raw: Buffer, enter: () => Promise<void>): AsyncGenerator<Buffer> {
  yield raw
  await enter()
}

/** One message's way through the gate; left at once where it failed before its turn came. */
function gateVisit(gate: { enter(): Promise<Turn> }) {
  let turn: Turn | undefined
  let hasLeft = false
  return {
    async enter() {
      const waiting = gate.enter().then((mine) => {
        if (hasLeft) mine.release()
        turn = mine
      })
      await inTime(waiting)
    },
    leave() {
      hasLeft = true
      turn?.release()
    },
  }
}

async function inTime(waiting: Promise<void>): Promise<void> {
  let timer: NodeJS.Timeout | undefined
  const late = new Promise<never>((_, reject) => {
    const say = () => reject(new Error('other messages took too long; it is tried again.'))
    timer = setTimeout(say, turnMs)
  })
  try {
    await Promise.race([waiting, late])
  } finally {
    clearTimeout(timer)
  }
}

function composed(message: OutgoingMessage, from: string): Promise<Buffer> {
  const { to, subject, text, html, messageId } = message
  const headers = { 'Auto-Submitted': 'auto-generated' }
  return new MailComposer({ from, to, subject, text, html, messageId, headers }).compile().build()
}

/** The bare address of `Name <address>`. */
function addressOf(from: string): string {
  return /<([^>]+)>\s*$/.exec(from)?.[1] ?? from.trim()
}
