import { createHash, randomBytes } from 'node:crypto'

const secretBytes = 32

/** A secret of 256 random bits, base64url; `prefix` tells a reader what kind it is. */
export function newSecret(prefix = ''): string {
  return prefix + randomBytes(secretBytes).toString('base64url')
}

/**
 * What is kept of a secret: SHA-256, hex. A slow hash is for what people choose; 256 random bits
 * cannot be guessed.
 */
export function hashOfSecret(secret: string): string {
  return createHash('sha256').update(secret).digest('hex')
}
