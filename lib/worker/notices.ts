import { setTimeout as pause } from 'node:timers/promises'
import type { Mailer } from '@/lib/domain/delivery'
import { log } from '@/lib/services/log'
import { sweepDigests } from '@/lib/services/notice-digest'
import { sendNotices } from '@/lib/services/notice-send'
import { sweepNotices } from '@/lib/services/notice-sweep'
import { jobContext } from '@/lib/worker/context'

/** Sends until nothing is due, or until no server answers. */
export async function drainNotices(mailer: Mailer, stopping?: AbortSignal): Promise<void> {
  for (;;) {
    if (stopping?.aborted) return
    const { taken, accepted, unreachable } = await sendNotices(jobContext('sendNotices'), {
      mailer,
    })
    if (taken > 0) log.info({ taken, accepted, unreachable }, 'notices handed over')
    if (taken === 0 || unreachable) return
  }
}

/** Looks for notices and morning digests that have become due. */
export async function sweep(): Promise<void> {
  const ctx = jobContext('sweepNotices')
  const queued = (await sweepNotices(ctx)) + (await sweepDigests(ctx))
  if (queued > 0) log.info({ queued }, 'notices queued')
}

/** One run at a time in this process; whoever asks meanwhile gets one more run after it. */
export function coalesced(work: () => Promise<void>): () => Promise<void> {
  let running: Promise<void> | undefined
  let following: Promise<void> | undefined
  const start = () => {
    running = work().finally(() => {
      running = undefined
    })
    return running
  }
  const startNext = () => {
    following = undefined
    return start()
  }
  return () => {
    if (!running) return start()
    following ??= running.then(startNext, startNext)
    return following
  }
}

interface Loop {
  everyMs: number
  work: () => Promise<void>
  name: string
}

/**
 * Does the work again and again: the floor under the job queue, for retries that are due, for
 * leases that ran out and for nudges that died with a worker.
 */
export async function poll({ everyMs, work, name }: Loop, stopping: AbortSignal): Promise<void> {
  while (!stopping.aborted) {
    await work().catch((error: unknown) => log.error({ error, loop: name }, 'a round failed'))
    await pause(everyMs, undefined, { signal: stopping }).catch(() => undefined)
  }
}
