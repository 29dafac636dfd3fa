import type { Metadata } from 'next'
import { RequestForm } from '@/app/reset/request-form'
import { DoorSheet } from '@/components/sign-in/door-sheet'

export const metadata: Metadata = { title: 'Forgot the password' }

export default function ResetPage() {
  return (
    <DoorSheet
      title="Forgot the password"
      lead="Enter the address you sign in with. A link to choose a new password comes by e-mail."
    >
      <RequestForm />
    </DoorSheet>
  )
}
