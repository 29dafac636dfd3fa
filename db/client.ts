import { drizzle, type NodePgDatabase } from 'drizzle-orm/node-postgres'
import { Pool } from 'pg'

export type Db = NodePgDatabase
export type Tx = Parameters<Parameters<Db['transaction']>[0]>[0]

// On globalThis, because the development server loads modules anew on each change.
const held = globalThis as typeof globalThis & { linesidePool?: Pool }

/**
 * The process's pool, made at its first use: a build needs no database.
 * @throws Error where DATABASE_URL is not set.
 */
export function getPool(): Pool {
  if (held.linesidePool) return held.linesidePool
  const connectionString = process.env.DATABASE_URL
  if (!connectionString) throw new Error('DATABASE_URL is not set: no database to connect to.')
  const pool = new Pool({ connectionString, max: Number(process.env.DATABASE_POOL_SIZE ?? 10) })
  // A connection that the server closes must not end the process: idle or lent, its error is heard.
  const lost = (error: Error) => console.error('database connection lost:', error.message)
  pool.on('error', lost)
  pool.on('connect', (client) => client.on('error', lost))
  held.linesidePool = pool
  return pool
}

/** Drizzle on the process's pool. */
export function getDb(): Db {
  return drizzle(getPool(), { casing: 'snake_case' })
}

/** Runs `work` in one transaction; anything it throws rolls all of it back. */
export function withTransaction<T>(work: (tx: Tx) => Promise<T>): Promise<T> {
  return getDb().transaction(work)
}

/** Closes the pool, so that a process or a test file can end. */
export async function closeDb(): Promise<void> {
  const pool = held.linesidePool
  held.linesidePool = undefined
  await pool?.end()
}
