'use client'

import { AccountChoices, useTheme } from '@/app/(inside)/_components/account-choices'
import { Menu } from '@/components/ui/menu'
import type { Theme } from '@/lib/client/theme'

interface AccountMenuProps {
  name: string
  role: string
  theme: Theme
}

/** Name and role at the right of the bar; opens the theme and the way out. */
export function AccountMenu({ name, role, theme: initial }: AccountMenuProps) {
  const [theme, setTheme] = useTheme(initial)
  return (
    <Menu
      trigger={
        <button
          type="button"
          className="h-full max-w-56 py-1.5 text-left leading-tight -outline-offset-2 hover:[&_strong]:underline"
        >
          <span className="border-ink grid border-l pl-4 max-md:border-0 max-md:pl-0">
            <strong className="text-th max-md:text-ink-2 truncate font-semibold font-stretch-[92%] max-md:font-medium">
              {name}
            </strong>
            <span className="cap truncate max-md:sr-only">{role}</span>
          </span>
        </button>
      }
    >
      <AccountChoices theme={theme} onTheme={setTheme} />
    </Menu>
  )
}
