import { hash, verify } from '@node-rs/argon2'

/**
 * Argon2id (RFC 9106) with the library's defaults: 19 MiB, two passes, one lane, the first
 * choice of the OWASP password storage sheet.
 */
export function hashPassword(password: string): Promise<string> {
  return hash(password)
}

// A hash nobody's password has: an unknown address costs the same time as a known one.
let decoy: Promise<string> | undefined

/** Whether the password fits; a person without one, or no person, costs the same and never fits. */
export async function passwordFits(
  kept: string | null | undefined,
  password: string,
): Promise<boolean> {
  decoy ??= hash('a decoy that nobody chose')
  const fits = await verify(kept ?? (await decoy), password).catch(() => false)
  return fits && Boolean(kept)
}
