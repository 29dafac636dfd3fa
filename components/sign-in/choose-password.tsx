'use client'

import { useState } from 'react'
import { FormMessage } from '@/components/sign-in/form-message'
import { Button } from '@/components/ui/button'
import { TextField } from '@/components/ui/text-fields'
import { acceptLink } from '@/lib/client/account'
import { ProblemError } from '@/lib/client/fetcher'
import { signIn } from '@/lib/client/sign-in'
import { textOf, useFormCall } from '@/lib/client/use-form-call'
import { routes, withQuery } from '@/lib/routes'
import { passwordLimits } from '@/lib/schemas/person'

interface ChoosePasswordProps {
  /** The secret of the one-time link. */
  secret: string
  email: string
  act: string
}

/** Chooses the password a one-time link stands for, then signs in with it. */
export function ChoosePassword({ secret, email, act }: ChoosePasswordProps) {
  const [mismatch, setMismatch] = useState<string>()
  const { onSubmit, busy, problem, errorOf } = useFormCall(async (values) => {
    const password = textOf(values, 'password')
    const isSame = password === textOf(values, 'again')
    setMismatch(isSame ? undefined : 'The two passwords differ. Type the same one twice.')
    if (!isSame) return
    await acceptLink({ secret, password })
    window.location.assign(await wayOn(email, password))
  })
  return (
    <form method="post" onSubmit={onSubmit}>
      {problem && <FormMessage tone="refused">{problem.message}</FormMessage>}
      <TextField
        stacked
        label="E-mail"
        name="email"
        value={email}
        autoComplete="username"
        readOnly
      />
      <TextField
        stacked
        label="New password"
        name="password"
        type="password"
        autoComplete="new-password"
        hint={`At least ${passwordLimits.min} characters; a few words are easier to keep than signs.`}
        required
        error={errorOf('password')}
      />
      <TextField
        stacked
        label="The same once more"
        name="again"
        type="password"
        autoComplete="new-password"
        required
        error={mismatch}
      />
      <div className="mt-5">
        <Button type="submit" look="primary" busy={busy} busyLabel="Setting the password">
          {act}
        </Button>
      </div>
    </form>
  )
}

// The password is set by now: a sign-in that fails leads to the form, not back to a used link.
async function wayOn(email: string, password: string): Promise<string> {
  try {
    await signIn({ email, password })
    return routes.home()
  } catch (error) {
    if (!(error instanceof ProblemError)) throw error
    return withQuery(routes.signIn(), { chosen: 1 })
  }
}
