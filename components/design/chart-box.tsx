'use client'

import { useEffect, useRef, useState, type ReactNode } from 'react'

interface ChartBoxProps {
  /** Px until the page has been measured. */
  fallback: number
  /** Height in px, kept while nothing is drawn yet. */
  height: number
  children: (width: number) => ReactNode
}

/** Gives a drawing the width of its place on the page; drawings themselves measure nothing. */
export function ChartBox({ fallback, height, children }: ChartBoxProps) {
  const box = useRef<HTMLDivElement>(null)
  const [width, setWidth] = useState(fallback)

  useEffect(() => {
    if (!box.current) return
    const observer = new ResizeObserver(([entry]) => {
      if (entry) setWidth(Math.max(280, Math.round(entry.contentRect.width)))
    })
    observer.observe(box.current)
    return () => observer.disconnect()
  }, [])

  return (
    <div
      ref={box}
      className="min-w-0 overflow-hidden [&_svg]:max-w-full"
      style={{ minHeight: height }}
    >
      {children(width)}
    </div>
  )
}
