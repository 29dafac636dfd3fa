import { existsSync, linkSync, mkdirSync, readdirSync, rmSync, writeFileSync } from 'node:fs'
import path from 'node:path'
import { setTimeout as wait } from 'node:timers/promises'
import { endOrphans } from './orphans.mjs'
import { localPath } from './paths.mjs'
import { isAlive, markOf, pidIn, readOr } from './process-mark.mjs'
import { Stop } from './say.mjs'

/** Takes a lock file in one step: it appears with its content or not at all. */
function tryTake(file) {
  const draft = `${file}.${process.pid}`
  writeFileSync(draft, markOf(process.pid))
  try {
    linkSync(draft, file)
    return true
  } catch (error) {
    if (error.code !== 'EEXIST') throw error
    if (!isAlive(readOr(file, ''))) rmSync(file, { force: true })
    return false
  } finally {
    rmSync(draft, { force: true })
  }
}

/**
 * Takes the lock for this process's life; `refusal(pid)` is the one line for whoever comes second.
 * What an earlier, killed holder left running is ended.
 */
export function takeLock(name, refusal) {
  const file = localPath(`${name}.lock`)
  if (!tryTake(file) && !tryTake(file)) throw new Stop(refusal(pidIn(readOr(file, ''))))
  process.once('exit', () => {
    if (readOr(file, '') === markOf(process.pid)) rmSync(file, { force: true })
  })
  endOrphans(name)
}

/** Runs `work` while no other process of this checkout runs under the same name. */
export async function oneAtATime(name, work) {
  const file = localPath(`${name}.lock`)
  while (!tryTake(file)) await wait(100)
  try {
    return await work()
  } finally {
    rmSync(file, { force: true })
  }
}

const usersFolder = (name) => localPath(`${name}.users`)

/** Marks of the living users of a shared thing; the dead are forgotten on the way. */
function livingUsers(name) {
  const folder = usersFolder(name)
  if (!existsSync(folder)) return []
  const files = readdirSync(folder).map((file) => path.join(folder, file))
  const dead = files.filter((file) => !isAlive(readOr(file, '')))
  for (const file of dead) rmSync(file, { force: true })
  return files.filter((file) => !dead.includes(file))
}

export const isInUse = (name) => livingUsers(name).length > 0

/** Notes this process as a user; the returned leave() says whether it was the last one alive. */
export function joinUsers(name) {
  const folder = usersFolder(name)
  mkdirSync(folder, { recursive: true })
  const mine = path.join(folder, String(process.pid))
  writeFileSync(mine, markOf(process.pid))
  return function leave() {
    rmSync(mine, { force: true })
    return !isInUse(name)
  }
}
