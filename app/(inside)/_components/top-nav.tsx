'use client'

import { clsx } from 'clsx'
import Link from 'next/link'
import { usePathname } from 'next/navigation'
import type { NavEntry } from '@/app/(inside)/_components/nav-entries'
import { currentLink } from '@/components/ui/current-link'
import { routes } from '@/lib/routes'

/** The entry a path stands under; an application belongs to the pipeline. */
export function entryOf(pathname: string, entries: readonly NavEntry[]): string | undefined {
  if (pathname.startsWith('/applications/')) return routes.pipeline()
  return currentLink(
    pathname,
    entries.map((entry) => entry.href),
  )
}

/** The pages in the bar at the top; a copper rule stands under the current one. */
export function TopNav({ entries }: { entries: readonly NavEntry[] }) {
  const current = entryOf(usePathname(), entries)
  return (
    <nav aria-label="Pages" className="flex self-stretch max-md:hidden">
      {entries.map((entry) => (
        <Link
          key={entry.href}
          href={entry.href}
          aria-current={entry.href === current ? 'page' : undefined}
          className={clsx(
            'group flex items-stretch px-2.5 font-medium no-underline -outline-offset-2 lg:px-3',
            entry.href === current ? 'text-ink' : 'text-ink-2 hover:text-ink',
          )}
        >
          <span
            className={clsx(
              '-mb-px flex items-center border-y-[3px] border-t-transparent',
              entry.href === current ? 'border-b-copper' : 'border-b-transparent',
            )}
          >
            {entry.label}
          </span>
        </Link>
      ))}
    </nav>
  )
}
