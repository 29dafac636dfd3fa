import { existsSync } from 'node:fs'
import path from 'node:path'
import { run } from './children.mjs'
import { localPath, root } from './paths.mjs'
import { startPostgres } from './postgres.mjs'
import { dropDatabase, ensureDatabase, ensureRoles, withClient } from './roles.mjs'
import { say } from './say.mjs'

const tsx = ['--import', 'tsx']

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
  if (!existsSync(path.join(root, 'drizzle/meta/_journal.json'))) {
    say('No drizzle/ folder yet: the database stays empty.')
    return
  }
  await run('migrate', [...tsx, 'db/migrate.ts'], { env: databaseEnv(database) })
}

async function hasPeople(url) {
  return withClient(url, async (client) => {
    const table = await client.query(`select to_regclass('public.people') as people`)
    if (!table.rows[0].people) return true
    return (await client.query('select 1 from people limit 1')).rowCount > 0
  })
}

/** Fills an empty database with the demo; one that broke off half-way is made anew first. */
export async function seedIfEmpty(database, env) {
  const seed = 'db/demo/run.ts'
  if (!existsSync(path.join(root, seed))) return
  if (await hasPeople(database.ownerUrl)) return
  say('Filling the empty database with the demo ...')
  await run('seed', [...tsx, seed], { env: { ...databaseEnv(database), ...env } })
}

/** Empties one of our own databases, so that migrations and the demo start from nothing. */
export async function recreate(database) {
  await dropDatabase(database.ours.server, database.ours.name)
  await ensureDatabase(database.ours.server, database.ours.name)
}

/** Folder of uploaded and made files of one database. */
export const filesFolder = (name) => localPath('files', name)
