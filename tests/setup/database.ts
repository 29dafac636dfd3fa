import path from 'node:path'
import { Client } from 'pg'
import { afterAll, beforeAll, expect } from 'vitest'
import { closeDb, getDb, type Db } from '@/db/client'
import { cloneTemplate, type TestAccess } from '@/lib/local/test-database.mjs'

export interface TestDatabase {
  name: string
  /** Signs in as the application role: append-only tables refuse changes. */
  appUrl: string
  /** Signs in as the role that owns the schema. */
  ownerUrl: string
  drop(): Promise<void>
}

function access(): TestAccess {
  const text = process.env.TEST_DATABASE
  if (!text) throw new Error('No test PostgreSQL: is tests/setup/global.ts in the vitest project?')
  return JSON.parse(text) as TestAccess
}

/** Clones the migrated template. `label` makes the name readable for whoever looks at it later. */
export async function createTestDatabase(label = 'test'): Promise<TestDatabase> {
  const { adminUrl, template, urls } = access()
  const name = await cloneTemplate({ adminUrl, template }, label)
  const address = (url: string) => url.replace(/DATABASE$/, name)
  return {
    name,
    appUrl: address(urls.appUrl),
    ownerUrl: address(urls.ownerUrl),
    drop: () => dropDatabase(adminUrl, name),
  }
}

async function dropDatabase(adminUrl: string, name: string): Promise<void> {
  const client = new Client({ connectionString: adminUrl })
  await client.connect()
  try {
    await client.query(`drop database if exists ${client.escapeIdentifier(name)} with (force)`)
  } finally {
    await client.end()
  }
}

function labelOfFile(): string {
  const file = path.basename(expect.getState().testPath ?? 'test', '.test.ts')
  return file.toLowerCase().slice(0, 40)
}

/**
 * Call at the top of a test file: the file gets a database of its own, named by DATABASE_URL and
 * DATABASE_OWNER_URL, so that getDb() and the services reach it. Dropped at the end, kept where a
 * test of the file failed. The returned function gives the database once tests run.
 */
export function useTestDatabase(): () => TestDatabase & { db: Db } {
  let current: TestDatabase | undefined
  beforeAll(async () => {
    current = await createTestDatabase(labelOfFile())
    process.env.DATABASE_URL = current.appUrl
    process.env.DATABASE_OWNER_URL = current.ownerUrl
  })
  afterAll(async ({}, suite) => {
    await closeDb()
    if (suite.tasks.some(hasFailed)) console.error(`Kept for a look: database ${current?.name}`)
    else await current?.drop()
  })
  return () => {
    if (!current) throw new Error('The test database is there once tests run, not before.')
    return { ...current, db: getDb() }
  }
}

interface Task {
  type: string
  result?: { state: string }
  tasks?: Task[]
}

function hasFailed(task: Task): boolean {
  return task.result?.state === 'fail' || (task.tasks ?? []).some(hasFailed)
}
