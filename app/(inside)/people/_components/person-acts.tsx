'use client'

import { useRouter } from 'next/navigation'
import { useState } from 'react'
import { DisablePerson } from '@/app/(inside)/people/_components/disable-person'
import { PersonForm, rolesOf } from '@/app/(inside)/people/_components/person-form'
import { Button } from '@/components/ui/button'
import { Dialog } from '@/components/ui/dialog'
import { useToast } from '@/components/ui/toast'
import { changePerson, resendInvitation } from '@/lib/client/account'
import { ProblemError } from '@/lib/client/fetcher'
import { textOf } from '@/lib/client/use-form-call'
import type { Person } from '@/lib/schemas/person'

interface PersonActsProps {
  person: Person
  isSelf: boolean
}

/** What an administrator can do about a person. */
export function PersonActs({ person, isSelf }: PersonActsProps) {
  return (
    <div className="flex flex-wrap gap-x-1 gap-y-1 max-sm:-ml-1.5 sm:justify-end">
      {person.standing === 'invited' && <InviteAgain person={person} />}
      <ChangePerson person={person} />
      {person.standing === 'disabled' ? (
        <EnablePerson person={person} />
      ) : (
        !isSelf && <DisablePerson person={person} />
      )}
    </div>
  )
}

function ChangePerson({ person }: { person: Person }) {
  const [open, setOpen] = useState(false)
  const router = useRouter()
  const toast = useToast()

  async function send(values: FormData) {
    await changePerson(person.id, {
      name: textOf(values, 'name'),
      zone: textOf(values, 'zone'),
      roles: rolesOf(values),
    })
    setOpen(false)
    toast({ title: `Changed: ${textOf(values, 'name')}`, detail: 'Roles count from now on.' })
    router.refresh()
  }

  return (
    <>
      <Button look="quiet" aria-label={`Change ${person.name}`} onClick={() => setOpen(true)}>
        Change
      </Button>
      <Dialog open={open} onOpenChange={setOpen} title={person.name} description={person.email}>
        <PersonForm send={send} person={person} act="Save the change" />
      </Dialog>
    </>
  )
}

function InviteAgain({ person }: { person: Person }) {
  const act = usePersonAct()
  return (
    <Button
      look="quiet"
      busyLabel="Sending"
      aria-label={`Send the invitation of ${person.name} again`}
      onClick={() =>
        act(() => resendInvitation(person.id), {
          title: `Invitation sent again: ${person.name}`,
          detail: 'The link of the one before no longer works.',
        })
      }
    >
      Send again
    </Button>
  )
}

function EnablePerson({ person }: { person: Person }) {
  const act = usePersonAct()
  return (
    <Button
      look="quiet"
      busyLabel="Enabling"
      aria-label={`Enable ${person.name}`}
      onClick={() =>
        act(() => changePerson(person.id, { active: true }), {
          title: `Enabled: ${person.name}`,
          detail: 'The person can sign in again.',
        })
      }
    >
      Enable
    </Button>
  )
}

function usePersonAct() {
  const router = useRouter()
  const toast = useToast()
  return async (send: () => Promise<unknown>, done: { title: string; detail: string }) => {
    try {
      await send()
      toast(done)
      router.refresh()
    } catch (error) {
      if (!(error instanceof ProblemError)) throw error
      toast({ tone: 'missed', title: error.title, detail: error.message })
    }
  }
}
