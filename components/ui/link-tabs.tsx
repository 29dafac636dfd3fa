'use client'

import { clsx } from 'clsx'
import Link from 'next/link'
import { usePathname } from 'next/navigation'
import { useEffect, useRef } from 'react'
import { currentLink } from '@/components/ui/current-link'

export interface LinkTab {
  href: string
  label: string
  /** A figure after the label, such as how many. */
  count?: number
}

interface LinkTabsProps {
  label: string
  tabs: readonly LinkTab[]
  /** The href shown as current, where the address's query decides it; else the path does. */
  current?: string
}

/** Pages of one thing side by side, each with its own address; scrolls sideways on phones. */
export function LinkTabs({ label, tabs, current }: LinkTabsProps) {
  const pathname = usePathname()
  const shown =
    current ??
    currentLink(
      pathname,
      tabs.map((tab) => tab.href),
    )
  const currentTab = useRef<HTMLAnchorElement>(null)
  useEffect(() => {
    const tab = currentTab.current
    const strip = tab?.closest('nav')
    if (!tab || !strip || strip.scrollWidth <= strip.clientWidth) return
    strip.scrollLeft = tab.offsetLeft - (strip.clientWidth - tab.offsetWidth) / 2
  }, [shown])

  return (
    <nav
      aria-label={label}
      data-screen-only
      className="border-rule relative my-5 flex [scrollbar-width:none] gap-6 overflow-x-auto border-b max-sm:-mx-4 max-sm:px-4"
    >
      {tabs.map((tab) => (
        <Link
          key={tab.href}
          ref={tab.href === shown ? currentTab : undefined}
          href={tab.href}
          scroll={false}
          aria-current={tab.href === shown ? 'page' : undefined}
          className={clsx(
            'border-b-[3px] py-2 font-medium whitespace-nowrap no-underline -outline-offset-2 pointer-coarse:py-3',
            tab.href === shown
              ? 'border-ink text-ink'
              : 'text-ink-2 hover:text-ink border-transparent',
          )}
        >
          {tab.label}
          {tab.count !== undefined && ` ${tab.count}`}
        </Link>
      ))}
    </nav>
  )
}
