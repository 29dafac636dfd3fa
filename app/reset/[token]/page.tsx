import type { Metadata } from 'next'
import { ChoosePassword } from '@/components/sign-in/choose-password'
import { ClosedLink } from '@/components/sign-in/closed-link'
import { DoorSheet } from '@/components/sign-in/door-sheet'
import { pageVisit } from '@/lib/auth/page-visit'
import { inspectLink } from '@/lib/services/one-time-links'

export const metadata: Metadata = { title: 'Choose a new password', referrer: 'no-referrer' }

interface Props {
  params: Promise<{ token: string }>
}

export default async function ResetLinkPage({ params }: Props) {
  const { token } = await params
  const link = await inspectLink(pageVisit(), 'reset', token)
  return (
    <DoorSheet
      title="Choose a new password"
      lead={link.state === 'open' ? 'Every session that is open ends with it.' : undefined}
    >
      {link.state === 'open' ? (
        <ChoosePassword secret={token} email={link.email} act="Change the password and sign in" />
      ) : (
        <ClosedLink
          state={link.state}
          next="Ask for a new link: it comes by e-mail and opens for one hour."
        />
      )}
    </DoorSheet>
  )
}
