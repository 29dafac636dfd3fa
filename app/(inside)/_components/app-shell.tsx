import Link from 'next/link'
import type { ReactNode } from 'react'
import { AccountMenu } from '@/app/(inside)/_components/account-menu'
import type { NavEntry } from '@/app/(inside)/_components/nav-entries'
import { PhoneBar } from '@/app/(inside)/_components/phone-bar'
import { TopNav } from '@/app/(inside)/_components/top-nav'
import { Mark } from '@/components/drawing/mark'
import { pagePalette } from '@/components/ui/page-palette'
import type { Theme } from '@/lib/client/theme'
import { routes } from '@/lib/routes'

interface AppShellProps {
  name: string
  /** Roles in words: "developer, engineer". */
  role: string
  entries: readonly NavEntry[]
  theme: Theme
  children: ReactNode
}

/** What every page inside stands in: bar at the top, bar at the bottom on phones, one `main`. */
export function AppShell({ name, role, entries, theme, children }: AppShellProps) {
  return (
    <>
      <a href="#main" className="skip-link">
        Skip to the page
      </a>
      <header data-screen-only className="border-ink border-b">
        <div className="mx-auto flex h-13 max-w-[1560px] items-center gap-7 px-4 md:px-8">
          <Brand />
          <TopNav entries={entries} />
          <div className="ml-auto self-stretch">
            <AccountMenu name={name} role={role} theme={theme} />
          </div>
        </div>
      </header>
      <main
        id="main"
        tabIndex={-1}
        className="mx-auto max-w-[1560px] px-4 pt-5 pb-28 outline-none md:px-8 md:pt-6 md:pb-10 print:max-w-none print:p-0"
      >
        {children}
      </main>
      <PhoneBar entries={entries} theme={theme} />
    </>
  )
}

function Brand() {
  return (
    <Link href={routes.home()} className="flex items-center gap-2.5 no-underline">
      <span aria-hidden className="contents">
        <Mark palette={pagePalette} width={34} />
      </span>
      <span className="text-[1rem] font-[750] tracking-[-0.01em] font-stretch-[118%]">
        Lineside
      </span>
    </Link>
  )
}
