import { secret } from './secrets.mjs'

export const ownerRole = 'lineside_owner'
export const appRole = 'lineside_app'

const literal = (text) => `'${text.replaceAll("'", "''")}'`

async function ensureRole(client, role, password) {
  const { rowCount } = await client.query('select 1 from pg_roles where rolname = $1', [role])
  const verb = rowCount ? 'alter' : 'create'
  await client.query(`${verb} role ${role} login nosuperuser password ${literal(password)}`)
}

/** Runs `work` on a connection of its own; packages are there by the time this is called. */
export async function withClient(url, work) {
  const { default: pg } = await import('pg')
  const client = new pg.Client({ connectionString: url })
  await client.connect()
  try {
    return await work(client)
  } finally {
    await client.end()
  }
}

/** Makes the two roles with kept passwords: the owner migrates, the application serves. */
export async function ensureRoles(server) {
  const owner = secret('postgres:owner')
  const app = secret('postgres:app')
  await withClient(server.adminUrl, async (client) => {
    // Two processes at once would change the same catalog row, which PostgreSQL refuses.
    await client.query('select pg_advisory_lock(7305212)')
    await ensureRole(client, ownerRole, owner)
    await ensureRole(client, appRole, app)
  })
  return (database) => ({
    ownerUrl: server.urlFor(ownerRole, owner, database),
    appUrl: server.urlFor(appRole, app, database),
  })
}

/** Makes an empty database owned by the owner role; true if it was not there before. */
export async function ensureDatabase(server, database) {
  return withClient(server.adminUrl, async (client) => {
    const found = await client.query('select 1 from pg_database where datname = $1', [database])
    if (found.rowCount) return false
    await client.query(`create database "${database}" owner ${ownerRole}`)
    return true
  })
}

/** Drops a database with whoever is connected to it. */
export async function dropDatabase(server, database) {
  await withClient(server.adminUrl, (client) =>
    client.query(`drop database if exists "${database}" with (force)`),
  )
}
