import { sql } from 'drizzle-orm'
import type { Db, Tx } from '@/db/client'
import { jobs, type JobName, type JobPayload } from '@/lib/queue/jobs'

export interface EnqueueOptions {
  /** A waiting job with the same key is replaced, so that many nudges make one job. */
  jobKey?: string
  /** Earliest instant to run at; at once where it is absent. */
  runAt?: Date
  /** Attempts before the job is given up, with growing pauses between them; 25 where absent. */
  maxAttempts?: number
}

/**
 * Adds a job inside the caller's transaction: a rollback leaves none behind.
 * @throws ZodError where the payload is not of the job's shape.
 */
export async function enqueue<Name extends JobName>(
  tx: Tx | Db,
  name: Name,
  payload: JobPayload<Name>,
  { jobKey, runAt, maxAttempts }: EnqueueOptions = {},
): Promise<void> {
  const body = JSON.stringify(jobs[name].parse(payload))
  await tx.execute(sql`
    select graphile_worker.add_job(
      ${name}::text,
      payload => ${body}::json,
      run_at => ${runAt?.toISOString() ?? null}::timestamptz,
      max_attempts => ${maxAttempts ?? null}::integer,
      job_key => ${jobKey ?? null}::text
    )`)
}
