import { run } from './children.mjs'
import { complain, say } from './say.mjs'

const checks = {
  format: ['node_modules/prettier/bin/prettier.cjs', '--check', '--log-level', 'warn', '.'],
  lint: ['node_modules/eslint/bin/eslint.js', '--max-warnings', '0', '.'],
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
