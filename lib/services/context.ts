import { can, jobCan, type Action, type JobActorName, type Role } from '@/lib/domain/access'
import { ServiceError } from '@/lib/services/errors'
import type { Db } from '@/db/client'

/** Who acts, on what database, at which instant. Time comes in here and nowhere else. */
export interface Context {
  actor: PersonActor | JobActor
  db: Db
  now: Date
  requestId: string
}

export interface PersonActor {
  kind: 'person'
  id: string
  name: string
  roles: Role[]
  zone: string
}

export interface JobActor {
  kind: 'job'
  name: JobActorName
}

/**
 * First statement of every service function, reads included.
 * @throws ServiceError `forbidden` when the actor may not.
 */
export function authorize(ctx: Context, action: Action): void {
  const { actor } = ctx
  if (actor.kind === 'job' ? jobCan(actor.name, action) : can(actor.roles, action)) return
  throw new ServiceError('forbidden', `Your roles do not allow this (${action}).`)
}

/** The person acting. @throws ServiceError `forbidden` for a job. */
export function personOf(ctx: Context): PersonActor {
  if (ctx.actor.kind === 'person') return ctx.actor
  throw new ServiceError('forbidden', 'Only a person can do this.')
}

/** The id recorded as who did it; null for a job. */
export function actorId(ctx: Context): string | null {
  return ctx.actor.kind === 'person' ? ctx.actor.id : null
}
