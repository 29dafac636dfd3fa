import { appEnv } from './app-env.mjs'
import { ensureBuild } from './build.mjs'
import { household } from './children.mjs'
import { prepareDatabase } from './demo.mjs'
import { welcome } from './demo-people.mjs'
import { takeLock } from './lock.mjs'
import { startMail } from './mail.mjs'
import * as packages from './packages.mjs'
import { webPort } from './ports.mjs'
import { complain, say } from './say.mjs'
import { demoPassword } from './secrets.mjs'
import { openDatabase } from './services.mjs'
import { addressOf, startWeb, startWorkers } from './web.mjs'

const house = household('start')
const host = process.env.HOST || '127.0.0.1'

async function prepare() {
  packages.ensureNode()
  takeLock('start', (pid) => `Lineside already runs from this checkout (process ${pid}).`)
  const port = await webPort(host)
  await packages.ensureNodeModules()
  if (!process.env.DATABASE_URL) packages.ensureDebianPackages(packages.neededToStart)
  return port
}

/** Packages, database, mail, build, web server, workers; ends by saying where everything is. */
async function start() {
  const port = await prepare()
  const database = await openDatabase('lineside', { onEnd: house.onEnd })
  const mail = await startMail(house, { remember: true })
  const env = appEnv({ database, mail, address: addressOf(host, port) })
  const seeded = await prepareDatabase(database, env)
  const distDir = await ensureBuild()
  await startWeb(house, { host, port, distDir, env })
  startWorkers(house, env)
  say(welcome({ address: env.NEXTAUTH_URL, password: demoPassword().where, mail, seeded }))
}

try {
  await start()
} catch (error) {
  if (!house.isEnding()) complain(error)
  await house.end(1)
}
