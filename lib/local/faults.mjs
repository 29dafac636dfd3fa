import { household } from './children.mjs'
import { takeLock } from './lock.mjs'
import * as packages from './packages.mjs'
import { complain } from './say.mjs'
import { report, vitestSuite } from './suites.mjs'
import { forgetSurroundings, startTestDatabases } from './test-database.mjs'

// Tests that kill processes and fill limits, apart from `npm test` because they take minutes.
const house = household('faults')

try {
  packages.ensureNode()
  takeLock('faults', (pid) => `Fault tests already run from this checkout (process ${pid}).`)
  await packages.ensureNodeModules()
  packages.ensureDebianPackages(packages.neededToTest)
  forgetSurroundings()
  const databases = await startTestDatabases()
  house.onEnd(databases.release)
  const env = { ...databases.env, TZ: 'UTC' }
  await house.end(report([await vitestSuite('faults', { project: 'faults', env })]))
} catch (error) {
  if (!house.isEnding()) complain(error)
  await house.end(1)
}
