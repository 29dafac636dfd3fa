import path from 'node:path'
import { createFolderStore } from '@/lib/files/folder-store'

/** A file opened for reading: its bytes as a stream, and how many there are. */
export interface OpenedFile {
  stream: ReadableStream<Uint8Array>
  /** Bytes. */
  size: number
}

/** Where bytes live, by the SHA-256 of their content. */
export interface FileStore {
  /** Folder for bytes on their way in; `keep` takes files from here. */
  incomingDir: string
  /** Takes over a finished local file under its SHA-256; the same bytes are kept once. */
  keep(localPath: string, sha256: string): Promise<void>
  /** Null when the store holds no such bytes. */
  open(sha256: string): Promise<OpenedFile | null>
  /** Rejects when the store cannot be written to. */
  check(): Promise<void>
}

/** The store of this process: the folder FILES_DIR, `.local/files` if it is not set. */
export function getFileStore(): FileStore {
  return createFolderStore(path.resolve(process.env.FILES_DIR ?? '.local/files'))
}
