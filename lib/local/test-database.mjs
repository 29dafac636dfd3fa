import { createHash, randomBytes } from 'node:crypto'
import { readFileSync, readdirSync } from 'node:fs'
import path from 'node:path'
import { run } from './children.mjs'
import { oneAtATime } from './lock.mjs'
import { root } from './paths.mjs'
import { startPostgres } from './postgres.mjs'
import { dropDatabase, ensureDatabase, ensureRoles, ownerRole, withClient } from './roles.mjs'
import { databaseEnv } from './services.mjs'

const sources = ['drizzle', 'db/migrate.ts', 'db/grants.ts', 'db/append-only.ts']
const moreSources = ['db/append-only-triggers.ts', 'node_modules/graphile-worker/package.json']

function addTo(hash, target) {
  const full = path.join(root, target)
  const names = target === 'drizzle' ? readdirSync(full, { recursive: true }).sort() : ['']
  for (const name of names) {
    if (target === 'drizzle' && !/\.(sql|json)$/.test(name)) continue
    hash.update(name).update(readFileSync(path.join(full, name)))
  }
}

/** Name of the template: a change of the migrations makes another one. */
function templateName() {
  const hash = createHash('sha256')
  for (const target of [...sources, ...moreSources]) addTo(hash, target)
  return `template_${hash.digest('hex').slice(0, 16)}`
}

async function isFinished(server, name) {
  return withClient(server.adminUrl, async (client) => {
    const query = 'select 1 from pg_database where datname = $1 and not datallowconn'
    return (await client.query(query, [name])).rowCount > 0
  })
}

/** Makes the template once: migrated as in production, then closed to connections. */
async function ensureTemplate(server, urlsOf) {
  const name = templateName()
  await oneAtATime('test-template', async () => {
    if (await isFinished(server, name)) return
    await dropDatabase(server, name)
    await ensureDatabase(server, name)
    await run('test-migrate', ['--import', 'tsx', 'db/migrate.ts'], {
      env: databaseEnv(urlsOf(name)),
    })
    await withClient(server.adminUrl, (client) =>
      client.query(`alter database "${name}" allow_connections false`),
    )
  })
  return name
}

/** A database of its own from the template; the caller drops it, or keeps it to look at. */
export async function cloneTemplate({ adminUrl, template }, label) {
  const name = `${label}_${randomBytes(4).toString('hex')}`.replaceAll(/[^a-z0-9_]/g, '_')
  await withClient(adminUrl, (client) =>
    client.query(`create database "${name}" template "${template}" owner ${ownerRole}`),
  )
  return name
}

const keptDatabases = `
  select datname as name from pg_database
  where datname not in ('template0', 'template1', 'postgres', $1)
    and not exists (select 1 from pg_stat_activity where pg_stat_activity.datname = pg_database.datname)`

/** Drops old templates and what earlier failed runs kept, except what somebody looks at. */
async function dropLeftovers(server, template) {
  const { rows } = await withClient(server.adminUrl, (client) =>
    client.query(keptDatabases, [template]),
  )
  for (const { name } of rows) await dropDatabase(server, name)
}

const surroundings = ['DATABASE_URL', 'DATABASE_OWNER_URL', 'SMTP_URL', 'NEXTAUTH_URL']
const moreSurroundings = ['NEXTAUTH_SECRET', 'DEMO_PASSWORD', 'FILES_DIR', 'TEST_DATABASE']

/** Tests use servers and secrets of their own, whatever this shell names. */
export function forgetSurroundings() {
  for (const name of [...surroundings, ...moreSurroundings]) delete process.env[name]
}

/**
 * Starts or joins the checkout's test PostgreSQL (no fsync: its data may be lost) with a migrated
 * template. `env` tells test files where it is; `release()` stops it after its last user.
 */
export async function startTestDatabases({ clean = false } = {}) {
  const server = await startPostgres('test-postgres', { fast: true })
  const urlsOf = await ensureRoles(server)
  const template = await ensureTemplate(server, urlsOf)
  if (clean) await dropLeftovers(server, template)
  const access = { adminUrl: server.adminUrl, template, urls: urlsOf('DATABASE') }
  return {
    ...access,
    server,
    urlsOf,
    env: { TEST_DATABASE: JSON.stringify(access) },
    release: server.release,
  }
}
