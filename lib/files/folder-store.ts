import { createReadStream } from 'node:fs'
import { access, constants, mkdir, open, rename, rm, stat } from 'node:fs/promises'
import path from 'node:path'
import { Readable } from 'node:stream'
import { assertSha256 } from '@/lib/files/sha256'
import type { FileStore, OpenedFile } from '@/lib/files/store'

/** Files in a folder, each at `<first two digits>/<sha256>`. */
export function createFolderStore(root: string): FileStore {
  const incomingDir = path.join(root, 'incoming')
  return {
    incomingDir,
    keep: (localPath, sha256) => keep(root, localPath, sha256),
    open: (sha256) => openKept(placeOf(root, sha256)),
    async check() {
      await mkdir(incomingDir, { recursive: true })
      await access(incomingDir, constants.W_OK)
    },
  }
}

function placeOf(root: string, sha256: string): string {
  assertSha256(sha256)
  return path.join(root, sha256.slice(0, 2), sha256)
}

/** The rename is atomic: a reader sees all of the bytes or none. */
async function keep(root: string, localPath: string, sha256: string): Promise<void> {
  const place = placeOf(root, sha256)
  const size = (await stat(localPath)).size
  if ((await sizeOf(place)) === size) return rm(localPath)
  const folder = path.dirname(place)
  await mkdir(folder, { recursive: true })
  await rename(localPath, place)
  await syncFolder(folder)
  await syncFolder(root)
}

async function openKept(place: string): Promise<OpenedFile | null> {
  const size = await sizeOf(place)
  if (size === null) return null
  const stream = Readable.toWeb(createReadStream(place)) as ReadableStream<Uint8Array>
  return { stream, size }
}

async function sizeOf(place: string): Promise<number | null> {
  try {
    return (await stat(place)).size
  } catch (error) {
    if ((error as NodeJS.ErrnoException).code === 'ENOENT') return null
    throw error
  }
}

/** A new name survives a power cut only once its folder is on disk too. */
async function syncFolder(folder: string): Promise<void> {
  const handle = await open(folder, 'r')
  try {
    await handle.sync()
  } finally {
    await handle.close()
  }
}
