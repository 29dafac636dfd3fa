import { createHash } from 'node:crypto'

/** SHA-256 (hex) of what a client sent, whatever the order of its keys; absent keys count as left out. */
export function hashOfInput(input: unknown): string {
  return createHash('sha256')
    .update(JSON.stringify(sorted(input)))
    .digest('hex')
}

function sorted(value: unknown): unknown {
  if (Array.isArray(value)) return value.map(sorted)
  if (value === null || typeof value !== 'object') return value
  const entries = Object.entries(value).filter(([, held]) => held !== undefined)
  return Object.fromEntries(
    entries.sort(([a], [b]) => (a < b ? -1 : 1)).map(([key, held]) => [key, sorted(held)]),
  )
}
