import { spawn } from 'node:child_process'
import { closeSync, openSync, readFileSync } from 'node:fs'
import { noteChild } from './orphans.mjs'
import { localPath, root } from './paths.mjs'
import { Stop, complain, say } from './say.mjs'

/**
 * Keeps what was started and ends it in the order of its list. A child that ends by itself ends
 * all the others; a signal does the same. Each child leads a process group of its own, so that
 * Ctrl-C reaches only this process, which then stops them one after the other.
 * @param command name of the lock that the command takes; its children are noted under it
 */
export function household(command) {
  const children = []
  const closers = []
  let ending = null

  async function end(code) {
    ending ??= (async () => {
      for (const pid of runningCommands) signalGroup(pid, 'SIGTERM')
      for (const child of inOrder(children)) await endChild(child)
      for (const pid of runningCommands) signalGroup(pid, 'SIGKILL')
      for (const close of closers.toReversed()) await close().catch(complain)
    })()
    await ending
    process.exit(code)
  }

  for (const [signal, code] of Object.entries({ SIGINT: 130, SIGTERM: 143, SIGHUP: 129 })) {
    process.on(signal, () => void end(code))
  }

  return {
    end,
    /** Adds what is closed after all children, the last added first. */
    onEnd: (close) => closers.push(close),
    isEnding: () => ending !== null,
    /** Starts a child that has to live as long as this process; `last` ends it after the others. */
    start(name, args, { env = {}, show = false, last = false } = {}) {
      if (ending) throw new Stop(`${name} is not started: everything is being stopped.`)
      const child = spawnChild(name, args, env, show)
      children.push({ ...child, last })
      const forget = noteChild(command, child.process.pid)
      child.process.once('exit', (code, signal) => {
        forget()
        if (ending) return
        say(`${name} ended (${signal ?? `exit ${code}`}); stopping everything.`)
        if (!show) say(lastLines(child.log))
        void end(1)
      })
      return child
    },
  }
}

/** As started, but what the others still write to while they end comes last. */
const inOrder = (children) => [
  ...children.filter((child) => !child.last),
  ...children.filter((child) => child.last),
]

function spawnChild(name, args, env, show) {
  const log = localPath('log', `${name}.log`)
  const out = show ? 'inherit' : openSync(log, 'w')
  const options = { cwd: root, env: { ...process.env, ...env }, detached: true }
  const child = spawn(process.execPath, args, { ...options, stdio: ['ignore', out, out] })
  if (!show) closeSync(out)
  return {
    name,
    log,
    process: child,
    isGone: () => child.exitCode !== null || child.signalCode !== null,
  }
}

/** The end of a log, for the person who has to find out why a child ended. */
export function lastLines(file, count = 40) {
  return readFileSync(file, 'utf8').trimEnd().split('\n').slice(-count).join('\n')
}

function signalGroup(pid, signal) {
  try {
    process.kill(-pid, signal)
  } catch (error) {
    if (error.code !== 'ESRCH') throw error
  }
}

/** SIGTERM to the child, SIGKILL to its group after ten seconds; resolves once it is gone. */
async function endChild(child) {
  if (!child.process.pid) return
  const gone = new Promise((resolve) => {
    if (child.isGone()) resolve()
    else child.process.once('exit', resolve)
  })
  if (!child.isGone()) child.process.kill('SIGTERM')
  const timer = setTimeout(() => signalGroup(child.process.pid, 'SIGKILL'), 10_000)
  await gone
  clearTimeout(timer)
  signalGroup(child.process.pid, 'SIGKILL')
}

/** Process groups of the commands that `run` waits for; a signal ends them too. */
const runningCommands = new Set()

/** Runs a command to its end; a Stop with its last lines where it fails. */
export function run(name, args, { env = {}, show = false, command = process.execPath } = {}) {
  const log = localPath('log', `${name}.log`)
  const out = show ? 'inherit' : openSync(log, 'w')
  const options = { cwd: root, env: { ...process.env, ...env }, detached: true }
  return new Promise((resolve, reject) => {
    const child = spawn(command, args, { ...options, stdio: ['ignore', out, out] })
    runningCommands.add(child.pid)
    if (!show) closeSync(out)
    child.once('error', reject)
    child.once('exit', (code, signal) => {
      runningCommands.delete(child.pid)
      if (code === 0) return resolve()
      const detail = show ? '' : `\n${lastLines(log)}`
      reject(new Stop(`${name} failed (${signal ?? `exit ${code}`}).${detail}`))
    })
  })
}
