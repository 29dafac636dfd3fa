import type { ReactNode } from 'react'

interface ErrorStateProps {
  /** What happened. */
  title: string
  /** What was kept. */
  kept?: ReactNode
  /** What to do. */
  next: ReactNode
  actions?: ReactNode
  /** The number under which the failure is logged. */
  reference?: string
}

/** Says what happened, what was kept, and what to do. */
export function ErrorState({ title, kept, next, actions, reference }: ErrorStateProps) {
  return (
    <section role="alert" className="border-late max-w-xl border-l-4 py-1 pl-4">
      <h2 className="text-late">{title}</h2>
      {kept && <p className="mt-1">{kept}</p>}
      <p className="mt-1">{next}</p>
      {reference && (
        <p className="cap mt-2">
          Logged as <span className="mono">{reference}</span>
        </p>
      )}
      {actions && <div className="mt-4 flex flex-wrap gap-2.5">{actions}</div>}
    </section>
  )
}
