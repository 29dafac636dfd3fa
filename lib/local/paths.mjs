import { createHash } from 'node:crypto'
import { mkdirSync } from 'node:fs'
import path from 'node:path'

/** Root of the checkout, where package.json is. */
export const root = path.resolve(import.meta.dirname, '../..')

const usualFolder = path.join(root, '.local')

/**
 * Folder of everything made on this machine; ignored by git. LINESIDE_LOCAL names another, which
 * lets the tests of the start command run beside a started Lineside.
 */
export const localFolder = process.env.LINESIDE_LOCAL || usualFolder
export const isUsualFolder = localFolder === usualFolder

/** Builds lie in the checkout whatever the folder: Next wants them below its root. */
export const buildsFolder = usualFolder

/** Twelve hex digits that tell this checkout from another on the same machine. */
export const checkoutKey = createHash('sha256').update(localFolder).digest('hex').slice(0, 12)

/** Absolute path inside `.local`, whose folder is made if it is missing. */
export function localPath(...parts) {
  const target = path.join(localFolder, ...parts)
  mkdirSync(path.dirname(target), { recursive: true })
  return target
}

export const isRoot = process.getuid?.() === 0
