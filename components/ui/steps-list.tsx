import { clsx } from 'clsx'
import Link from 'next/link'
import type { ReactNode } from 'react'

export interface ListedStep {
  key: string
  title: ReactNode
  state: 'done' | 'current' | 'ahead'
  note?: ReactNode
  href?: string
}

const stateWords = { done: 'done', current: 'now', ahead: 'ahead' } as const

/** Steps in their order: done in copper, the current one in heavy ink, what lies ahead dashed. */
export function StepsList({ steps, label }: { steps: readonly ListedStep[]; label: string }) {
  return (
    <ol aria-label={label} className="grid">
      {steps.map((step) => (
        <li
          key={step.key}
          aria-current={step.state === 'current' ? 'step' : undefined}
          className={clsx(
            'grid grid-cols-[1fr_auto] gap-x-4 border-l-[3px] py-2 pl-3.5',
            step.state === 'done' && 'border-copper',
            step.state === 'current' && 'border-ink font-semibold',
            step.state === 'ahead' && 'border-ink-3 text-ink-2 border-dashed',
          )}
        >
          <span>
            {step.href ? (
              <Link href={step.href} className="underline">
                {step.title}
              </Link>
            ) : (
              step.title
            )}
          </span>
          <span className={clsx('cap', step.state === 'done' && 'text-copper')}>
            {stateWords[step.state]}
          </span>
          {step.note && (
            <span className="text-ink-2 col-span-2 text-sm font-normal">{step.note}</span>
          )}
        </li>
      ))}
    </ol>
  )
}
