import { startTestDatabases } from '@/lib/local/test-database.mjs'

/**
 * Gives test files a PostgreSQL with a migrated template. Under `npm test` one is up already and
 * named by TEST_DATABASE; a single file run by hand starts or joins the checkout's own.
 */
export default async function setup(): Promise<(() => Promise<void>) | undefined> {
  if (process.env.TEST_DATABASE) return undefined
  const databases = await startTestDatabases()
  process.env.TEST_DATABASE = databases.env.TEST_DATABASE
  return () => databases.release()
}
