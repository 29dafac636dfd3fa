import { writeFileSync } from 'node:fs'
import { household } from './children.mjs'
import { startMail } from './mail.mjs'
import { localPath } from './paths.mjs'
import { complain, say } from './say.mjs'
import { appSecrets } from './secrets.mjs'
import * as services from './services.mjs'

const house = household()

const has = (flag) => process.argv.includes(flag)

async function openDevDatabase(env) {
  const database = await services.openDatabase('lineside_dev', { onEnd: house.onEnd })
  if (has('--reset') && database.ours) await services.recreate(database)
  await services.migrate(database)
  await services.seedIfEmpty(database, env)
  return database
}

function devEnv() {
  return {
    ...appSecrets(),
    NEXTAUTH_URL: process.env.NEXTAUTH_URL || 'http://127.0.0.1:3100',
    DEMO_PASSWORD: process.env.DEMO_PASSWORD || 'lineside-demo-dev',
  }
}

/** Database and mail for whoever starts the rest by hand; the addresses go to `.local/dev.env`. */
async function servicesOnly() {
  const mail = await startMail(house, { remember: true, name: 'dev-mail' })
  const env = { ...devEnv(), SMTP_URL: mail.url, MAIL_PAGE_URL: mail.page ?? '' }
  const database = await openDevDatabase(env)
  const all = { ...services.databaseEnv(database), ...env }
  const lines = Object.entries(all).map(([name, value]) => `${name}=${value}`)
  writeFileSync(localPath('dev.env'), `${lines.join('\n')}\n`, { mode: 0o600 })
  say(`Database and mail are up; their addresses are in .local/dev.env. Mail: ${mail.page}`)
}

/** `--migrate` or `--reset` beside running services: brings the database up to date and ends. */
async function databaseOnly() {
  await openDevDatabase(devEnv())
  say('The development database is up to date.')
  await house.end(0)
}

try {
  if (has('--services')) await servicesOnly()
  else if (has('--migrate') || has('--reset')) await databaseOnly()
} catch (error) {
  complain(error)
  await house.end(1)
}
