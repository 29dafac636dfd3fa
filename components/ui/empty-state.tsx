import type { ReactNode } from 'react'

interface EmptyStateProps {
  /** What is not here: "No application is open". */
  title: string
  /** What to do next, in a sentence. */
  children: ReactNode
  /** The buttons or links that do it. */
  actions?: ReactNode
}

/** Stands where a list would: says what to do next. */
export function EmptyState({ title, children, actions }: EmptyStateProps) {
  return (
    <section className="border-rule max-w-xl border-t pt-4 pb-8">
      <h2>{title}</h2>
      <div className="text-ink-2 mt-1">{children}</div>
      {actions && <div className="mt-4 flex flex-wrap gap-2.5">{actions}</div>}
    </section>
  )
}
