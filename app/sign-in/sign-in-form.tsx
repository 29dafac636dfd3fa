'use client'

import Link from 'next/link'
import { FormMessage } from '@/components/sign-in/form-message'
import { Button } from '@/components/ui/button'
import { TextField } from '@/components/ui/text-fields'
import type { ProblemError } from '@/lib/client/fetcher'
import { signIn } from '@/lib/client/sign-in'
import { textOf, useFormCall } from '@/lib/client/use-form-call'
import { routes } from '@/lib/routes'

interface SignInFormProps {
  /** Where to go after, a path of this site. */
  onward: string
  /** What happened before, such as a session that ended. */
  note?: string
}

function wordsOf(problem: ProblemError): string {
  if (problem.status !== 401) return problem.message
  return 'This e-mail address and password do not fit together. Check both, or choose a new password.'
}

export function SignInForm({ onward, note }: SignInFormProps) {
  const { onSubmit, busy, problem } = useFormCall(async (values) => {
    await signIn({ email: textOf(values, 'email'), password: textOf(values, 'password') })
    // A full load, so that nothing of the person before stays in memory.
    window.location.assign(onward)
  })
  return (
    <form method="post" onSubmit={onSubmit}>
      {problem && <FormMessage tone="refused">{wordsOf(problem)}</FormMessage>}
      {note && !problem && <FormMessage tone="plain">{note}</FormMessage>}
      <TextField
        stacked
        label="E-mail"
        name="email"
        type="email"
        autoComplete="username"
        autoCapitalize="none"
        required
        autoFocus
      />
      <TextField
        stacked
        label="Password"
        name="password"
        type="password"
        autoComplete="current-password"
        required
      />
      <div className="mt-5 flex flex-wrap items-center justify-between gap-4">
        <Button type="submit" look="primary" busy={busy} busyLabel="Signing in">
          Sign in
        </Button>
        <Link href={routes.forgotPassword()} className="underline">
          Forgot the password
        </Link>
      </div>
      <p className="text-ink-2 mt-6 text-sm">
        No account yet? An administrator of your company invites you by e-mail.
      </p>
    </form>
  )
}
