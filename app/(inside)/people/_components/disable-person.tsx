'use client'

import { useRouter } from 'next/navigation'
import { useState } from 'react'
import { Button } from '@/components/ui/button'
import { Confirm } from '@/components/ui/confirm'
import { useToast } from '@/components/ui/toast'
import { changePerson } from '@/lib/client/account'
import { ProblemError } from '@/lib/client/fetcher'
import type { Person } from '@/lib/schemas/person'

/** Takes a person out of the product; what they recorded stays. */
export function DisablePerson({ person }: { person: Person }) {
  const [open, setOpen] = useState(false)
  const [error, setError] = useState<string>()
  const router = useRouter()
  const toast = useToast()

  async function disable() {
    setError(undefined)
    try {
      await changePerson(person.id, { active: false })
    } catch (refusal) {
      if (refusal instanceof ProblemError) setError(refusal.message)
      throw refusal
    }
    toast({ title: `Disabled: ${person.name}`, detail: 'Sessions and tokens ended.' })
    router.refresh()
  }

  return (
    <>
      <Button look="quiet" aria-label={`Disable ${person.name}`} onClick={() => setOpen(true)}>
        Disable
      </Button>
      <Confirm
        open={open}
        onOpenChange={setOpen}
        title={`Disable ${person.name}`}
        act="Disable"
        actBusy="Disabling"
        danger
        onConfirm={disable}
        error={error}
      >
        <p>
          {person.name} is signed out at the next request, and API tokens stop working. What was
          recorded stays under this name. Clocks that {person.name} owns need another owner.
        </p>
      </Confirm>
    </>
  )
}
