import { existsSync, mkdirSync, readFileSync, readdirSync, rmSync, writeFileSync } from 'node:fs'
import path from 'node:path'
import { setTimeout as wait } from 'node:timers/promises'
import { localPath } from './paths.mjs'
import { Stop } from './say.mjs'

/** True while the process lives, also where it belongs to another user. */
export function isAlive(pid) {
  if (!Number.isInteger(pid) || pid <= 0) return false
  try {
    process.kill(pid, 0)
    return true
  } catch (error) {
    return error.code === 'EPERM'
  }
}

function holderOf(file) {
  try {
    return Number(readFileSync(file, 'utf8'))
  } catch {
    return 0
  }
}

function tryTake(file) {
  try {
    writeFileSync(file, String(process.pid), { flag: 'wx' })
    return true
  } catch (error) {
    if (error.code !== 'EEXIST') throw error
    const holder = holderOf(file)
    if (holder === process.pid) return true
    if (!isAlive(holder)) rmSync(file, { force: true })
    return false
  }
}

/** Takes the lock for this process's life or refuses in one line; returns its release. */
export function takeLock(name, refusal) {
  const file = localPath(`${name}.lock`)
  if (!tryTake(file) && !tryTake(file)) throw new Stop(refusal(holderOf(file)))
  const release = () => {
    if (holderOf(file) === process.pid) rmSync(file, { force: true })
  }
  process.once('exit', release)
  return release
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

const usersFolder = (name) => localPath(`${name}.users`, '.')

/** Process ids noted as users of a shared thing; some may have died since. */
export function usersOf(name) {
  const folder = usersFolder(name)
  return existsSync(folder) ? readdirSync(folder).map(Number) : []
}

/** Notes this process as a user; the returned leave() says whether it was the last one alive. */
export function joinUsers(name) {
  const folder = usersFolder(name)
  mkdirSync(folder, { recursive: true })
  writeFileSync(path.join(folder, String(process.pid)), '')
  return function leave() {
    rmSync(path.join(folder, String(process.pid)), { force: true })
    const [alive, dead] = [usersOf(name).filter(isAlive), usersOf(name).filter((p) => !isAlive(p))]
    for (const pid of dead) rmSync(path.join(folder, String(pid)), { force: true })
    return alive.length === 0
  }
}
