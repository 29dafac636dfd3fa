'use client'

import { useRouter } from 'next/navigation'
import type { MouseEvent, ReactNode } from 'react'

/** A table body whose rows open by a press anywhere; words can still be marked and other controls used. */
export function RowOpener({ children }: { children: ReactNode }) {
  const router = useRouter()

  function open(event: MouseEvent<HTMLTableSectionElement>) {
    const target = event.target as HTMLElement
    if (event.defaultPrevented || event.button !== 0) return
    if (target.closest('a, button, input, select, textarea, label, summary')) return
    if (window.getSelection()?.toString()) return
    const link = target.closest('tr')?.querySelector<HTMLAnchorElement>('a[data-row-link]')
    const href = link?.getAttribute('href')
    if (!href) return
    if (event.metaKey || event.ctrlKey) window.open(href, '_blank', 'noopener')
    else router.push(href)
  }

  return (
    <tbody role="rowgroup" className="max-sm:block" onClick={open}>
      {children}
    </tbody>
  )
}
