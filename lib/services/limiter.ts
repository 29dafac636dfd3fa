import { eq, lt, sql } from 'drizzle-orm'
import type { Db } from '@/db/client'
import { attempts } from '@/db/schema/people'
import { ServiceError } from '@/lib/services/errors'

/** How many tries a key has within a window, and how long it is blocked after. Milliseconds. */
export interface Limit {
  key: string
  tries: number
  windowMs: number
}

const minute = 60_000

/**
 * Tries of sign-in from one network address (a whole office may share it), then for one address: a
 * network that is blocked makes no more rows with addresses it thinks up.
 */
export function signInLimits(email: string, network: string): Limit[] {
  return [
    { key: `sign-in:network:${network}`, tries: 100, windowMs: 15 * minute },
    { key: `sign-in:address:${email}`, tries: 10, windowMs: 15 * minute },
  ]
}

/** Requests for a reset link: each one sends an e-mail. */
export function resetLimits(email: string, network: string): Limit[] {
  return [
    { key: `reset:network:${network}`, tries: 40, windowMs: 60 * minute },
    { key: `reset:address:${email}`, tries: 4, windowMs: 60 * minute },
  ]
}

/** Tries of one's present password when choosing another. */
export function passwordLimits(personId: string): Limit[] {
  return [{ key: `password:${personId}`, tries: 10, windowMs: 15 * minute }]
}

/**
 * Counts a try against every limit before it is made, so that a hundred at the same moment are a
 * hundred. Counting goes on in the database: any number of web servers share it.
 * @throws ServiceError `too_often` with the seconds to wait
 */
export async function takeTry(db: Db, limits: readonly Limit[], now: Date): Promise<void> {
  for (const limit of limits) {
    const waitSeconds = await countTry(db, limit, now)
    if (waitSeconds > 0) throw tooOften(waitSeconds)
  }
}

/** Gives the tries back after a success: only failures count. */
export async function forgiveTry(db: Db, limits: readonly Limit[]): Promise<void> {
  for (const { key } of limits) {
    const isShared = key.includes(':network:')
    if (!isShared) await db.delete(attempts).where(eq(attempts.key, key))
    else {
      await db
        .update(attempts)
        .set({ count: sql`greatest(0, ${attempts.count} - 1)` })
        .where(eq(attempts.key, key))
    }
  }
}

async function countTry(db: Db, { key, tries, windowMs }: Limit, now: Date): Promise<number> {
  const isOver = sql`attempts.window_starts_at <= ${new Date(now.getTime() - windowMs)}`
  const [row] = await db
    .insert(attempts)
    .values({ key, count: 1, windowStartsAt: now })
    .onConflictDoUpdate({
      target: attempts.key,
      set: {
        count: sql`case when ${isOver} then 1 else attempts.count + 1 end`,
        windowStartsAt: sql`case when ${isOver} then excluded.window_starts_at else attempts.window_starts_at end`,
      },
    })
    .returning()
  if (row?.count === 1) await forgetOld(db, now)
  if (!row || row.count <= tries) return 0
  const endsAt = row.windowStartsAt.getTime() + windowMs
  return Math.max(1, Math.ceil((endsAt - now.getTime()) / 1000))
}

async function forgetOld(db: Db, now: Date): Promise<void> {
  const dayAgo = new Date(now.getTime() - 24 * 60 * minute)
  await db.delete(attempts).where(lt(attempts.windowStartsAt, dayAgo))
}

function tooOften(waitSeconds: number): ServiceError {
  const minutes = Math.ceil(waitSeconds / 60)
  const wait = minutes === 1 ? '1 minute' : `${minutes} minutes`
  return new ServiceError(
    'too_often',
    `Too many tries. Wait ${wait}, then try again.`,
    [],
    waitSeconds,
  )
}
