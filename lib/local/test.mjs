import { runBrowserTests } from './browser-tests.mjs'
import { household } from './children.mjs'
import { takeLock } from './lock.mjs'
import * as packages from './packages.mjs'
import { complain, say } from './say.mjs'
import { staticChecks } from './static-checks.mjs'
import { report, vitestSuite } from './suites.mjs'
import { forgetSurroundings, startTestDatabases } from './test-database.mjs'

// `npm test` runs everything. `npm test -- unit browser` runs only what is named.
const house = household('test')
const names = ['static', 'unit', 'zones', 'reference', 'integration', 'browser']
const asked = process.argv.slice(2)
const wants = (name) => asked.length === 0 || asked.includes(name)

/** Where a civil date falls on another day than in UTC, west and east of it. */
const otherZones = ['America/Los_Angeles', 'Pacific/Auckland']

async function withoutDatabase() {
  const suites = []
  const unit = { project: 'unit', env: { TZ: 'UTC' } }
  if (wants('unit')) suites.push(await vitestSuite('unit', unit))
  for (const zone of wants('zones') ? otherZones : []) {
    const options = { project: 'unit', only: ['tests/unit/clocks'], env: { TZ: zone } }
    suites.push(await vitestSuite(`unit, clocks in ${zone}`, options))
  }
  const reference = { project: 'reference', env: { TZ: 'UTC' } }
  if (wants('reference')) suites.push(await vitestSuite('reference', reference))
  return suites
}

async function withDatabase() {
  if (!wants('integration') && !wants('browser')) return []
  const suites = []
  const databases = await startTestDatabases({ clean: true })
  house.onEnd(databases.release)
  const integration = { project: 'integration', env: { ...databases.env, TZ: 'UTC' } }
  if (wants('integration')) suites.push(await vitestSuite('integration', integration))
  if (wants('browser')) suites.push(await runBrowserTests(house, databases))
  return suites
}

async function prepare() {
  const unknown = asked.filter((name) => !names.includes(name))
  if (unknown.length > 0) say(`Unknown: ${unknown.join(', ')}. There are: ${names.join(', ')}.`)
  packages.ensureNode()
  takeLock('test', (pid) => `Tests already run from this checkout (process ${pid}).`)
  await packages.ensureNodeModules()
  packages.ensureDebianPackages(packages.neededToTest)
  forgetSurroundings()
}

try {
  await prepare()
  const broken = wants('static') ? await staticChecks() : []
  const suites = [...(await withoutDatabase()), ...(await withDatabase())]
  if (broken.length > 0) say(`\nNot in order: ${broken.join(', ')}`)
  const code = report(suites)
  await house.end(broken.length > 0 ? 1 : code)
} catch (error) {
  if (!house.isEnding()) complain(error)
  await house.end(1)
}
