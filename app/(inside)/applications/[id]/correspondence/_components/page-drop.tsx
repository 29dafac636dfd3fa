'use client'

import { clsx } from 'clsx'
import { useState, type DragEvent, type ReactNode } from 'react'

interface PageDropProps {
  /** Left out where nothing may be dropped. */
  onFiles?: (files: File[]) => void
  children: ReactNode
}

/** The whole page takes files that are dragged onto it. */
export function PageDrop({ onFiles, children }: PageDropProps) {
  const [isOver, setOver] = useState(false)
  if (!onFiles) return <section>{children}</section>

  const carriesFiles = (event: DragEvent) => event.dataTransfer.types.includes('Files')
  function drop(event: DragEvent) {
    setOver(false)
    // A field inside the page has taken them already.
    if (event.defaultPrevented || !carriesFiles(event)) return
    event.preventDefault()
    onFiles?.([...event.dataTransfer.files])
  }
  function leave(event: DragEvent) {
    const to = event.relatedTarget
    if (!(to instanceof Node) || !event.currentTarget.contains(to)) setOver(false)
  }
  return (
    <section
      onDragOver={(event) => {
        if (!carriesFiles(event)) return
        event.preventDefault()
        setOver(true)
      }}
      onDragLeave={leave}
      onDrop={drop}
      className={clsx('min-h-[50dvh]', isOver && 'outline-copper outline-2 outline-dashed')}
    >
      {isOver && (
        <p role="status" className="text-copper mb-2 font-medium">
          Drop the file to record it as correspondence
        </p>
      )}
      {children}
    </section>
  )
}
