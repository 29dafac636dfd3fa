'use client'

import { useState } from 'react'
import { FormMessage } from '@/components/sign-in/form-message'
import { Button } from '@/components/ui/button'
import { TextField } from '@/components/ui/text-fields'
import { changePassword } from '@/lib/client/account'
import { textOf, useFormCall } from '@/lib/client/use-form-call'
import { routes, withQuery } from '@/lib/routes'
import { passwordLimits } from '@/lib/schemas/person'

/** Chooses another password; one signs in anew with it. */
export function OwnPassword({ email }: { email: string }) {
  const [mismatch, setMismatch] = useState<string>()
  const { onSubmit, busy, problem, errorOf } = useFormCall(async (values) => {
    const password = textOf(values, 'password')
    const isSame = password === textOf(values, 'again')
    setMismatch(isSame ? undefined : 'The two passwords differ. Type the same one twice.')
    if (!isSame) return
    await changePassword({ current: textOf(values, 'current'), password })
    window.location.assign(withQuery(routes.signIn(), { chosen: 1 }))
  })
  return (
    <section>
      <h2>Password</h2>
      <form method="post" noValidate onSubmit={onSubmit} className="border-ink mt-2 border-t">
        {problem && <FormMessage tone="refused">{problem.message}</FormMessage>}
        <input type="hidden" name="username" value={email} autoComplete="username" />
        <TextField
          label="Present password"
          name="current"
          type="password"
          autoComplete="current-password"
          error={errorOf('current')}
        />
        <TextField
          label="New password"
          name="password"
          type="password"
          autoComplete="new-password"
          hint={`At least ${passwordLimits.min} characters.`}
          error={errorOf('password')}
        />
        <TextField
          label="The same once more"
          name="again"
          type="password"
          autoComplete="new-password"
          error={mismatch}
        />
        <p className="text-ink-2 mt-3 text-sm">
          Every session ends, this one too. API tokens stay until you revoke them.
        </p>
        <div className="mt-4">
          <Button type="submit" busy={busy} busyLabel="Changing">
            Change the password
          </Button>
        </div>
      </form>
    </section>
  )
}
