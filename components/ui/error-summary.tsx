'use client'

import { useEffect, useRef } from 'react'

export interface SummaryError {
  path: string
  message: string
  /** The field's label where the message does not name it. */
  label?: string
}

function controlOf(summary: HTMLElement, path: string): HTMLElement | undefined {
  const form = summary.closest('form') ?? document
  const controls = form.querySelectorAll<HTMLElement>('[name]')
  return [...controls].find((control) => control.getAttribute('name') === path)
}

/** Every input error of a form at its top, inside the form; the first bad field takes the focus. */
export function ErrorSummary({
  errors,
  title,
}: {
  errors: readonly SummaryError[]
  title?: string
}) {
  const box = useRef<HTMLDivElement>(null)
  const signature = errors.map((error) => `${error.path} ${error.message}`).join('\n')

  useEffect(() => {
    const summary = box.current
    if (!signature || !summary) return
    const paths = signature.split('\n').map((line) => line.slice(0, line.indexOf(' ')))
    const first = paths.map((path) => controlOf(summary, path)).find(Boolean)
    ;(first ?? summary).focus()
  }, [signature])

  if (errors.length === 0) return null
  return (
    <div
      ref={box}
      role="alert"
      tabIndex={-1}
      className="border-late bg-late-2 my-3 border-l-4 px-3.5 py-2.5 text-sm"
    >
      <p className="text-late font-semibold">{title ?? heading(errors.length)}</p>
      <ul className="mt-1 grid gap-0.5">
        {errors.map((error) => (
          <li key={`${error.path} ${error.message}`}>
            <button
              type="button"
              className="text-left underline underline-offset-2"
              onClick={() => box.current && controlOf(box.current, error.path)?.focus()}
            >
              {error.label ? `${error.label}: ${error.message}` : error.message}
            </button>
          </li>
        ))}
      </ul>
    </div>
  )
}

function heading(count: number): string {
  return count === 1
    ? 'Nothing was saved: one field needs a change.'
    : `Nothing was saved: ${count} fields need a change.`
}
