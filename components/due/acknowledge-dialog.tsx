'use client'

import { useRouter } from 'next/navigation'
import { useState } from 'react'
import type { ActedClock } from '@/components/due/due-table'
import { FormMessage } from '@/components/sign-in/form-message'
import { Button } from '@/components/ui/button'
import { Dialog } from '@/components/ui/dialog'
import { ErrorSummary } from '@/components/ui/error-summary'
import { DateField, TextAreaField } from '@/components/ui/text-fields'
import { useToast } from '@/components/ui/toast'
import { acknowledgeClock } from '@/lib/client/due'
import { newId } from '@/lib/client/new-id'
import { textOf, useFormCall } from '@/lib/client/use-form-call'
import { formatDate } from '@/lib/domain/format-date'
import { nextDateRange } from '@/lib/domain/obligations'

interface AcknowledgeDialogProps {
  clock: ActedClock
  todayOn: string
  onClose: () => void
}

/** Says that a person has a clock in hand, why, and by when the next word is due. */
export function AcknowledgeDialog({ clock, todayOn, onClose }: AcknowledgeDialogProps) {
  // One id for the open dialog: a second submit of it is the same acknowledgment.
  const [id] = useState(newId)
  const router = useRouter()
  const toast = useToast()
  const dueOn = clock.dueOn ?? todayOn
  const range = nextDateRange(dueOn, todayOn)

  async function send(values: FormData) {
    const untilOn = textOf(values, 'untilOn')
    const reason = textOf(values, 'reason')
    await acknowledgeClock({ id, ...clock.key, dueOn, reason, untilOn })
    toast({
      title: `Acknowledged: ${clock.title}`,
      detail: `No notice goes out before ${formatDate(untilOn, todayOn)}.`,
    })
    onClose()
    router.refresh()
  }

  const { onSubmit, busy, problem, fields, errorOf } = useFormCall(send)
  return (
    <Dialog
      open
      onOpenChange={(open) => !open && onClose()}
      title={`Acknowledge: ${clock.title}`}
      description={`${clock.project}. Notices about this clock stay silent until the next date. The clock itself runs on.`}
    >
      <form method="post" noValidate onSubmit={onSubmit}>
        <ErrorSummary errors={fields} />
        {problem && <FormMessage tone="refused">{problem.message}</FormMessage>}
        <TextAreaField
          stacked
          label="Reason"
          name="reason"
          rows={3}
          maxLength={500}
          hint="What is being done, for whoever reads the list next."
          error={errorOf('reason')}
        />
        <DateField
          stacked
          label="Next date"
          name="untilOn"
          defaultValue={range.from}
          min={range.from}
          max={range.to}
          hint={`${formatDate(range.from, todayOn)} to ${formatDate(range.to, todayOn)}`}
          error={errorOf('untilOn')}
        />
        <div className="mt-5 flex justify-end">
          <Button type="submit" look="primary" busy={busy} busyLabel="Recording">
            Acknowledge
          </Button>
        </div>
      </form>
    </Dialog>
  )
}
