'use client'

import { useEffect } from 'react'
import { Button } from '@/components/ui/button'
import { ErrorState } from '@/components/ui/error-state'
import { LinkButton } from '@/components/ui/link-button'
import { routes } from '@/lib/routes'

interface ErrorPageProps {
  error: Error & { digest?: string }
  reset: () => void
}

/** Stands in for a page that failed. */
export default function ErrorPage({ error, reset }: ErrorPageProps) {
  useEffect(() => console.error(error), [error])
  return (
    <div className="px-4 py-10 md:px-0">
      <ErrorState
        title="This page could not be shown"
        kept="Everything recorded before is kept. What was typed on this page and not yet saved is not."
        next="Try again. If it fails again, tell the administrator the number below."
        reference={error.digest}
        actions={
          <>
            <Button look="primary" onClick={reset}>
              Try again
            </Button>
            <LinkButton href={routes.home()}>Go to what is due</LinkButton>
          </>
        }
      />
    </div>
  )
}
