'use client'

import { useState } from 'react'
import { FormMessage } from '@/components/sign-in/form-message'
import { Button } from '@/components/ui/button'
import { LinkButton } from '@/components/ui/link-button'
import { DateField, TextAreaField } from '@/components/ui/text-fields'
import { newId } from '@/lib/client/new-id'
import { acknowledgeByLink } from '@/lib/client/notices'
import { textOf, useFormCall } from '@/lib/client/use-form-call'
import { formatDate } from '@/lib/domain/format-date'
import { routes } from '@/lib/routes'

interface AcknowledgeFormProps {
  secret: string
  applicationId: string
  /** First and last day that the next date may be. */
  from: string
  to: string
}

/** Reason and next date; only this press changes anything. */
export function AcknowledgeForm({ secret, applicationId, from, to }: AcknowledgeFormProps) {
  const [id] = useState(newId)
  const [until, setUntil] = useState<string>()
  const { onSubmit, busy, problem, errorOf } = useFormCall(async (values) => {
    const answer = { id, reason: textOf(values, 'reason'), untilOn: textOf(values, 'untilOn') }
    setUntil((await acknowledgeByLink({ secret, ...answer })).untilOn)
  })
  if (until)
    return (
      <>
        <FormMessage tone="plain">
          Acknowledged. The next notice about this clock goes out on {formatDate(until)}. Its due
          date has not moved.
        </FormMessage>
        <LinkButton href={routes.application(applicationId)}>Open the application</LinkButton>
      </>
    )
  return (
    <form method="post" onSubmit={onSubmit}>
      {problem && <FormMessage tone="refused">{problem.message}</FormMessage>}
      <TextAreaField
        stacked
        label="Reason"
        name="reason"
        rows={3}
        maxLength={500}
        hint="What is under way, for whoever looks at this clock next."
        required
        error={errorOf('reason')}
      />
      <DateField
        stacked
        label="Next date"
        name="untilOn"
        min={from}
        max={to}
        hint={`No notice goes out before it. ${formatDate(from)} to ${formatDate(to)}.`}
        required
        error={errorOf('untilOn')}
      />
      <div className="mt-5">
        <Button type="submit" look="primary" busy={busy} busyLabel="Acknowledging">
          Acknowledge
        </Button>
      </div>
    </form>
  )
}
