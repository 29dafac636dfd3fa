import { createHash, randomUUID } from 'node:crypto'
import { mkdir, open, readdir, rm, stat, type FileHandle } from 'node:fs/promises'
import path from 'node:path'
import { typeOfFile } from '@/lib/files/content-type'
import type { FileStore } from '@/lib/files/store'
import { UploadError } from '@/lib/files/upload-error'

export interface KeptFile {
  sha256: string
  /** Bytes. */
  size: number
  /** MIME type, by content. */
  type: string
}

export interface KeepOptions {
  store: FileStore
  /** Bytes; one more is refused while they pass. */
  limitBytes: number
  /** What the sender said it would send. */
  expected?: { size?: number; sha256?: string }
}

const orphanAfterMs = 24 * 60 * 60 * 1000

/**
 * Writes bytes to the store while hashing them; nothing is kept of a refused stream.
 * @throws UploadError `too_large` past the limit, `unreadable` for an empty, broken or differing one.
 */
export async function keepStream(
  source: AsyncIterable<Uint8Array>,
  options: KeepOptions,
): Promise<KeptFile> {
  const { store } = options
  await mkdir(store.incomingDir, { recursive: true })
  await removeOrphans(store.incomingDir)
  const localPath = path.join(store.incomingDir, randomUUID())
  try {
    const received = await writeThrough(source, localPath, options.limitBytes)
    assertExpected(received, options.expected ?? {})
    const type = await typeOfFile(localPath)
    await store.keep(localPath, received.sha256)
    return { ...received, type }
  } catch (error) {
    await rm(localPath, { force: true })
    throw error
  }
}

/** Keeps bytes that are in memory already, such as a document just made. */
export function keepBytes(bytes: Uint8Array, options: KeepOptions): Promise<KeptFile> {
  return keepStream(inOne(bytes), options)
}

async function* inOne(bytes: Uint8Array): AsyncGenerator<Uint8Array> {
  yield bytes
}

async function writeThrough(
  source: AsyncIterable<Uint8Array>,
  localPath: string,
  limitBytes: number,
): Promise<{ sha256: string; size: number }> {
  const hash = createHash('sha256')
  const handle = await open(localPath, 'wx')
  let size = 0
  try {
    for await (const chunk of readable(source)) {
      size += chunk.byteLength
      if (size > limitBytes) throw tooLarge(limitBytes)
      hash.update(chunk)
      await writeAll(handle, chunk)
    }
    await handle.sync()
  } finally {
    await handle.close()
  }
  return { sha256: hash.digest('hex'), size }
}

/** A stream that breaks off is the sender's fault, a disk that fails is ours. */
async function* readable(source: AsyncIterable<Uint8Array>): AsyncGenerator<Uint8Array> {
  try {
    yield* source
  } catch {
    throw new UploadError('unreadable', 'The file broke off on its way; nothing was kept.')
  }
}

async function writeAll(handle: FileHandle, chunk: Uint8Array): Promise<void> {
  let offset = 0
  while (offset < chunk.byteLength) {
    offset += (await handle.write(chunk, offset, chunk.byteLength - offset)).bytesWritten
  }
}

function assertExpected(
  received: { sha256: string; size: number },
  expected: { size?: number; sha256?: string },
): void {
  if (received.size === 0) throw new UploadError('unreadable', 'The file is empty.')
  if (expected.size !== undefined && expected.size !== received.size)
    throw new UploadError(
      'unreadable',
      `${received.size} of ${expected.size} bytes arrived; nothing was kept. Send the file again.`,
    )
  if (expected.sha256 !== undefined && expected.sha256 !== received.sha256)
    throw new UploadError(
      'unreadable',
      'The bytes that arrived differ from those sent (SHA-256); nothing was kept. Send the file again.',
    )
}

/** @returns the refusal for a file above the limit. */
export function tooLarge(limitBytes: number): UploadError {
  const limit = Math.floor(limitBytes / 100_000) / 10
  return new UploadError('too_large', `The file is larger than the ${limit} MB allowed here.`)
}

/** Bytes that a stopped process left behind more than a day ago. */
async function removeOrphans(incomingDir: string): Promise<void> {
  const before = Date.now() - orphanAfterMs
  for (const name of await readdir(incomingDir)) {
    const localPath = path.join(incomingDir, name)
    // Another receiver may have removed or kept it in between.
    const modified = await stat(localPath).catch(() => null)
    if (modified && modified.mtimeMs < before) await rm(localPath, { force: true })
  }
}
