import { randomUUID } from 'node:crypto'
import { getDb } from '@/db/client'
import type { JobActorName } from '@/lib/domain/access'
import type { Context } from '@/lib/services/context'

/** Who a job acts as, at the instant it begins. */
export function jobContext(name: JobActorName, now = new Date()): Context {
  return { actor: { kind: 'job', name }, db: getDb(), now, requestId: randomUUID() }
}
