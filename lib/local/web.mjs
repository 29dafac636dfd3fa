import { existsSync } from 'node:fs'
import path from 'node:path'
import { nextBin } from './build.mjs'
import { root } from './paths.mjs'
import { waitForHttp, waitForPort } from './ports.mjs'

/** Address that a browser on this machine uses; also NEXTAUTH_URL, so that links lead here. */
export function addressOf(host, port) {
  const name = host === '0.0.0.0' || host === '::' ? '127.0.0.1' : host
  return `http://${name.includes(':') ? `[${name}]` : name}:${port}`
}

/** The two worker processes, each where its entry exists. */
export function startWorkers(house, env, { show = false, prefix = '' } = {}) {
  const NODE_ENV = show ? 'development' : 'production'
  for (const name of ['send', 'make']) {
    const entry = `lib/worker/${name}.ts`
    if (!existsSync(path.join(root, entry))) continue
    house.start(`${prefix}worker-${name}`, ['--import', 'tsx', entry], {
      env: { ...env, NODE_ENV },
      show,
    })
  }
}

/** Serves a finished build and resolves once its health door answers. */
export async function startWeb(house, { host, port, distDir, env, name = 'web' }) {
  const args = [nextBin, 'start', '-H', host, '-p', String(port)]
  const own = { LINESIDE_DIST_DIR: distDir, NODE_ENV: 'production', PORT: String(port) }
  const child = house.start(name, args, { env: { ...env, ...own } })
  const address = addressOf(host, port)
  const gaveUp = child.isGone
  await waitForPort(port, 'The web server', { host: new URL(address).hostname, gaveUp })
  await waitForHttp(`${address}/api/health`, 'The web server', { gaveUp })
  return address
}
