import { randomBytes } from 'node:crypto'
import { chmodSync, existsSync, readFileSync, renameSync, writeFileSync } from 'node:fs'
import { localPath } from './paths.mjs'

const file = () => localPath('env.json')

/** What was made at the first start and kept for the next; empty before it. */
export function readKept() {
  return existsSync(file()) ? JSON.parse(readFileSync(file(), 'utf8')) : {}
}

/** Adds to what is kept in `.local/env.json`, readable by its owner alone. */
export function keep(values) {
  const next = { ...readKept(), ...values }
  const draft = `${file()}.${process.pid}`
  writeFileSync(draft, `${JSON.stringify(next, null, 2)}\n`, { mode: 0o600 })
  chmodSync(draft, 0o600)
  renameSync(draft, file())
  return next
}

const random = (bytes) => randomBytes(bytes).toString('base64url')

/** Kept value of a secret, made from `bytes` random bytes the first time it is asked for. */
export function secret(name, bytes = 24) {
  return readKept()[name] ?? keep({ [name]: random(bytes) })[name]
}

/** Secrets of the web server and the workers; the environment wins over what is kept. */
export function appSecrets() {
  return { NEXTAUTH_SECRET: process.env.NEXTAUTH_SECRET || secret('NEXTAUTH_SECRET', 32) }
}

/** Password of the demo people, and where a person finds it. */
export function demoPassword() {
  const given = process.env.DEMO_PASSWORD
  if (given) return { value: given, where: 'the value of DEMO_PASSWORD' }
  return { value: secret('DEMO_PASSWORD', 12), where: 'DEMO_PASSWORD in .local/env.json' }
}
