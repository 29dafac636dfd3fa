'use client'

import { useQueryClient } from '@tanstack/react-query'
import { useState } from 'react'
import type { Reader } from '@/app/(inside)/applications/[id]/exhibits/_components/reader'
import { Button } from '@/components/ui/button'
import { Confirm } from '@/components/ui/confirm'
import { Dialog } from '@/components/ui/dialog'
import { ErrorSummary } from '@/components/ui/error-summary'
import { TextAreaField } from '@/components/ui/text-fields'
import { useToast } from '@/components/ui/toast'
import { checkExhibit, exhibitKeys, issueExhibit } from '@/lib/client/exhibits'
import { ProblemError } from '@/lib/client/fetcher'
import { textOf, useFormCall } from '@/lib/client/use-form-call'
import { api } from '@/lib/routes'
import type { ExhibitRevision } from '@/lib/schemas/exhibit'

interface ActProps {
  row: ExhibitRevision
  reader: Reader
}

/** What this person can do about a revision now, or whose move it is. */
export function RevisionActs({ row, reader }: ActProps) {
  if (row.state === 'draft' && reader.mayCheck) {
    if (row.preparedBy.id === reader.id) return <Words>Another engineer checks it</Words>
    return row.document && <CheckRevision row={row} />
  }
  if (row.state === 'checked' && reader.mayIssue) {
    if (row.outOfStep) return <Words>Out of step, not to be issued</Words>
    return row.document && <IssueRevision row={row} />
  }
  return null
}

function Words({ children }: { children: string }) {
  return <span className="cap">{children}</span>
}

function useRefresh(row: ExhibitRevision) {
  const client = useQueryClient()
  return () => client.invalidateQueries({ queryKey: exhibitKeys.ofApplication(row.applicationId) })
}

function CheckRevision({ row }: { row: ExhibitRevision }) {
  const [open, setOpen] = useState(false)
  return (
    <>
      <Button look="primary" onClick={() => setOpen(true)}>
        Check revision {row.revision}
      </Button>
      <Dialog
        open={open}
        onOpenChange={setOpen}
        title={`Check revision ${row.revision} of exhibit C`}
        description={`Prepared by ${row.preparedBy.name}. Your name goes on the document, which is then frozen as it stands.`}
      >
        <CheckForm row={row} onDone={() => setOpen(false)} />
      </Dialog>
    </>
  )
}

function CheckForm({ row, onDone }: { row: ExhibitRevision; onDone: () => void }) {
  const refresh = useRefresh(row)
  const toast = useToast()
  const form = useFormCall(async (values) => {
    await checkExhibit(row.id, { notes: textOf(values, 'notes') })
    await refresh()
    toast({
      title: `Revision ${row.revision} checked`,
      detail: 'The document with your name is being made; then it can be issued.',
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
      <p>
        <a className="underline" href={api.exhibitDocument(row.id)} download>
          Read the draft first
        </a>
        , made from calculation no. {row.calculation.no} of design revision{' '}
        {row.calculation.designNo}.
      </p>
      {row.outOfStep && (
        <p className="text-soon font-medium">
          It is out of step ({row.outOfStep}): once checked it cannot be issued.
        </p>
      )}
      <TextAreaField
        stacked
        rows={3}
        label="What you checked, and against what"
        name="notes"
        hint="Kept with the revision, not printed."
        error={form.errorOf('notes')}
      />
      <div className="flex justify-end">
        <Button type="submit" look="primary" busy={form.busy} busyLabel="Signing">
          Sign as checked
        </Button>
      </div>
    </form>
  )
}

function IssueRevision({ row }: { row: ExhibitRevision }) {
  const [open, setOpen] = useState(false)
  const [error, setError] = useState<string>()
  const refresh = useRefresh(row)
  const toast = useToast()

  async function issue() {
    setError(undefined)
    try {
      await issueExhibit(row.id)
    } catch (refusal) {
      if (refusal instanceof ProblemError) setError(refusal.message)
      await refresh()
      throw refusal
    }
    await refresh()
    toast({ title: `Revision ${row.revision} issued`, detail: 'Its bytes are frozen.' })
  }

  return (
    <>
      <Button look="primary" onClick={() => setOpen(true)}>
        Issue revision {row.revision}
      </Button>
      <Confirm
        open={open}
        onOpenChange={setOpen}
        title={`Issue revision ${row.revision} of exhibit C`}
        act={`Issue revision ${row.revision}`}
        actBusy="Issuing"
        onConfirm={issue}
        error={error}
      >
        <p>
          Frozen for good: the document as {row.checkedBy?.name} checked it, made from calculation
          no. {row.calculation.no} of design revision {row.calculation.designNo}. A later change
          makes the next revision; the one issued before is superseded.
        </p>
        <p className="cap mt-3">SHA-256 of the document</p>
        <p className="mono break-all">{row.document?.sha256}</p>
      </Confirm>
    </>
  )
}
