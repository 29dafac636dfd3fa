import type { Metadata } from 'next'
import { redirect } from 'next/navigation'
import { SignInForm } from '@/app/sign-in/sign-in-form'
import { DoorSheet } from '@/components/sign-in/door-sheet'
import { getPagePerson } from '@/lib/auth/page-person'
import { sameSitePath } from '@/lib/client/same-site-path'
import { routes } from '@/lib/routes'

export const metadata: Metadata = { title: 'Sign in' }

type Query = Record<string, string | string[] | undefined>

const first = (value: string | string[] | undefined) => (Array.isArray(value) ? value[0] : value)

function noteOf(query: Query): string | undefined {
  if (query.expired) return 'Your session has ended. Sign in again to go on where you were.'
  if (query.chosen) return 'Your password is set. Sign in with it.'
  return undefined
}

export default async function SignInPage({ searchParams }: { searchParams: Promise<Query> }) {
  const query = await searchParams
  const onward = sameSitePath(first(query.from)) ?? routes.home()
  if (await getPagePerson()) redirect(onward)
  return (
    <DoorSheet title="Sign in">
      <SignInForm onward={onward} note={noteOf(query)} />
    </DoorSheet>
  )
}
