'use client'

import { useInfiniteQuery } from '@tanstack/react-query'
import { Button } from '@/components/ui/button'
import { EmptyState } from '@/components/ui/empty-state'
import { useToast } from '@/components/ui/toast'
import { entriesQuery } from '@/lib/client/entries'
import type { Entry, EntryChoices, EntryPage } from '@/lib/schemas/entry'
import { channelAndDirection } from '@/lib/domain/correspondence'
import { EntryForm } from './entry-form'
import { EntryRow } from './entry-row'
import { PageDrop } from './page-drop'
import { useEntryForm } from './use-entry-form'

interface CorrespondenceProps {
  applicationId: string
  first: EntryPage
  choices: EntryChoices
  mayRecord: boolean
  /** The instant of the page, ISO. */
  nowAt: string
  startsOpen: boolean
}

/** An application's letters, calls and e-mails, and the form that records one. */
export function Correspondence(props: CorrespondenceProps) {
  const { applicationId, choices, mayRecord } = props
  const now = new Date(props.nowAt)
  const query = useInfiniteQuery(entriesQuery(applicationId, props.first))
  const entries = query.data.pages.flatMap((page) => page.items)
  const startsAt = mayRecord && props.startsOpen ? now : null
  const form = useEntryForm(applicationId, choices, startsAt)
  const toast = useToast()

  function recorded(entry: Entry) {
    form.close()
    const what = channelAndDirection(entry.channel, entry.direction)
    const proven = entry.evidenceOf.map(({ title, kind }) => title ?? kind)
    toast({
      title: `Recorded: ${what}, ${entry.subject}`,
      detail: proven.length > 0 ? `With it: ${[...new Set(proven)].join(', ')}` : undefined,
    })
  }

  return (
    <PageDrop onFiles={mayRecord ? form.dropFiles : undefined}>
      <div className="mb-4 flex flex-wrap items-baseline justify-between gap-x-6 gap-y-2">
        <h2>Correspondence</h2>
        {mayRecord && !form.draft && (
          <Button look="primary" onClick={form.openNew}>
            Record correspondence
          </Button>
        )}
      </div>
      {form.draft && (
        <EntryForm
          key={form.ids.entry}
          applicationId={applicationId}
          choices={choices}
          draft={form.draft}
          set={form.set}
          ids={form.ids}
          uploads={form.uploads}
          note={form.note}
          onRecorded={recorded}
          onCancel={form.close}
        />
      )}
      {entries.length === 0 && !form.draft && (
        <EmptyState title="Nothing is recorded yet">
          {mayRecord
            ? 'Record the first call, letter or e-mail, or drop a file on this page.'
            : 'Whoever keeps the correspondence records it here.'}
        </EmptyState>
      )}
      <ul className={entries.length > 0 ? 'border-ink border-t' : undefined}>
        {entries.map((entry) => (
          <EntryRow
            key={entry.id}
            entry={entry}
            applicationId={applicationId}
            now={now}
            onReply={mayRecord ? () => form.openReply(entry) : undefined}
            onRevise={mayRecord ? () => form.openRevision(entry) : undefined}
          />
        ))}
      </ul>
      {query.hasNextPage && (
        <Button className="mt-4" busyLabel="Reading" onClick={() => query.fetchNextPage()}>
          Show earlier entries
        </Button>
      )}
    </PageDrop>
  )
}
