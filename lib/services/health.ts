import { connect } from 'node:net'
import { sql } from 'drizzle-orm'
import { type Db, getDb } from '@/db/client'
import { getFileStore } from '@/lib/files/store'
import type { Health, Standing } from '@/lib/schemas/health'
import { log } from '@/lib/services/log'

const answerWithinMs = 2000
/** A job that could run and was not taken for so long says that its worker is away. Minutes. */
const jobPatienceMinutes = 5

const freshMs = 2000
let last: { at: number; answer: Promise<Health> } | undefined

/**
 * Which parts of the product answer. Tells no names, versions or addresses; asks the parts at most
 * every two seconds, because the door is open to everybody.
 */
export function getHealth(): Promise<Health> {
  if (!last || Date.now() - last.at > freshMs) last = { at: Date.now(), answer: readHealth() }
  return last.answer
}

async function readHealth(): Promise<Health> {
  const db = getDb()
  const [database, jobs, mail, files, records] = await Promise.all([
    standingOf('database', () => db.execute(sql`select 1`)),
    standingOf('jobs', () => checkJobs(db)),
    standingOf('mail', checkMail),
    standingOf('files', () => getFileStore().check()),
    guardOf(db),
  ])
  const isDown = [database, jobs, mail, files].includes('down')
  return { status: isDown ? 'down' : 'ok', database, jobs, mail, files, records }
}

async function standingOf(part: string, check: () => Promise<unknown>): Promise<Standing> {
  let timer: NodeJS.Timeout | undefined
  const late = new Promise<never>((_resolve, reject) => {
    timer = setTimeout(() => reject(new Error('no answer in time')), answerWithinMs)
  })
  try {
    await Promise.race([check(), late])
    return 'ok'
  } catch (error) {
    log.warn({ part, error }, 'a part does not answer')
    return 'down'
  } finally {
    clearTimeout(timer)
  }
}

async function checkJobs(db: Db): Promise<void> {
  const { rows } = await db.execute<{ waiting: number }>(sql`
    select count(*)::int as waiting from graphile_worker.jobs
    where locked_at is null and attempts < max_attempts
      and run_at < now() - make_interval(mins => ${jobPatienceMinutes})`)
  const waiting = rows[0]?.waiting ?? 0
  if (waiting > 0) throw new Error(`${waiting} jobs wait for a worker`)
}

async function checkMail(): Promise<void> {
  const given = process.env.SMTP_URL
  if (!given) throw new Error('SMTP_URL is not set: no mail server to reach.')
  const url = new URL(given)
  const port = Number(url.port || (url.protocol === 'smtps:' ? 465 : 587))
  return new Promise((resolve, reject) => {
    const socket = connect({ host: url.hostname, port, timeout: answerWithinMs })
    const end = (act: () => void) => {
      socket.destroy()
      act()
    }
    socket.once('connect', () => end(resolve))
    socket.once('timeout', () => end(() => reject(new Error('no answer in time'))))
    socket.once('error', (error) => end(() => reject(error)))
  })
}

async function guardOf(db: Db): Promise<Health['records']> {
  try {
    const { rows } = await db.execute<{ writable: boolean }>(
      sql`select has_table_privilege('facts', 'UPDATE') as writable`,
    )
    return rows[0]?.writable === false ? 'role_and_triggers' : 'triggers_only'
  } catch {
    return 'triggers_only'
  }
}
