const pattern = /^[0-9a-f]{8}-[0-9a-f]{4}-[0-9a-f]{4}-[0-9a-f]{4}-[0-9a-f]{12}$/i

/** Whether an id from an address may be asked for at all. */
export function isUuid(text: string): boolean {
  return pattern.test(text)
}
