import { createHash } from 'node:crypto'
import { existsSync, readFileSync, readdirSync, statSync } from 'node:fs'
import path from 'node:path'
import { root } from './paths.mjs'

const folders = ['app', 'components', 'db', 'fonts', 'lib', 'public', 'templates']
const files = ['package-lock.json', 'package.json', 'tsconfig.json', 'next.config.ts']
const moreFiles = ['proxy.ts', 'postcss.config.mjs', 'tailwind.config.ts', 'instrumentation.ts']

// What never reaches the build: a change there must not cost a minute of building.
const outside = ['lib/local/', 'lib/worker/', 'db/demo/']

function filesBelow(folder) {
  const full = path.join(root, folder)
  if (!existsSync(full)) return []
  return readdirSync(full, { recursive: true })
    .map((name) => path.posix.join(folder, name))
    .filter((name) => !outside.some((prefix) => name.startsWith(prefix)))
    .filter((name) => statSync(path.join(root, name)).isFile())
}

/** Sixteen hex digits over path and content of everything that `next build` reads. */
export function sourceHash() {
  const single = [...files, ...moreFiles].filter((name) => existsSync(path.join(root, name)))
  const hash = createHash('sha256')
  for (const name of [...single, ...folders.flatMap(filesBelow)].sort()) {
    hash
      .update(name)
      .update('\0')
      .update(readFileSync(path.join(root, name)))
      .update('\0')
  }
  return hash.digest('hex').slice(0, 16)
}
