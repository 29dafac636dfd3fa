const pattern = /^[0-9a-f]{64}$/

/** @throws RangeError for anything that is no SHA-256, so that no name ever becomes a path. */
export function assertSha256(sha256: string): void {
  if (!pattern.test(sha256)) throw new RangeError('A SHA-256 has 64 hexadecimal digits.')
}
