'use client'

import { clsx } from 'clsx'
import { type DragEvent, useId, useRef, useState } from 'react'
import { Button } from '@/components/ui/button'
import { Progress } from '@/components/ui/progress'

export interface FileInHand {
  key: string
  name: string
  sizeBytes: number
  /** Sent so far; equal to the size when done. */
  sentBytes: number
  /** What was refused and why. */
  error?: string
  done?: boolean
}

export interface FileDropProps {
  label: string
  /** Which files and how large, in words: "PDF, EML or an image, up to 50 MB". */
  hint?: string
  name?: string
  /** As of an input: ".csv,.epw". */
  accept?: string
  multiple?: boolean
  files?: readonly FileInHand[]
  onFiles: (files: File[]) => void
  onRemove?: (key: string) => void
}

/** Files by drag, by pick or by keyboard; each shows its own progress and its own refusal. */
export function FileDrop({
  label,
  hint,
  name,
  accept,
  multiple = false,
  files = [],
  onFiles,
  onRemove,
}: FileDropProps) {
  const id = useId()
  const input = useRef<HTMLInputElement>(null)
  const [isOver, setOver] = useState(false)

  function take(list: FileList | null) {
    const taken = [...(list ?? [])]
    if (taken.length > 0) onFiles(multiple ? taken : taken.slice(0, 1))
    if (input.current) input.current.value = ''
  }

  function drop(event: DragEvent) {
    event.preventDefault()
    setOver(false)
    take(event.dataTransfer.files)
  }

  return (
    <div>
      <div
        onDragOver={(event) => {
          event.preventDefault()
          setOver(true)
        }}
        onDragLeave={() => setOver(false)}
        onDrop={drop}
        className={clsx(
          'flex flex-wrap items-center gap-x-4 gap-y-2 border border-dashed px-4 py-4',
          isOver ? 'border-copper bg-copper-2' : 'border-ink-3 bg-sheet',
        )}
      >
        <div className="min-w-48 flex-1">
          <label htmlFor={id} className="font-medium">
            {label}
          </label>
          <p id={`${id}-hint`} className="text-ink-2 text-sm">
            Drop {multiple ? 'files' : 'a file'} here or pick {multiple ? 'them' : 'one'}.{' '}
            {hint && `${hint}.`}
          </p>
        </div>
        <input
          ref={input}
          id={id}
          name={name}
          type="file"
          tabIndex={-1}
          accept={accept}
          multiple={multiple}
          aria-describedby={`${id}-hint`}
          className="sr-only"
          onChange={(event) => take(event.target.files)}
        />
        <Button aria-describedby={`${id}-hint`} onClick={() => input.current?.click()}>
          Pick {multiple ? 'files' : 'a file'}
        </Button>
      </div>
      {files.length > 0 && (
        <ul aria-live="polite" className="grid">
          {files.map((file) => (
            <FileLine key={file.key} file={file} onRemove={onRemove} />
          ))}
        </ul>
      )}
    </div>
  )
}

function FileLine({ file, onRemove }: { file: FileInHand; onRemove?: (key: string) => void }) {
  const { key, name, sizeBytes, sentBytes, error, done } = file
  return (
    <li className="border-rule-2 grid grid-cols-[1fr_auto] items-center gap-x-4 border-b py-2.5">
      {error || done ? (
        <div>
          <p className="break-all">{name}</p>
          <p className={clsx('text-sm', error ? 'text-late font-semibold' : 'text-ink-2')}>
            {error ?? `kept, ${formatBytes(sizeBytes)}`}
          </p>
        </div>
      ) : (
        <Progress
          label={name}
          fraction={sizeBytes === 0 ? 0 : sentBytes / sizeBytes}
          figure={`${formatBytes(sentBytes)} of ${formatBytes(sizeBytes)}`}
        />
      )}
      {onRemove && (
        <Button look="quiet" aria-label={`Remove ${name}`} onClick={() => onRemove(key)}>
          Remove
        </Button>
      )}
    </li>
  )
}

/** A size in bytes as people read it, decimal units: "340 B", "1.2 MB". */
export function formatBytes(bytes: number): string {
  if (bytes < 1000) return `${bytes} B`
  const units = ['kB', 'MB', 'GB'] as const
  const step = Math.min(Math.floor(Math.log10(bytes) / 3), units.length)
  const figure = bytes / 1000 ** step
  return `${figure >= 100 ? figure.toFixed(0) : figure.toFixed(1)} ${units[step - 1]}`
}
