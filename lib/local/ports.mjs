import { createServer, connect } from 'node:net'
import { setTimeout as wait } from 'node:timers/promises'
import { Stop } from './say.mjs'

/** True where nobody listens on the port of this address. */
export function isPortFree(port, host = '127.0.0.1') {
  return new Promise((resolve) => {
    const probe = createServer()
    probe.once('error', () => resolve(false))
    probe.listen({ port, host }, () => probe.close(() => resolve(true)))
  })
}

/** A port the system hands out as free at this moment. */
export function freePort(host = '127.0.0.1') {
  return new Promise((resolve, reject) => {
    const probe = createServer()
    probe.once('error', reject)
    probe.listen({ port: 0, host }, () => {
      const { port } = probe.address()
      probe.close(() => resolve(port))
    })
  })
}

/** The remembered port while it is free, another one otherwise. */
export async function keptOrFreePort(remembered) {
  if (remembered && (await isPortFree(remembered))) return remembered
  return freePort()
}

/** Port of the web server: PORT or a one-line refusal, else the first free from `first` up. */
export async function webPort(host, first = 3000) {
  const asked = process.env.PORT
  if (asked !== undefined && asked !== '') {
    const port = Number(asked)
    if (!Number.isInteger(port) || port < 1 || port > 65535) {
      throw new Stop(`PORT is "${asked}"; a port is a whole number from 1 to 65535.`)
    }
    if (!(await isPortFree(port, host))) {
      throw new Stop(`Port ${port} is taken. Free it, or start with another PORT.`)
    }
    return port
  }
  for (let port = first; port < first + 100; port += 1) {
    if (await isPortFree(port, host)) return port
  }
  throw new Stop(`No free port between ${first} and ${first + 99}. Set PORT.`)
}

/** True where somebody takes connections on the port. */
export function accepts(port, host) {
  return new Promise((resolve) => {
    const socket = connect({ port, host })
    socket.once('connect', () => resolve(socket.destroy() && true))
    socket.once('error', () => resolve(false))
  })
}

async function until(check, what, timeoutMs, gaveUp) {
  const end = Date.now() + timeoutMs
  while (Date.now() < end) {
    if (gaveUp?.()) throw new Stop(`${what} ended before it was ready.`)
    if (await check()) return
    await wait(150)
  }
  throw new Stop(`${what} was not ready after ${Math.round(timeoutMs / 1000)} seconds.`)
}

/** Resolves once the port takes connections; `gaveUp` says that its process is gone. */
export function waitForPort(port, what, { host = '127.0.0.1', timeoutMs = 30_000, gaveUp } = {}) {
  return until(() => accepts(port, host), what, timeoutMs, gaveUp)
}

/** Resolves once the address answers below 500 (a missing health door counts as up). */
export function waitForHttp(url, what, { timeoutMs = 60_000, gaveUp } = {}) {
  const check = async () => {
    try {
      const answer = await fetch(url, { signal: AbortSignal.timeout(10_000) })
      await answer.arrayBuffer()
      return answer.status < 500
    } catch {
      return false
    }
  }
  return until(check, what, timeoutMs, gaveUp)
}
