import { smtpMailer } from '@/lib/mail/smtp'
import { coalesced, drainNotices, poll, sweep } from '@/lib/worker/notices'
import { runWorker } from '@/lib/worker/runner'

/** Worker entry: notices and nothing else, so that no long work holds one up. */

const url = process.env.SMTP_URL
if (!url) throw new Error('SMTP_URL is not set: notices have no server to go to.')
const from = process.env.MAIL_FROM ?? 'Lineside <notices@lineside.example>'
const sendEveryMs = Number(process.env.NOTICE_POLL_SECONDS ?? 5) * 1000
const sweepEveryMs = 5 * 60_000

const mailer = smtpMailer({ url, from })
const ending = new AbortController()
const send = coalesced(() => drainNotices(mailer, ending.signal))
const look = coalesced(sweep)

await runWorker({
  name: 'send',
  tasks: { sendNotices: send, sweepNotices: look },
  concurrency: 2,
  crontab: '*/5 * * * * sweepNotices ?jobKey=sweepNotices&max=3',
  async beside(stopping) {
    stopping.addEventListener('abort', () => ending.abort())
    await Promise.all([
      poll({ name: 'send', everyMs: sendEveryMs, work: send }, stopping),
      poll({ name: 'sweep', everyMs: sweepEveryMs, work: look }, stopping),
    ])
  },
  atEnd: () => mailer.close(),
})
