import { run } from './children.mjs'
import { complain, say } from './say.mjs'

const prettier = ['node_modules/prettier/bin/prettier.cjs', '--check', '--log-level', 'warn']
const eslint = ['node_modules/eslint/bin/eslint.js', '--max-warnings', '0']
const cache = (name) => ['--cache', '--cache-location', `.local/cache/${name}`]

const checks = {
  format: [...prettier, ...cache('prettier'), '.'],
  lint: [...eslint, ...cache('eslint'), '.'],
  types: ['node_modules/typescript/bin/tsc', '--noEmit', '-p', 'tsconfig.json'],
}

/** Format, lint and types. @returns the names of those that failed */
export async function staticChecks() {
  const failed = []
  for (const [name, args] of Object.entries(checks)) {
    say(`\n== ${name}`)
    try {
      await run(name, args, { show: true })
      say(`${name}: in order`)
    } catch (error) {
      complain(error)
      failed.push(name)
    }
  }
  return failed
}
