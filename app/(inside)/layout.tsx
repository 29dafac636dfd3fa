import { cookies } from 'next/headers'
import type { ReactNode } from 'react'
import { AppShell } from '@/app/(inside)/_components/app-shell'
import { navEntries } from '@/app/(inside)/_components/nav-entries'
import { pageContext } from '@/lib/auth/page-person'
import { themeCookie, themeOf } from '@/lib/client/theme'

/** The shell for signed-in people; a session that no longer counts leads to sign-in. */
export default async function InsideLayout({ children }: { children: ReactNode }) {
  const { actor: person } = await pageContext()
  const theme = themeOf((await cookies()).get(themeCookie)?.value)
  return (
    <AppShell
      name={person.name}
      role={person.roles.join(', ')}
      entries={navEntries(person.roles)}
      theme={theme}
    >
      {children}
    </AppShell>
  )
}
