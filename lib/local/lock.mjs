import { mkdirSync, readFileSync, readdirSync, rmSync, writeFileSync } from 'node:fs'
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

/** Notes this process as a user of a shared thing; returns a leave() that says if it was the last. */
export function joinUsers(name) {
  const folder = localPath(`${name}.users`, '.')
  mkdirSync(folder, { recursive: true })
  const mine = path.join(folder, String(process.pid))
  writeFileSync(mine, '')
  return function leave() {
    rmSync(mine, { force: true })
    const others = readdirSync(folder).filter((pid) => {
      if (isAlive(Number(pid))) return true
      rmSync(path.join(folder, pid), { force: true })
      return false
    })
    return others.length === 0
  }
}
