'use client'

import { RolesField } from '@/components/people/roles-field'
import { ZoneField } from '@/components/people/zone-field'
import { FormMessage } from '@/components/sign-in/form-message'
import { Button } from '@/components/ui/button'
import { ErrorSummary } from '@/components/ui/error-summary'
import { TextField } from '@/components/ui/text-fields'
import { useFormCall } from '@/lib/client/use-form-call'
import { type Role, roles } from '@/lib/domain/access'
import type { Person } from '@/lib/schemas/person'

interface PersonFormProps {
  send: (values: FormData) => Promise<unknown>
  person: Pick<Person, 'name' | 'zone' | 'roles'>
  /** Asks for the address too; later it stays as it was. */
  isNew?: boolean
  act: string
}

/** Name, address, roles and zone of a person. */
export function PersonForm({ send, person, isNew, act }: PersonFormProps) {
  const { onSubmit, busy, problem, fields, errorOf } = useFormCall(send)
  return (
    <form method="post" noValidate onSubmit={onSubmit}>
      <ErrorSummary errors={fields} />
      {problem && <FormMessage tone="refused">{problem.message}</FormMessage>}
      <TextField
        stacked
        label="Name"
        name="name"
        defaultValue={person.name}
        autoComplete="off"
        error={errorOf('name')}
      />
      {isNew && (
        <TextField
          stacked
          label="E-mail"
          name="email"
          type="email"
          autoComplete="off"
          error={errorOf('email')}
        />
      )}
      <RolesField held={person.roles} error={errorOf('roles')} />
      <ZoneField stacked defaultValue={person.zone} error={errorOf('zone')} />
      <div className="mt-5 flex justify-end">
        <Button type="submit" look="primary" busy={busy} busyLabel="Saving">
          {act}
        </Button>
      </div>
    </form>
  )
}

/** The roles ticked in the form. */
export function rolesOf(values: FormData): Role[] {
  const ticked = values.getAll('roles')
  return roles.filter((role) => ticked.includes(role))
}
