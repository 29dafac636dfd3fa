import { safeFileName } from '@/lib/files/file-name'
import { keepStream, tooLarge, type KeptFile } from '@/lib/files/keep-stream'
import { getFileStore, type FileStore } from '@/lib/files/store'
import { UploadError } from '@/lib/files/upload-error'

export interface ReceivedFile extends KeptFile {
  name: string
}

export interface ReceiveOptions {
  /** Bytes. */
  limitBytes: number
  store?: FileStore
}

/**
 * The one way in for uploads: the raw body of a request, streamed to the store. Headers:
 * `x-file-name` (URI-encoded) and, if the sender knows it, `x-content-sha256` (hexadecimal).
 * @throws UploadError `too_large` (before reading where Content-Length says so), `unreadable` for
 * missing or faulty headers, an empty body, and bytes fewer or other than the sender stated.
 */
export async function receiveUpload(
  request: Request,
  { limitBytes, store = getFileStore() }: ReceiveOptions,
): Promise<ReceivedFile> {
  const size = statedSize(request)
  if (size !== undefined && size > limitBytes) throw tooLarge(limitBytes)
  const name = statedName(request)
  const sha256 = statedSha256(request)
  if (!request.body) throw new UploadError('unreadable', 'The request has no body.')
  const kept = await keepStream(request.body as AsyncIterable<Uint8Array>, {
    store,
    limitBytes,
    expected: { size, sha256 },
  })
  return { ...kept, name }
}

function statedSize(request: Request): number | undefined {
  const text = request.headers.get('content-length')
  if (text === null) return undefined
  if (/^\d{1,15}$/.test(text)) return Number(text)
  throw new UploadError('unreadable', 'The header Content-Length is no number of bytes.')
}

function statedName(request: Request): string {
  const text = request.headers.get('x-file-name')
  if (!text) throw new UploadError('unreadable', 'The header x-file-name is missing.')
  try {
    return safeFileName(decodeURIComponent(text))
  } catch {
    throw new UploadError('unreadable', 'The header x-file-name is not URI-encoded.')
  }
}

function statedSha256(request: Request): string | undefined {
  const text = request.headers.get('x-content-sha256')?.trim().toLowerCase()
  if (!text) return undefined
  if (/^[0-9a-f]{64}$/.test(text)) return text
  throw new UploadError('unreadable', 'The header x-content-sha256 needs 64 hexadecimal digits.')
}
