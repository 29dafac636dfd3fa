import { open } from 'node:fs/promises'
import { fileTypeFromFile } from 'file-type'

const unknown = 'application/octet-stream'
const sniffedBytes = 64 * 1024
/** Types a browser may run; kept as plain bytes. */
const active = /^(text\/html|image\/svg\+xml|application\/xml|text\/xml|application\/xhtml\+xml)$/
const markup = /<(!doctype|html|svg|script|body|head|iframe|\?xml)[\s>/]/i

/** A local file's MIME type by its content, never by its name; markup counts as plain bytes. */
export async function typeOfFile(localPath: string): Promise<string> {
  const known = await knownType(localPath)
  if (known) return active.test(known) ? unknown : known
  const { start, isWhole } = await startOf(localPath)
  return isText(start, isWhole) && !markup.test(start.toString('utf8')) ? 'text/plain' : unknown
}

async function knownType(localPath: string): Promise<string | undefined> {
  try {
    return (await fileTypeFromFile(localPath))?.mime
  } catch {
    // A damaged container: its first bytes promise a type that the rest does not keep.
    return undefined
  }
}

async function startOf(localPath: string): Promise<{ start: Buffer; isWhole: boolean }> {
  const handle = await open(localPath, 'r')
  try {
    const buffer = Buffer.alloc(sniffedBytes)
    const { bytesRead } = await handle.read(buffer, 0, sniffedBytes, 0)
    return { start: buffer.subarray(0, bytesRead), isWhole: bytesRead < sniffedBytes }
  } finally {
    await handle.close()
  }
}

/** UTF-8 without control characters; the last character may be cut where the sample ends. */
function isText(start: Buffer, isWhole: boolean): boolean {
  // Control characters are what tells bytes from text.
  if (/[\0-\x08\x0e-\x1a\x1c-\x1f]/.test(start.toString('latin1'))) return false
  try {
    new TextDecoder('utf-8', { fatal: true }).decode(start, { stream: !isWhole })
    return true
  } catch {
    return false
  }
}
