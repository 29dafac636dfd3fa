import { household } from './children.mjs'
import { ensureNode, ensureNodeModules } from './packages.mjs'
import { complain, say } from './say.mjs'
import { staticChecks } from './static-checks.mjs'
import { report, vitestSuite } from './suites.mjs'

// Format, lint, types and unit tests: what takes under a minute and needs no database.
const house = household('check')

try {
  ensureNode()
  await ensureNodeModules()
  const broken = await staticChecks()
  const code = report([await vitestSuite('unit', { project: 'unit', env: { TZ: 'UTC' } })])
  if (broken.length > 0) say(`Not in order: ${broken.join(', ')}`)
  await house.end(broken.length > 0 ? 1 : code)
} catch (error) {
  complain(error)
  await house.end(1)
}
