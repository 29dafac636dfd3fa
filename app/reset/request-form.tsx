'use client'

import Link from 'next/link'
import { useState } from 'react'
import { FormMessage } from '@/components/sign-in/form-message'
import { Button } from '@/components/ui/button'
import { TextField } from '@/components/ui/text-fields'
import { requestLink } from '@/lib/client/account'
import { textOf, useFormCall } from '@/lib/client/use-form-call'
import { routes } from '@/lib/routes'

export function RequestForm() {
  const [said, setSaid] = useState<string>()
  const { onSubmit, busy, problem, errorOf } = useFormCall(async (values) => {
    const { message } = await requestLink(textOf(values, 'email'))
    setSaid(message)
  })
  return (
    <form method="post" onSubmit={onSubmit}>
      {problem && <FormMessage tone="refused">{problem.message}</FormMessage>}
      {said && !problem && <FormMessage tone="plain">{said}</FormMessage>}
      <TextField
        stacked
        label="E-mail"
        name="email"
        type="email"
        autoComplete="username"
        autoCapitalize="none"
        required
        error={errorOf('email')}
      />
      <div className="mt-5 flex flex-wrap items-center justify-between gap-4">
        <Button type="submit" look="primary" busy={busy} busyLabel="Asking">
          {said ? 'Send it again' : 'Send the link'}
        </Button>
        <Link href={routes.signIn()} className="underline">
          Back to sign-in
        </Link>
      </div>
    </form>
  )
}
