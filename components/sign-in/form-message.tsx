import type { ReactNode } from 'react'

/** What happened before this form, or why it was refused as a whole. */
export function FormMessage({
  tone,
  children,
}: {
  tone: 'plain' | 'refused'
  children: ReactNode
}) {
  const isRefused = tone === 'refused'
  return (
    <p
      role={isRefused ? 'alert' : 'status'}
      className={
        isRefused
          ? 'border-late bg-late-2 text-late mb-4 border-l-4 px-3.5 py-2.5 font-semibold'
          : 'border-ink mb-4 border-l-4 px-3.5 py-2'
      }
    >
      {children}
    </p>
  )
}
