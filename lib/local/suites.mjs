import { existsSync, readFileSync, rmSync } from 'node:fs'
import { run } from './children.mjs'
import { localPath } from './paths.mjs'
import { complain, say } from './say.mjs'

const vitestBin = 'node_modules/vitest/vitest.mjs'
const playwrightBin = 'node_modules/@playwright/test/cli.js'

/** Whether the command ended with 0; its output goes to the terminal. */
async function succeeds(name, args, env) {
  try {
    await run(name, args, { env, show: true })
    return true
  } catch (error) {
    complain(error)
    return false
  }
}

const readResults = (file) => (existsSync(file) ? JSON.parse(readFileSync(file, 'utf8')) : null)

/** Counts of a suite; one that fell over without a failed test, or ran nothing, counts as failed. */
function settle(label, succeeded, counts) {
  const { passed, failed, skipped } = counts ?? { passed: 0, failed: 0, skipped: 0 }
  const ranNothing = passed + failed === 0
  if (ranNothing) say(`${label}: not one test ran.`)
  const hidden = failed === 0 && (ranNothing || !succeeded) ? 1 : 0
  return { label, passed, failed: failed + hidden, skipped }
}

function vitestCounts(results) {
  if (!results) return null
  return {
    passed: results.numPassedTests,
    failed: results.numFailedTests,
    skipped: results.numPendingTests + results.numTodoTests,
  }
}

function playwrightCounts(results) {
  if (!results) return null
  const { expected, unexpected, flaky, skipped } = results.stats
  return { passed: expected, failed: unexpected + flaky, skipped }
}

/** Runs one vitest project, or the files below `only`, and gives its counts. */
export async function vitestSuite(label, { project, only = [], env = {} }) {
  say(`\n== ${label}`)
  const file = localPath('results', `${label.replaceAll(/[^a-z0-9]+/gi, '-')}.json`)
  rmSync(file, { force: true })
  const report = ['--reporter=default', '--reporter=json', `--outputFile.json=${file}`]
  const args = [vitestBin, 'run', '--project', project, ...only, ...report]
  const succeeded = await succeeds(label, args, env)
  return settle(label, succeeded, vitestCounts(readResults(file)))
}

/** Runs the browser tests against the server that `env` names, and gives their counts. */
export async function browserSuite(label, { env, only = [] }) {
  say(`\n== ${label}`)
  const file = localPath('results', 'browser.json')
  rmSync(file, { force: true })
  const own = { PLAYWRIGHT_JSON_OUTPUT_FILE: file }
  const succeeded = await succeeds(label, [playwrightBin, 'test', ...only], { ...env, ...own })
  return settle(label, succeeded, playwrightCounts(readResults(file)))
}

const line = ({ passed, failed, skipped }) =>
  `${passed} passed, ${failed} failed${skipped > 0 ? `, ${skipped} skipped` : ''}`

/** Prints each suite and, as the last line, the total. Returns the exit code. */
export function report(suites) {
  say('\n== Summary')
  for (const suite of suites) say(`${suite.label}: ${line(suite)}`)
  const add = (key) => suites.reduce((sum, suite) => sum + suite[key], 0)
  const total = { passed: add('passed'), failed: add('failed'), skipped: add('skipped') }
  say(line(total))
  return total.failed > 0 || total.passed === 0 ? 1 : 0
}
