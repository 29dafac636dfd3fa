import type { Metadata } from 'next'
import { ChoosePassword } from '@/components/sign-in/choose-password'
import { ClosedLink } from '@/components/sign-in/closed-link'
import { DoorSheet } from '@/components/sign-in/door-sheet'
import { pageVisit } from '@/lib/auth/page-visit'
import { inspectLink } from '@/lib/services/one-time-links'

export const metadata: Metadata = { title: 'Welcome to Lineside', referrer: 'no-referrer' }

interface Props {
  params: Promise<{ token: string }>
}

export default async function WelcomePage({ params }: Props) {
  const { token } = await params
  const link = await inspectLink(pageVisit(), 'invitation', token)
  return (
    <DoorSheet
      title="Welcome to Lineside"
      lead={
        link.state === 'open'
          ? `${link.name}, choose the password you will sign in with.`
          : undefined
      }
    >
      {link.state === 'open' ? (
        <ChoosePassword secret={token} email={link.email} act="Set the password and sign in" />
      ) : (
        <ClosedLink
          state={link.state}
          next="Ask for a new link with your address, or ask an administrator to invite you again."
        />
      )}
    </DoorSheet>
  )
}
