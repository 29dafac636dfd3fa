import { readdirSync, rmSync, writeFileSync } from 'node:fs'
import path from 'node:path'
import { localPath } from './paths.mjs'
import { isAlive, markOf, pidIn, readOr } from './process-mark.mjs'

const folder = (name) => path.dirname(localPath(`${name}.children`, 'any'))

/** Notes a child, for the case that its parent is killed before it can end it. */
export function noteChild(name, pid) {
  const file = path.join(folder(name), String(pid))
  writeFileSync(file, markOf(pid))
  return () => rmSync(file, { force: true })
}

/** Ends what a killed command of this name left running; call it once its lock is held. */
export function endOrphans(name) {
  for (const entry of readdirSync(folder(name))) {
    const file = path.join(folder(name), entry)
    const mark = readOr(file, '')
    if (isAlive(mark)) process.kill(-pidIn(mark), 'SIGKILL')
    rmSync(file, { force: true })
  }
}
