import type { z } from 'zod'
import { problemOf, readAnswer, unreachable } from '@/lib/client/fetcher'

export interface UploadOptions {
  method?: 'PUT' | 'POST'
  headers?: Record<string, string>
  signal?: AbortSignal
  /** Called while bytes leave; both in bytes. */
  onProgress?: (sentBytes: number, totalBytes: number) => void
}

/**
 * Sends one body with progress, which `fetch` cannot report. A `FormData` goes as multipart, a file
 * raw. Throws `ProblemError` like `call`; an abort rejects with the signal's reason.
 */
export function upload<S extends z.ZodType>(
  path: string,
  body: Blob | FormData,
  answer: S,
  { method = 'POST', headers = {}, signal, onProgress }: UploadOptions = {},
): Promise<z.output<S>> {
  return new Promise((resolve, reject) => {
    const request = new XMLHttpRequest()
    request.open(method, path)
    request.setRequestHeader('accept', 'application/json')
    for (const [name, value] of Object.entries(headers)) request.setRequestHeader(name, value)
    request.upload.onprogress = (event) => onProgress?.(event.loaded, event.total)
    request.onerror = () => reject(unreachable())
    request.onabort = () => reject(signal?.reason)
    request.onload = () => {
      const { status, responseText } = request
      if (status < 200 || status > 299) return reject(problemOf(status, responseText))
      try {
        resolve(readAnswer(answer, status, responseText))
      } catch (error) {
        reject(error)
      }
    }
    if (signal?.aborted) return reject(signal.reason)
    signal?.addEventListener('abort', () => request.abort(), { once: true })
    request.send(body)
  })
}
