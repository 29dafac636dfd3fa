'use client'

import { useQueryClient } from '@tanstack/react-query'
import { useState } from 'react'
import {
  type CalculationChoice,
  dayWords,
  type Reader,
} from '@/app/(inside)/applications/[id]/exhibits/_components/reader'
import { Button } from '@/components/ui/button'
import { Dialog } from '@/components/ui/dialog'
import { ErrorSummary } from '@/components/ui/error-summary'
import { SelectField, TextAreaField, TextField } from '@/components/ui/text-fields'
import { useToast } from '@/components/ui/toast'
import { exhibitKeys, prepareExhibit } from '@/lib/client/exhibits'
import { newId } from '@/lib/client/new-id'
import { textOf, useFormCall } from '@/lib/client/use-form-call'
import type { ExhibitRevision } from '@/lib/schemas/exhibit'

interface PrepareExhibitProps {
  applicationId: string
  calculations: readonly CalculationChoice[]
  revisions: readonly ExhibitRevision[]
  reader: Reader
}

/** "Prepare revision 3": from which calculation, and what is new. */
export function PrepareExhibit(props: PrepareExhibitProps) {
  const [open, setOpen] = useState(false)
  const next = nextNo(props.revisions)
  const isOtherMove = openOf(props.revisions)?.outOfStep === null
  return (
    <>
      <Button look={isOtherMove ? 'plain' : 'primary'} onClick={() => setOpen(true)}>
        Prepare revision {next}
      </Button>
      <Dialog
        open={open}
        onOpenChange={setOpen}
        title={`Prepare revision ${next} of exhibit C`}
        description="Every figure comes from the frozen calculation and the request’s terms as they are now."
      >
        <PrepareForm {...props} onDone={() => setOpen(false)} />
      </Dialog>
    </>
  )
}

function nextNo(revisions: readonly ExhibitRevision[]): number {
  return 1 + Math.max(0, ...revisions.map((one) => one.revision))
}

/** The revision that waits to be checked or issued. */
function openOf(revisions: readonly ExhibitRevision[]): ExhibitRevision | undefined {
  return revisions.find((one) => one.state === 'draft' || one.state === 'checked')
}

function PrepareForm(props: PrepareExhibitProps & { onDone: () => void }) {
  const { applicationId, calculations, revisions, reader, onDone } = props
  const client = useQueryClient()
  const toast = useToast()
  const [id] = useState(newId)
  const [no, setNo] = useState(calculations[0]?.no ?? 0)
  const isSynthetic = calculations.find((one) => one.no === no)?.synthetic ?? false
  const open = openOf(revisions)
  const last = revisions[0]

  const form = useFormCall(async (values) => {
    const made = await prepareExhibit(applicationId, {
      id,
      calculationNo: Number(textOf(values, 'calculationNo')),
      what: textOf(values, 'what'),
      ...(isSynthetic && { weatherReason: textOf(values, 'weatherReason') }),
    })
    await client.invalidateQueries({ queryKey: exhibitKeys.ofApplication(applicationId) })
    toast({
      title: `Revision ${made.revision} prepared`,
      detail: 'Its document is being made; then the other engineers are asked to check it.',
    })
    onDone()
  })

  return (
    <form method="post" noValidate onSubmit={form.onSubmit} className="grid gap-4">
      <ErrorSummary errors={form.fields} />
      {form.problem && (
        <p role="alert" className="text-late font-semibold">
          {form.problem.message}
        </p>
      )}
      <SelectField
        stacked
        label="Calculation"
        name="calculationNo"
        value={String(no)}
        onChange={(event) => setNo(Number(event.target.value))}
        options={calculations.map((one) => ({
          value: String(one.no),
          label: `no. ${one.no} of ${dayWords(one.recordedAt, reader)}, design revision ${one.designNo}, ${one.weatherName}`,
        }))}
        error={form.errorOf('calculationNo')}
      />
      <TextField
        stacked
        label="What is new in this revision"
        name="what"
        defaultValue={last ? '' : 'First issue'}
        autoComplete="off"
        hint="Printed in the revision table."
        error={form.errorOf('what')}
      />
      {isSynthetic && (
        <TextAreaField
          stacked
          rows={2}
          label="Why a synthetic year, and not a station’s file"
          name="weatherReason"
          defaultValue={last?.weatherReason ?? ''}
          hint="Printed with the limits of the estimate."
          error={form.errorOf('weatherReason')}
        />
      )}
      {open && (
        <p className="text-ink-2 text-sm">
          Revision {open.revision} is {open.state} and was never issued: it is set aside for this
          one.
        </p>
      )}
      <div className="flex justify-end">
        <Button type="submit" look="primary" busy={form.busy} busyLabel="Preparing">
          Prepare revision {nextNo(revisions)}
        </Button>
      </div>
    </form>
  )
}
