'use client'

import { clsx } from 'clsx'
import { useState, type DragEvent, type ReactNode } from 'react'

interface WeatherDropProps {
  /** Left out where nothing may be dropped. */
  onFiles?: (files: File[]) => void
  children: ReactNode
}

/** The whole page takes a weather file that is dragged onto it. */
export function WeatherDrop({ onFiles, children }: WeatherDropProps) {
  const [isOver, setOver] = useState(false)
  if (!onFiles) return <div>{children}</div>
  const carriesFiles = (event: DragEvent) => event.dataTransfer.types.includes('Files')
  return (
    <div
      className={clsx(isOver && 'outline-copper outline-2 outline-offset-8 outline-dashed')}
      onDragOver={(event) => {
        if (!carriesFiles(event)) return
        event.preventDefault()
        setOver(true)
      }}
      onDragLeave={({ relatedTarget, currentTarget }) => {
        if (!(relatedTarget instanceof Node) || !currentTarget.contains(relatedTarget))
          setOver(false)
      }}
      onDrop={(event) => {
        setOver(false)
        // The field inside the page has taken it already.
        if (event.defaultPrevented || !carriesFiles(event)) return
        event.preventDefault()
        onFiles([...event.dataTransfer.files])
      }}
    >
      {isOver && (
        <p role="status" className="text-copper mb-2 font-medium">
          Drop the weather file to read it
        </p>
      )}
      {children}
    </div>
  )
}
