'use client'

import { useQueryClient } from '@tanstack/react-query'
import { useRouter } from 'next/navigation'
import { useState } from 'react'
import { Button } from '@/components/ui/button'
import { Dialog } from '@/components/ui/dialog'
import { ErrorSummary } from '@/components/ui/error-summary'
import { DateField, TextAreaField } from '@/components/ui/text-fields'
import { useToast } from '@/components/ui/toast'
import { acknowledgeClock, applicationKeys } from '@/lib/client/applications'
import { newId } from '@/lib/client/new-id'
import { textOf, useFormCall } from '@/lib/client/use-form-call'
import { formatDate } from '@/lib/domain/format-date'
import type { ItemView } from '@/lib/schemas/application'

interface AcknowledgeButtonProps {
  applicationId: string
  item: Pick<ItemView, 'step' | 'instance' | 'obligation' | 'title'>
  /** The date worked to: the acknowledgment holds for this one only. */
  dueOn: string
  dueWords: string
  /** Days the next date may lie in. */
  range: { from: string; to: string }
}

/** Says that a clock is in hand, with the day to look again; notices are silent until then. */
export function AcknowledgeButton(props: AcknowledgeButtonProps) {
  // Made with the open dialog: a second submit of it is the same acknowledgment.
  const [id, setId] = useState<string>()
  return (
    <>
      <Button onClick={() => setId(newId())}>Say it is in hand</Button>
      <Dialog
        open={id !== undefined}
        onOpenChange={(open) => !open && setId(undefined)}
        title={props.item.title}
        description={`Due ${props.dueWords}. Notices are silent until the next date, and speak again where the due date moves.`}
      >
        {id && <AcknowledgeForm {...props} id={id} onDone={() => setId(undefined)} />}
      </Dialog>
    </>
  )
}

function AcknowledgeForm(props: AcknowledgeButtonProps & { id: string; onDone: () => void }) {
  const { id, applicationId, item, dueOn, range, onDone } = props
  const client = useQueryClient()
  const router = useRouter()
  const toast = useToast()
  const form = useFormCall(async (values) => {
    const { step, instance, obligation } = item
    const untilOn = textOf(values, 'untilOn')
    const reason = textOf(values, 'reason')
    await acknowledgeClock({
      id,
      applicationId,
      step,
      instance,
      obligation,
      dueOn,
      untilOn,
      reason,
    })
    toast({ title: `In hand: ${item.title}`, detail: `Silent until ${formatDate(untilOn)}.` })
    onDone()
    void client.invalidateQueries({ queryKey: applicationKeys.all })
    router.refresh()
  })
  return (
    <form onSubmit={form.onSubmit}>
      <ErrorSummary errors={form.fields} />
      {form.problem && (
        <p role="alert" className="text-late mb-2 font-semibold">
          {form.problem.message}
        </p>
      )}
      <TextAreaField
        label="What is being done"
        name="reason"
        rows={2}
        required
        maxLength={500}
        error={form.errorOf('reason')}
      />
      <DateField
        label="Next date"
        name="untilOn"
        required
        min={range.from}
        max={range.to}
        defaultValue={range.from}
        hint={`${formatDate(range.from)} to ${formatDate(range.to)}`}
        error={form.errorOf('untilOn')}
      />
      <div className="mt-4 flex justify-end">
        <Button type="submit" look="primary" busy={form.busy} busyLabel="Recording">
          Say it is in hand
        </Button>
      </div>
    </form>
  )
}
