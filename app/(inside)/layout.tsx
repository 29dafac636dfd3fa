import { cookies } from 'next/headers'
import { redirect } from 'next/navigation'
import type { ReactNode } from 'react'
import { AppShell } from '@/app/(inside)/_components/app-shell'
import { navEntries } from '@/app/(inside)/_components/nav-entries'
import { getPagePerson } from '@/lib/auth/page-person'
import { themeCookie, themeOf } from '@/lib/client/theme'
import { routes } from '@/lib/routes'

/** The shell for signed-in people; a session that no longer counts leads to sign-in. */
export default async function InsideLayout({ children }: { children: ReactNode }) {
  const person = await getPagePerson()
  if (!person) redirect(routes.signIn())
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
