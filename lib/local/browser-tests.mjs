import { randomBytes } from 'node:crypto'
import { rmSync } from 'node:fs'
import { ensureBuild } from './build.mjs'
import { run } from './children.mjs'
import { startMail } from './mail.mjs'
import { freePort } from './ports.mjs'
import { complain, say } from './say.mjs'
import { databaseEnv, filesFolder, tsx } from './services.mjs'
import { browserSuite } from './suites.mjs'
import { cloneTemplate } from './test-database.mjs'
import { addressOf, startWeb, startWorkers } from './web.mjs'

const host = '127.0.0.1'
const label = 'browser'
const random = (bytes) => randomBytes(bytes).toString('base64url')

async function prepareServer(house, databases) {
  const distDir = await ensureBuild()
  const name = await cloneTemplate(databases, label)
  const port = await freePort()
  const mail = await startMail(house, { name: 'test-mail' })
  const env = {
    DATABASE_URL: databases.urlsOf(name).appUrl,
    DATABASE_OWNER_URL: '',
    DEMO_PASSWORD: random(12),
    FILES_DIR: filesFolder(name),
    MAIL_PAGE_URL: mail.page,
    NEXTAUTH_SECRET: random(32),
    NEXTAUTH_URL: addressOf(host, port),
    SMTP_URL: mail.url,
  }
  house.onEnd(async () => rmSync(env.FILES_DIR, { recursive: true, force: true }))
  const seedEnv = { ...env, ...databaseEnv(databases.urlsOf(name)) }
  await run('test-seed', [...tsx, 'db/demo/run.ts'], { env: seedEnv })
  await startWeb(house, { host, port, distDir, env, name: 'test-web' })
  startWorkers(house, env, { prefix: 'test-' })
  return env
}

/** Builds if need be, serves a demo of its own on a free port and drives it with a browser. */
export async function runBrowserTests(house, databases) {
  say('\n== browser: build, demo, server')
  try {
    const env = await prepareServer(house, databases)
    return await browserSuite(label, { env: { ...env, BASE_URL: env.NEXTAUTH_URL } })
  } catch (error) {
    complain(error)
    return { label, passed: 0, failed: 1, skipped: 0 }
  }
}
