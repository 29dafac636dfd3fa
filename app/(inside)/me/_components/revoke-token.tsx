'use client'

import { useRouter } from 'next/navigation'
import { useState } from 'react'
import { Button } from '@/components/ui/button'
import { Confirm } from '@/components/ui/confirm'
import { revokeToken } from '@/lib/client/account'
import { ProblemError } from '@/lib/client/fetcher'
import type { ApiToken } from '@/lib/schemas/person'

/** Ends a token after asking. */
export function RevokeToken({ token }: { token: ApiToken }) {
  const [open, setOpen] = useState(false)
  const [error, setError] = useState<string>()
  const router = useRouter()

  async function revoke() {
    setError(undefined)
    try {
      await revokeToken(token.id)
    } catch (refusal) {
      if (refusal instanceof ProblemError) setError(refusal.message)
      throw refusal
    }
    router.refresh()
  }

  return (
    <>
      <Button look="quiet" aria-label={`Revoke ${token.name}`} onClick={() => setOpen(true)}>
        Revoke
      </Button>
      <Confirm
        open={open}
        onOpenChange={setOpen}
        title={`Revoke ${token.name}`}
        act="Revoke the token"
        actBusy="Revoking"
        danger
        onConfirm={revoke}
        error={error}
      >
        <p>The program that uses it is refused from now on. This cannot be taken back.</p>
      </Confirm>
    </>
  )
}
