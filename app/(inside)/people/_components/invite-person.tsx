'use client'

import { useRouter } from 'next/navigation'
import { useState } from 'react'
import { PersonForm, rolesOf } from '@/app/(inside)/people/_components/person-form'
import { Button } from '@/components/ui/button'
import { Dialog } from '@/components/ui/dialog'
import { useToast } from '@/components/ui/toast'
import { invitePerson } from '@/lib/client/account'
import { textOf } from '@/lib/client/use-form-call'

/** Invites a person: the row is there at once, the link goes out by e-mail. */
export function InvitePerson({ zone }: { zone: string }) {
  // Made with the open dialog: a second submit of it is the same invitation.
  const [id, setId] = useState<string>()
  const router = useRouter()
  const toast = useToast()

  async function send(values: FormData) {
    if (!id) return
    const person = await invitePerson({
      id,
      name: textOf(values, 'name'),
      email: textOf(values, 'email'),
      zone: textOf(values, 'zone'),
      roles: rolesOf(values),
    })
    setId(undefined)
    toast({ title: `Invited: ${person.name}`, detail: `An e-mail goes to ${person.email}.` })
    router.refresh()
  }

  return (
    <>
      <Button look="primary" onClick={() => setId(crypto.randomUUID())}>
        Invite a person
      </Button>
      <Dialog
        open={id !== undefined}
        onOpenChange={(open) => !open && setId(undefined)}
        title="Invite a person"
        description="The link in the e-mail works once and for 7 days."
      >
        <PersonForm
          send={send}
          person={{ name: '', zone, roles: [] }}
          isNew
          act="Send the invitation"
        />
      </Dialog>
    </>
  )
}
