import { spawnSync } from 'node:child_process'
import { existsSync, readdirSync, statSync } from 'node:fs'
import path from 'node:path'
import { run } from './children.mjs'
import { oneAtATime } from './lock.mjs'
import { isRoot, root } from './paths.mjs'
import { binFolder } from './postgres.mjs'
import { Stop, say } from './say.mjs'

const onPath = (name) =>
  (process.env.PATH ?? '').split(':').some((folder) => existsSync(path.join(folder, name)))

const hasFonts = () => {
  const folder = '/usr/share/fonts/truetype'
  return existsSync(folder) && readdirSync(folder).length > 0
}

/** Debian packages and how to tell that each is there. */
const debianPackages = {
  postgresql: () => binFolder() !== null,
  chromium: () => onPath('chromium'),
  'libreoffice-writer-nogui': () => onPath('soffice'),
  'poppler-utils': () => onPath('pdftoppm'),
  'fonts-liberation': hasFonts,
}

export const neededToStart = ['postgresql']
export const neededToTest = Object.keys(debianPackages)

function aptGet(args) {
  const env = { ...process.env, DEBIAN_FRONTEND: 'noninteractive' }
  const done = spawnSync('apt-get', ['-o', 'DPkg::Lock::Timeout=300', ...args], {
    env,
    stdio: ['ignore', 'ignore', 'inherit'],
  })
  return done.status === 0
}

/** Debian packages: installs what is missing as root, else says in one line what to type. */
export function ensureDebianPackages(names) {
  const missing = names.filter((name) => !debianPackages[name]())
  if (missing.length === 0) return
  const advice = `sudo apt-get install ${missing.join(' ')}`
  if (!isRoot) throw new Stop(`Missing on this machine: ${missing.join(', ')}. Type: ${advice}`)
  say(`Installing ${missing.join(', ')} ...`)
  const done =
    aptGet(['update']) && aptGet(['install', '-y', '--no-install-recommends', ...missing])
  if (!done) throw new Stop(`The installation failed. Look at: ${advice}`)
}

const modulesAreFresh = () => {
  const installed = path.join(root, 'node_modules/.package-lock.json')
  if (!existsSync(installed)) return false
  return statSync(installed).mtimeMs >= statSync(path.join(root, 'package-lock.json')).mtimeMs
}

/** `npm ci` where node_modules is missing or older than the lock. */
export async function ensureNodeModules() {
  await oneAtATime('npm-ci', async () => {
    if (modulesAreFresh()) return
    say('Installing the packages of package-lock.json (about a minute) ...')
    await run('npm', ['ci', '--no-audit', '--no-fund'], { command: 'npm' })
  })
}

/** Says in one line where Node is another than package.json asks for. */
export function ensureNode() {
  const [major, minor] = process.versions.node.split('.').map(Number)
  if (major === 20 && minor >= 9) return
  throw new Stop(`Node ${process.versions.node} found; Lineside needs Node 20 (20.9 or newer).`)
}
