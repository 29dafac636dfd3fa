import type { ReactNode } from 'react'

/** An amber bar for what a person must keep in mind before relying on the page. */
export function Caution({ children }: { children: ReactNode }) {
  return (
    <div
      role="note"
      className="border-soon bg-soon-2 text-soon-ink border-l-4 px-3.5 py-2.5 text-sm"
    >
      {children}
    </div>
  )
}
