import { run } from './children.mjs'
import { localPath } from './paths.mjs'
import { startPostgres } from './postgres.mjs'
import { dropDatabase, ensureDatabase, ensureRoles } from './roles.mjs'

/** Arguments that let Node run TypeScript. */
export const tsx = ['--import', 'tsx']

/** Database of the environment, or one of ours by name; `onEnd` learns how to let go of it. */
export async function openDatabase(name, { onEnd, server = 'postgres', fast = false } = {}) {
  if (process.env.DATABASE_URL) {
    const appUrl = process.env.DATABASE_URL
    return { appUrl, ownerUrl: process.env.DATABASE_OWNER_URL || appUrl, ours: null }
  }
  const running = await startPostgres(server, { fast })
  onEnd?.(() => running.release())
  const urlsOf = await ensureRoles(running)
  await ensureDatabase(running, name)
  return { ...urlsOf(name), ours: { server: running, name } }
}

export const databaseEnv = ({ appUrl, ownerUrl }) => ({
  DATABASE_URL: appUrl,
  DATABASE_OWNER_URL: ownerUrl,
})

/** Migrations, guards and rights, as the owner. */
export async function migrate(database) {
  await run('migrate', [...tsx, 'db/migrate.ts'], { env: databaseEnv(database) })
}

/** Empties one of our own databases, so that migrations and the demo start from nothing. */
export async function recreate(database) {
  await dropDatabase(database.ours.server, database.ours.name)
  await ensureDatabase(database.ours.server, database.ours.name)
}

/** Folder of uploaded and made files of one database. */
export const filesFolder = (name) => localPath('files', name)
