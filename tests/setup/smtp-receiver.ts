import { simpleParser, type ParsedMail } from 'mailparser'
import { SMTPServer, type SMTPServerOptions } from 'smtp-server'

export interface Received {
  to: string
  messageId: string
  mail: ParsedMail
}

export interface ReceiverOptions {
  /** 0 for any free port. */
  port?: number
  onRecipient?: SMTPServerOptions['onRcptTo']
  /** Runs when a whole message is there, before it is accepted. */
  beforeAccept?: (received: Received) => Promise<void>
}

export interface Receiver {
  url: string
  port: number
  /** Whole messages that were accepted, in their order. */
  received: Received[]
  stop(): Promise<void>
}

/** A real SMTP server in this process that keeps what it accepts. */
export async function startReceiver(options: ReceiverOptions = {}): Promise<Receiver> {
  const received: Received[] = []
  const server = new SMTPServer({
    authOptional: true,
    disabledCommands: ['STARTTLS', 'AUTH'],
    disableReverseLookup: true,
    logger: false,
    closeTimeout: 100,
    ...(options.onRecipient && { onRcptTo: options.onRecipient }),
    onData(stream, session, done) {
      const to = session.envelope.rcptTo.map((one) => one.address).join(', ')
      simpleParser(stream)
        .then(async (mail) => {
          const message = { to, messageId: mail.messageId ?? '', mail }
          await options.beforeAccept?.(message)
          received.push(message)
          done()
        })
        .catch(done)
    },
  })
  // A client that is killed in the middle of its sentence is what these tests are about.
  server.on('error', () => undefined)
  await new Promise<void>((resolve) => server.listen(options.port ?? 0, '127.0.0.1', resolve))
  const address = server.server.address()
  const port = typeof address === 'object' && address ? address.port : 0
  return {
    url: `smtp://127.0.0.1:${port}`,
    port,
    received,
    stop: () => new Promise((resolve) => server.close(() => resolve())),
  }
}
