'use client'

import { useState } from 'react'
import { MenuChoices, MenuItem, MenuLink, MenuRule } from '@/components/ui/menu'
import { chooseTheme, type Theme } from '@/lib/client/theme'
import { routes } from '@/lib/routes'

const themeOptions = [
  { value: 'light', label: 'Light' },
  { value: 'dark', label: 'Dark' },
  { value: 'system', label: 'As the system' },
] as const

async function signOutHere() {
  const { signOut } = await import('next-auth/react')
  await signOut({ callbackUrl: routes.signIn() })
}

/** The theme, kept in this browser; shared by the bar at the top and the one of phones. */
export function useTheme(initial: Theme): [Theme, (theme: Theme) => void] {
  const [theme, setTheme] = useState(initial)
  return [
    theme,
    (next) => {
      chooseTheme(next)
      setTheme(next)
    },
  ]
}

interface AccountChoicesProps {
  theme: Theme
  onTheme: (theme: Theme) => void
}

/** The rows of the account menu. */
export function AccountChoices({ theme, onTheme }: AccountChoicesProps) {
  return (
    <>
      <MenuChoices label="Theme" value={theme} options={themeOptions} onChange={onTheme} />
      <MenuRule />
      <MenuLink href={routes.settings()}>Your account</MenuLink>
      <MenuItem onSelect={signOutHere}>Sign out</MenuItem>
    </>
  )
}
