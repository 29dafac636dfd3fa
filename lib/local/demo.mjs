import { createHash } from 'node:crypto'
import { existsSync, rmSync, writeFileSync } from 'node:fs'
import path from 'node:path'
import { run } from './children.mjs'
import { localPath, root } from './paths.mjs'
import { withClient } from './roles.mjs'
import { say } from './say.mjs'
import { keep, readKept } from './secrets.mjs'
import { databaseEnv, migrate, recreate, tsx } from './services.mjs'

const seed = 'db/demo/run.ts'
const broken = (database) => localPath(`${database.ours?.name ?? 'database'}.seeding`)

async function countPeople(url, pattern) {
  return withClient(url, async (client) => {
    const found = await client.query('select 1 from people where email like $1 limit 1', [pattern])
    return found.rowCount
  })
}

async function fill(database, env) {
  say('Filling the empty database with the demo ...')
  writeFileSync(broken(database), '')
  await run('seed', [...tsx, seed], { env: { ...databaseEnv(database), ...env } })
  rmSync(broken(database), { force: true })
}

const passwordMark = (database) => `demoPasswordOf:${database.ours?.name ?? 'database'}`
const digest = (text) => createHash('sha256').update(text).digest('hex')

/** Gives the demo people the present DEMO_PASSWORD where they were made with another. */
async function agreeOnPassword(database, env) {
  const mark = passwordMark(database)
  const now = digest(env.DEMO_PASSWORD)
  const before = readKept()[mark]
  if (before === now) return
  if (before) {
    await run('demo-password', [...tsx, 'db/demo/set-password.ts'], {
      env: { ...databaseEnv(database), ...env },
    })
  }
  keep({ [mark]: now })
}

async function ensureDemo(database, env) {
  if (!existsSync(path.join(root, seed))) return false
  const isNew = (await countPeople(database.ownerUrl, '%')) === 0
  if (isNew) await fill(database, env)
  if ((await countPeople(database.ownerUrl, '%@demo.test')) === 0) return false
  if (isNew) keep({ [passwordMark(database)]: digest(env.DEMO_PASSWORD) })
  else if (database.ours) await agreeOnPassword(database, env)
  return true
}

/**
 * Brings the database to the present schema and fills an empty one with the demo. A demo that
 * broke off half-way in a database of ours is made anew from nothing; in a database of
 * DATABASE_URL nothing is ever dropped.
 * @returns whether the demo people are there to sign in as
 */
export async function prepareDatabase(database, env) {
  if (database.ours && existsSync(broken(database))) {
    await recreate(database)
    rmSync(broken(database))
  }
  await migrate(database)
  return ensureDemo(database, env)
}
