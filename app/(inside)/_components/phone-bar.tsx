'use client'

import { clsx } from 'clsx'
import Link from 'next/link'
import { usePathname } from 'next/navigation'
import { AccountChoices, useTheme } from '@/app/(inside)/_components/account-choices'
import type { NavEntry } from '@/app/(inside)/_components/nav-entries'
import { entryOf } from '@/app/(inside)/_components/top-nav'
import { Menu, MenuLink, MenuRule } from '@/components/ui/menu'
import type { Theme } from '@/lib/client/theme'

const cell = 'flex min-h-14 items-center justify-center border-t-4 -outline-offset-2 no-underline'
const cellState = (isCurrent: boolean) =>
  clsx(cell, isCurrent ? 'border-copper font-semibold' : 'border-transparent text-ink-2')

/** The bar at the foot of a phone: the pages of the day, the rest under "More". */
export function PhoneBar({
  entries,
  theme: initial,
}: {
  entries: readonly NavEntry[]
  theme: Theme
}) {
  const current = entryOf(usePathname(), entries)
  const [theme, setTheme] = useTheme(initial)
  const inBar = entries.filter((entry) => entry.onPhoneBar)
  const more = entries.filter((entry) => !entry.onPhoneBar)
  const isMore = more.some((entry) => entry.href === current)
  return (
    <nav
      aria-label="Pages"
      data-screen-only
      className="border-ink bg-sheet fixed inset-x-0 bottom-0 z-30 grid auto-cols-fr grid-flow-col border-t-[1.5px] pb-[env(safe-area-inset-bottom)] md:hidden"
    >
      {inBar.map((entry) => (
        <Link
          key={entry.href}
          href={entry.href}
          aria-current={entry.href === current ? 'page' : undefined}
          className={cellState(entry.href === current)}
        >
          {entry.label}
        </Link>
      ))}
      <Menu
        trigger={
          <button type="button" className={cellState(isMore)}>
            More
          </button>
        }
      >
        {more.map((entry) => (
          <MenuLink key={entry.href} href={entry.href}>
            {entry.label}
          </MenuLink>
        ))}
        {more.length > 0 && <MenuRule />}
        <AccountChoices theme={theme} onTheme={setTheme} />
      </Menu>
    </nav>
  )
}
