import { existsSync, readFileSync, writeFileSync } from 'node:fs'
import { appEnv } from './app-env.mjs'
import { nextBin } from './build.mjs'
import { household } from './children.mjs'
import { prepareDatabase } from './demo.mjs'
import { welcome } from './demo-people.mjs'
import { takeLock } from './lock.mjs'
import { startMail } from './mail.mjs'
import * as packages from './packages.mjs'
import { localPath } from './paths.mjs'
import { waitForPort, webPort } from './ports.mjs'
import { complain, say } from './say.mjs'
import { appSecrets, demoPassword } from './secrets.mjs'
import { databaseEnv, openDatabase, recreate } from './services.mjs'
import { addressOf, startWorkers } from './web.mjs'

const host = process.env.HOST || '127.0.0.1'
const has = (flag) => process.argv.includes(flag)
const house = household(has('--services') ? 'dev-services' : 'dev')
const envFile = () => localPath('dev.env')

/** A shell that has read `.local/dev.env` still means our own database and mail. */
function forgetOwnAddresses() {
  if (!existsSync(envFile())) return
  const lines = readFileSync(envFile(), 'utf8').split('\n')
  for (const name of ['DATABASE_URL', 'DATABASE_OWNER_URL', 'SMTP_URL', 'NEXTAUTH_URL']) {
    if (lines.includes(`${name}=${process.env[name]}`)) delete process.env[name]
  }
}

async function prepare() {
  packages.ensureNode()
  await packages.ensureNodeModules()
  if (!process.env.DATABASE_URL) packages.ensureDebianPackages(packages.neededToStart)
  return openDatabase('lineside_dev', { onEnd: house.onEnd })
}

/** `--services`: database and mail for whoever starts the rest by hand, told in `.local/dev.env`. */
async function servicesOnly() {
  takeLock('dev-services', (pid) => `Development services are up already (process ${pid}).`)
  const database = await prepare()
  const mail = await startMail(house, { remember: true, name: 'dev-mail' })
  const env = { ...appEnv({ database, mail, address: addressOf(host, 3100) }) }
  const lines = Object.entries({ ...env, ...databaseEnv(database) })
  const text = lines.map(([name, value]) => `${name}=${value}\n`).join('')
  writeFileSync(envFile(), text, { mode: 0o600 })
  // Services stay up over a broken migration: whoever mends it runs --migrate or --reset beside them.
  await prepareDatabase(database, env).catch(complain)
  say(`Database and mail are up; their addresses are in .local/dev.env. Mail: ${mail.page}`)
}

/** `--migrate` or `--reset` beside a running server: brings the database up to date and ends. */
async function databaseOnly() {
  const database = await prepare()
  if (has('--reset') && database.ours) await recreate(database)
  await prepareDatabase(database, { ...appSecrets(), DEMO_PASSWORD: demoPassword().value })
  say('The development database is up to date.')
  await house.end(0)
}

/** Pages and workers from the sources, with their output on the terminal. */
async function develop() {
  takeLock('dev', (pid) => `Development already runs from this checkout (process ${pid}).`)
  const port = await webPort(host)
  const database = await prepare()
  const mail = await startMail(house, { remember: true, name: 'dev-mail' })
  const env = appEnv({ database, mail, address: addressOf(host, port) })
  const seeded = await prepareDatabase(database, env)
  const args = [nextBin, 'dev', '-H', host, '-p', String(port)]
  const child = house.start('web', args, { env, show: true })
  startWorkers(house, env, { show: true, prefix: 'dev-' })
  await waitForPort(port, 'The development server', { gaveUp: child.isGone })
  say(welcome({ address: env.NEXTAUTH_URL, password: demoPassword().where, mail, seeded }))
}

try {
  forgetOwnAddresses()
  if (has('--services')) await servicesOnly()
  else if (has('--migrate') || has('--reset')) await databaseOnly()
  else await develop()
} catch (error) {
  if (!house.isEnding()) complain(error)
  await house.end(1)
}
