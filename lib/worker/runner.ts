import { Logger, run, type Runner, type TaskList } from 'graphile-worker'
import { closeDb, getPool } from '@/db/client'
import { log } from '@/lib/services/log'

const levels = { error: 'error', warning: 'warn', info: 'debug', debug: 'trace' } as const

const logger = new Logger(() => (level, message) => {
  log[levels[level]](message)
})

interface Entry {
  name: string
  tasks: TaskList
  concurrency: number
  crontab?: string
  /** Runs beside the tasks until the signal; awaited at the end. */
  beside?: (stopping: AbortSignal) => Promise<void>
  /** Runs last, when nothing is under way any more. */
  atEnd?: () => void
}

/**
 * A worker process: takes jobs until SIGTERM or SIGINT, finishes what it has begun, and ends. A
 * killed process is no case of its own: jobs are nudges, and what must not be lost is in a table.
 */
export async function runWorker({ name, tasks, concurrency, crontab, beside, atEnd }: Entry) {
  const stopping = new AbortController()
  for (const signal of ['SIGTERM', 'SIGINT'] as const)
    process.once(signal, () => stopping.abort(signal))
  const runner = await run({
    pgPool: getPool(),
    taskList: tasks,
    concurrency,
    crontab,
    noHandleSignals: true,
    logger,
  })
  log.info({ worker: name, tasks: Object.keys(tasks) }, 'worker is ready')
  const besides = beside?.(stopping.signal)
  await ended(runner, stopping.signal)
  await besides
  atEnd?.()
  await closeDb()
  log.info({ worker: name }, 'worker has ended')
}

async function ended(runner: Runner, stopping: AbortSignal): Promise<void> {
  if (!stopping.aborted)
    await Promise.race([
      runner.promise,
      new Promise<void>((resolve) => stopping.addEventListener('abort', () => resolve())),
    ])
  if (stopping.aborted) await runner.stop()
}
