'use client'

import { useRouter } from 'next/navigation'
import { ZoneField } from '@/components/people/zone-field'
import { FormMessage } from '@/components/sign-in/form-message'
import { Button } from '@/components/ui/button'
import { TextField } from '@/components/ui/text-fields'
import { useToast } from '@/components/ui/toast'
import { changeMe } from '@/lib/client/account'
import { textOf, useFormCall } from '@/lib/client/use-form-call'
import type { Me } from '@/lib/schemas/person'

/** One's own name and time zone. */
export function OwnDetails({ me }: { me: Me }) {
  const router = useRouter()
  const toast = useToast()
  const { onSubmit, busy, problem, errorOf } = useFormCall(async (values) => {
    await changeMe({ name: textOf(values, 'name'), zone: textOf(values, 'zone') })
    toast({ title: 'Your name and time zone are saved' })
    router.refresh()
  })
  return (
    <section>
      <h2>Name and time zone</h2>
      <form method="post" noValidate onSubmit={onSubmit} className="border-ink mt-2 border-t">
        {problem && <FormMessage tone="refused">{problem.message}</FormMessage>}
        <TextField
          label="Name"
          name="name"
          defaultValue={me.name}
          autoComplete="name"
          error={errorOf('name')}
        />
        <ZoneField defaultValue={me.zone} error={errorOf('zone')} />
        <div className="mt-4">
          <Button type="submit" busy={busy} busyLabel="Saving">
            Save name and zone
          </Button>
        </div>
      </form>
    </section>
  )
}
