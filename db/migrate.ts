import path from 'node:path'
import { pathToFileURL } from 'node:url'
import { drizzle } from 'drizzle-orm/node-postgres'
import { migrate } from 'drizzle-orm/node-postgres/migrator'
import { Logger, runMigrations } from 'graphile-worker'
import { Client, Pool } from 'pg'
import { guardAppendOnlyTables } from '@/db/append-only-triggers'
import { guardFrozenExhibits } from '@/db/frozen-triggers'
import { grantToApplication } from '@/db/grants'

const folder = path.join(import.meta.dirname, '../drizzle')
const lockNumber = 7_305_211

const quiet = new Logger(() => () => undefined)

async function migrateJobs(ownerUrl: string): Promise<void> {
  const pgPool = new Pool({ connectionString: ownerUrl, max: 2 })
  for (const event of ['error', 'connect'] as const) pgPool.on(event, () => undefined)
  try {
    await runMigrations({ pgPool, logger: quiet })
  } finally {
    await pgPool.end()
  }
}

async function finish(client: Client, applicationRole: string | null): Promise<void> {
  await client.query('begin')
  await guardAppendOnlyTables(client)
  await guardFrozenExhibits(client)
  if (applicationRole) await grantToApplication(client, applicationRole)
  await client.query('commit')
}

/**
 * Brings a database to the present schema: our migrations, the job queue's own, the guards of the
 * append-only tables, the rights of the application role. Safe to run again and at the same time.
 * @param applicationRole null where owner and application are one role: then the guards stand alone
 */
export async function migrateDatabase(
  ownerUrl: string,
  applicationRole: string | null,
): Promise<void> {
  const client = new Client({ connectionString: ownerUrl })
  await client.connect()
  try {
    await client.query('set client_min_messages = warning')
    await client.query('select pg_advisory_lock($1)', [lockNumber])
    await migrate(drizzle(client), { migrationsFolder: folder })
    await migrateJobs(ownerUrl)
    await finish(client, applicationRole)
  } finally {
    await client.end()
  }
}

/** Role that the web server and the workers sign in with, null where it is the owner itself. */
export function applicationRoleOf(applicationUrl: string, ownerUrl: string): string | null {
  const role = decodeURIComponent(new URL(applicationUrl).username)
  return role === decodeURIComponent(new URL(ownerUrl).username) ? null : role
}

async function main(): Promise<void> {
  const applicationUrl = process.env.DATABASE_URL
  const ownerUrl = process.env.DATABASE_OWNER_URL ?? applicationUrl
  if (!applicationUrl || !ownerUrl) throw new Error('DATABASE_URL is not set: nothing to migrate.')
  await migrateDatabase(ownerUrl, applicationRoleOf(applicationUrl, ownerUrl))
}

if (import.meta.url === pathToFileURL(process.argv[1] ?? '').href) {
  await main().catch((error: Error) => {
    console.error(error.cause instanceof Error ? error.cause.message : error.message)
    process.exitCode = 1
  })
}
