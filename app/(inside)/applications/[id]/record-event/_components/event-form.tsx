'use client'

import { useRouter } from 'next/navigation'
import { FactForm } from '@/components/applications/fact-form'
import type { FactIntent } from '@/components/applications/fact-intent'
import { routes } from '@/lib/routes'

/** The form on a page: leads to the sequence once the fact is recorded. */
export function EventForm({
  applicationId,
  intent,
}: {
  applicationId: string
  intent: FactIntent
}) {
  const router = useRouter()
  return (
    <FactForm
      applicationId={applicationId}
      intent={intent}
      onRecorded={() => router.push(routes.application(applicationId))}
    />
  )
}
