'use client'

import { useQueries } from '@tanstack/react-query'
import type { SyntheticEvent } from 'react'
import { Button } from '@/components/ui/button'
import { ErrorSummary, type SummaryError } from '@/components/ui/error-summary'
import { FileDrop } from '@/components/ui/file-drop'
import { entryChoicesQuery } from '@/lib/client/entries'
import type { Entry, EntryChoices } from '@/lib/schemas/entry'
import { attachmentLimitBytes } from '@/lib/schemas/file'
import { ConcernFields } from './concern-fields'
import { inputOf, type EntryDraft, type FormIds } from './entry-draft'
import { WhatFields, WhenFields } from './entry-fields'
import { ProofFields } from './proof-fields'
import { useRecordEntry } from './use-record-entry'
import type { Uploads } from './use-uploads'

interface EntryFormProps {
  applicationId: string
  choices: EntryChoices
  draft: EntryDraft
  set: (part: Partial<EntryDraft>) => void
  ids: FormIds
  uploads: Uploads
  /** What was found out about a file, such as that its e-mail is recorded already. */
  note?: string
  onRecorded: (entry: Entry) => void
  onCancel: () => void
}

/** Records an entry, its files and the event it proves with one press. */
export function EntryForm(props: EntryFormProps) {
  const { applicationId, choices, draft, set, ids, uploads, note } = props
  const { busy, problem, fields, errorOf, refuse, submit } = useRecordEntry(props.onRecorded)
  const openIn = useOpenIn(draft.others, choices)
  const organization = choices.organizations.find((one) => one.id === draft.organizationId)
  const zone = organization?.zone ?? choices.zone

  function send(event: SyntheticEvent) {
    event.preventDefault()
    const waiting = uploads.files.filter((file) => !file.kept)
    if (waiting.length > 0) return refuse(waiting.map(({ name }) => waitFor(name)))
    const attachments = uploads.files.flatMap((file) => file.kept ?? [])
    const open = draft.proof ? openIn(draft.proof.step).map(({ id }) => id) : []
    const proof = draft.proof && {
      ...draft.proof,
      others: draft.proof.others.filter((id) => open.includes(id)),
    }
    const context = { applicationId, ids, attachments, zone, operatorZone: choices.zone }
    void submit(inputOf({ ...draft, proof }, context))
  }

  const common = { draft, set, organizations: choices.organizations, zone, errorOf }
  return (
    <form
      onSubmit={send}
      noValidate
      aria-label={titleOf(draft)}
      className="border-ink mb-8 max-w-3xl border-t-[1.5px] border-b-[1.5px] pb-5"
    >
      <h2 className="pt-4 pb-2">{titleOf(draft)}</h2>
      {problem && (
        <p role="alert" className="border-late bg-late-2 mb-3 border-l-4 px-3.5 py-2.5">
          {problem}
        </p>
      )}
      <ErrorSummary errors={fields.map((field) => named(field, draft, choices))} />
      <WhatFields {...common} />
      <div className="border-rule-2 border-b py-3">
        <FileDrop
          label="Attachments"
          hint={`Up to ${attachmentLimitBytes / 1_000_000} MB each; an .eml file fills the form`}
          multiple
          files={uploads.files}
          onFiles={uploads.add}
          onRemove={uploads.remove}
        />
        {note && (
          <p role="status" className="text-soon mt-2 text-sm font-medium">
            {note}
          </p>
        )}
      </div>
      <WhenFields {...common} />
      <ConcernFields
        others={choices.others}
        chosen={draft.others}
        onChange={(others) => set({ others, proof: withOthers(draft, others) })}
      />
      <ProofFields
        draft={draft}
        onChange={(proof) => set({ proof })}
        choices={choices}
        errorOf={errorOf}
        openIn={openIn}
      />
      <div className="bg-film mt-2 flex flex-wrap gap-2.5 py-2.5 max-md:sticky max-md:bottom-[calc(3.5rem+env(safe-area-inset-bottom))]">
        <Button type="submit" look="primary" busy={busy} busyLabel="Recording">
          {draft.proof ? 'Record entry and event' : 'Record entry'}
        </Button>
        <Button onClick={props.onCancel}>Discard</Button>
      </div>
    </form>
  )
}

function titleOf(draft: EntryDraft): string {
  if (draft.revisesId) return 'Revise the entry'
  return draft.answersId ? 'Record the answer' : 'Record correspondence'
}

const waitFor = (name: string) => ({
  path: 'attachments',
  message: `"${name}" is not kept yet: wait until it is, or remove it.`,
})

/** An application added after the event was chosen gets the event too. */
function withOthers(draft: EntryDraft, others: string[]) {
  if (!draft.proof) return null
  const added = others.filter((id) => !draft.others.includes(id))
  return { ...draft.proof, others: [...draft.proof.others, ...added] }
}

/** Says of which request a fault speaks where its field is not on the form. */
function named(field: SummaryError, draft: EntryDraft, { others }: EntryChoices): SummaryError {
  const index = Number(/^(?:facts|applications)\.(\d+)/.exec(field.path)?.[1] ?? 0)
  const list = field.path.startsWith('facts') ? (draft.proof?.others ?? []) : draft.others
  const other = others.find((one) => one.id === list[index - 1])
  return { ...field, label: other?.projectName }
}

/** In which of the chosen further applications a step is open to record. */
function useOpenIn(chosen: readonly string[], choices: EntryChoices) {
  const answers = useQueries({ queries: chosen.map((id) => entryChoicesQuery(id)) })
  return (step: string) =>
    chosen.flatMap((id, index) => {
      const isOpen = answers[index]?.data?.steps.some((one) => one.step === step)
      const other = choices.others.find((one) => one.id === id)
      return isOpen && other ? [{ id, projectName: other.projectName }] : []
    })
}
