import { readFileSync, readdirSync } from 'node:fs'
import path from 'node:path'
import { household, run } from './children.mjs'
import { ensureDebianPackages, ensureNode, ensureNodeModules, neededToStart } from './packages.mjs'
import { complain, say } from './say.mjs'
import { databaseEnv, tsx } from './services.mjs'
import { cloneTemplate, forgetSurroundings, startTestDatabases } from './test-database.mjs'

// Every file of lib/local/bench, one after the other; `npm run bench -- name` runs those named so.
const house = household('bench')
const folder = path.join(import.meta.dirname, 'bench')
const asked = process.argv.slice(2)
const chosen = (file) => asked.length === 0 || asked.some((name) => file.includes(name))

/** A benchmark that reads DATABASE_URL gets a migrated, empty database of its own. */
async function databaseFor(file) {
  if (!readFileSync(path.join(folder, file), 'utf8').includes('DATABASE_URL')) return {}
  ensureDebianPackages(neededToStart)
  const databases = await startTestDatabases()
  house.onEnd(databases.release)
  return databaseEnv(databases.urlsOf(await cloneTemplate(databases, 'bench')))
}

try {
  ensureNode()
  await ensureNodeModules()
  forgetSurroundings()
  for (const file of readdirSync(folder).filter((name) => name.endsWith('.ts') && chosen(name))) {
    say(`\n== ${file}`)
    const env = await databaseFor(file)
    await run('bench', [...tsx, path.join('lib/local/bench', file)], { env, show: true })
  }
  await house.end(0)
} catch (error) {
  if (!house.isEnding()) complain(error)
  await house.end(1)
}
