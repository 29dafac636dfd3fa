'use client'

import { useRouter } from 'next/navigation'
import { useRef, useState } from 'react'
import { FormMessage } from '@/components/sign-in/form-message'
import { RevokeToken } from '@/app/(inside)/me/_components/revoke-token'
import { Button } from '@/components/ui/button'
import { TextField } from '@/components/ui/text-fields'
import { createToken } from '@/lib/client/account'
import { textOf, useFormCall } from '@/lib/client/use-form-call'
import { formatInstant } from '@/lib/domain/format-date'
import type { ApiToken } from '@/lib/schemas/person'

interface ApiTokensProps {
  tokens: readonly ApiToken[]
  zone: string
}

/** The tokens that let a program act as this person. */
export function ApiTokens({ tokens, zone }: ApiTokensProps) {
  return (
    <section className="lg:col-span-2">
      <h2>API tokens</h2>
      <p className="text-ink-2 mt-1 max-w-2xl text-sm">
        A program that sends a token as <span className="mono">Authorization: Bearer</span> can do
        what you can. Make one for each program and revoke it when the program goes.
      </p>
      <NewToken />
      <ul className="border-ink mt-4 border-t">
        {tokens.length === 0 && (
          <li className="text-ink-2 py-3">No token is open. Name one above to make it.</li>
        )}
        {tokens.map((token) => (
          <li
            key={token.id}
            className="border-rule grid grid-cols-[minmax(0,1fr)_auto] items-center gap-x-6 border-b py-2.5 sm:grid-cols-[minmax(0,1fr)_14rem_14rem_auto]"
          >
            <strong className="font-semibold break-words">{token.name}</strong>
            <Moment caption="Made" at={token.createdAt} zone={zone} />
            <Moment caption="Last used" at={token.lastUsedAt} zone={zone} />
            <span className="max-sm:col-start-2 max-sm:row-start-1">
              <RevokeToken token={token} />
            </span>
          </li>
        ))}
      </ul>
    </section>
  )
}

function Moment({ caption, at, zone }: { caption: string; at: string | null; zone: string }) {
  return (
    <span className="max-sm:col-span-2">
      <span className="cap block max-sm:mr-2 max-sm:inline">{caption}</span>
      <span className="mono">{at ? formatInstant(at, zone) : 'never'}</span>
    </span>
  )
}

function NewToken() {
  const id = useRef<string>(undefined)
  const [secret, setSecret] = useState<string>()
  const router = useRouter()
  const { onSubmit, busy, problem, errorOf } = useFormCall(async (values, form) => {
    id.current ??= crypto.randomUUID()
    const token = await createToken({ id: id.current, name: textOf(values, 'name') })
    id.current = undefined
    setSecret(token.secret)
    form.reset()
    router.refresh()
  })
  return (
    <form method="post" noValidate onSubmit={onSubmit} className="mt-2 max-w-2xl">
      {problem && <FormMessage tone="refused">{problem.message}</FormMessage>}
      <TextField
        label="Name of the program"
        name="name"
        autoComplete="off"
        error={errorOf('name')}
        unit={
          <Button type="submit" busy={busy} busyLabel="Making">
            Make a token
          </Button>
        }
      />
      {secret && <NewSecret secret={secret} />}
    </form>
  )
}

function NewSecret({ secret }: { secret: string }) {
  const [copied, setCopied] = useState(false)
  return (
    <div role="status" className="border-copper bg-copper-2 mt-3 border-l-4 px-3.5 py-2.5">
      <p className="font-semibold">Copy the token now: it is not shown again.</p>
      <p className="mono mt-1 break-all select-all">{secret}</p>
      <Button
        className="mt-2"
        onClick={() => navigator.clipboard.writeText(secret).then(() => setCopied(true))}
      >
        {copied ? 'Copied' : 'Copy'}
      </Button>
    </div>
  )
}
