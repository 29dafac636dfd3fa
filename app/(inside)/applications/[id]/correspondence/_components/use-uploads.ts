'use client'

import { useRef, useState } from 'react'
import type { FileInHand } from '@/components/ui/file-drop'
import { sendFile } from '@/lib/client/entries'
import { ProblemError } from '@/lib/client/fetcher'
import { newId } from '@/lib/client/new-id'
import { attachmentLimitBytes, type UploadedFile } from '@/lib/schemas/file'

export interface Attachment extends FileInHand {
  kept?: UploadedFile
}

export interface Uploads {
  files: readonly Attachment[]
  /** `onKept` is told of each file once it is kept. */
  add: (files: readonly File[], onKept?: (file: UploadedFile) => void) => void
  /** Files that are kept already. */
  attach: (files: readonly UploadedFile[]) => void
  remove: (key: string) => void
  clear: () => void
}

/** Files on their way and kept; each is sent at once and shows its own progress and refusal. */
export function useUploads(): Uploads {
  const [files, setFiles] = useState<readonly Attachment[]>([])
  const running = useRef(new Map<string, AbortController>())

  function change(key: string, part: Partial<Attachment>) {
    setFiles((before) => before.map((one) => (one.key === key ? { ...one, ...part } : one)))
  }

  async function send(key: string, file: File, onKept?: (file: UploadedFile) => void) {
    const controller = new AbortController()
    running.current.set(key, controller)
    try {
      const kept = await sendFile(file, {
        signal: controller.signal,
        onProgress: (sentBytes) => change(key, { sentBytes: Math.min(sentBytes, file.size) }),
      })
      change(key, { kept, done: true, sentBytes: file.size })
      onKept?.(kept)
    } catch (error) {
      if (!controller.signal.aborted) change(key, { error: refusalOf(error) })
    } finally {
      running.current.delete(key)
    }
  }

  function add(list: readonly File[], onKept?: (file: UploadedFile) => void) {
    for (const file of list) {
      const key = newId()
      const error = file.size > attachmentLimitBytes ? tooLarge : undefined
      const one = { key, name: file.name, sizeBytes: file.size, sentBytes: 0, error }
      setFiles((before) => [...before, one])
      if (!error) void send(key, file, onKept)
    }
  }

  function attach(list: readonly UploadedFile[]) {
    setFiles((before) => [
      ...before,
      ...list
        .filter((kept) => !before.some((one) => one.kept?.sha256 === kept.sha256))
        .map((kept) => ({
          key: newId(),
          name: kept.name,
          sizeBytes: kept.size,
          sentBytes: kept.size,
          done: true,
          kept,
        })),
    ])
  }

  function remove(key: string) {
    running.current.get(key)?.abort()
    setFiles((before) => before.filter((one) => one.key !== key))
  }

  function clear() {
    for (const controller of running.current.values()) controller.abort()
    setFiles([])
  }

  return { files, add, attach, remove, clear }
}

const tooLarge = `Not sent: larger than the ${attachmentLimitBytes / 1_000_000} MB allowed here`

function refusalOf(error: unknown): string {
  return error instanceof ProblemError ? error.message : 'Not sent: the file could not be read'
}
