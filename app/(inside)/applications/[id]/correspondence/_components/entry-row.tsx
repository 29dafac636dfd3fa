'use client'

import { useState } from 'react'
import { Button } from '@/components/ui/button'
import { formatBytes } from '@/components/ui/file-drop'
import { StateWord, type Tone } from '@/components/ui/state-word'
import { channelAndDirection } from '@/lib/domain/correspondence'
import { civilDateAt, formatDate, formatHour, formatShortDate } from '@/lib/domain/format-date'
import { api } from '@/lib/routes'
import type { Entry } from '@/lib/schemas/entry'

interface EntryRowProps {
  entry: Entry
  applicationId: string
  now: Date
  /** Left out where the reader may not record. */
  onReply?: () => void
  onRevise?: () => void
}

/** One letter, call or e-mail: when, which way, with whom, what, and what it proves. */
export function EntryRow({ entry, applicationId, now, onReply, onRevise }: EntryRowProps) {
  const today = civilDateAt(now, entry.zone)
  const others = entry.applications.filter((one) => one.applicationId !== applicationId)
  return (
    <li
      id={`entry-${entry.id}`}
      className="border-rule target:bg-sheet grid scroll-mt-6 gap-x-6 gap-y-1 border-b py-3.5 sm:grid-cols-[6.5rem_minmax(0,1fr)_auto]"
    >
      <p className="mono" title={`${formatDate(entry.on)}, ${formatHour(entry.at, entry.zone)}`}>
        {formatShortDate(entry.on, today)}
        <span className="text-ink-2 block text-sm max-sm:ml-2 max-sm:inline">
          {formatHour(entry.at, entry.zone)}
        </span>
      </p>
      <div className="min-w-0">
        <h3 className="break-words">
          {channelAndDirection(entry.channel, entry.direction)}: {entry.subject}
        </h3>
        <p className="text-ink-2 text-sm">{notesOf(entry).join(' · ')}</p>
        <EntryText text={entry.text} />
        <Attachments entry={entry} />
        {entry.evidenceOf.length > 0 && (
          <p className="mt-1 text-sm">
            <StateWord tone="done">Proves: {provenBy(entry)}</StateWord>
          </p>
        )}
        {others.length > 0 && (
          <p className="text-ink-2 mt-1 text-sm">
            Also concerns {others.map((one) => one.projectName).join(', ')}
          </p>
        )}
        {onReply && onRevise && (
          <p data-screen-only className="mt-1 -ml-1.5 flex gap-3">
            <Button look="quiet" onClick={onReply}>
              Record the answer
            </Button>
            <Button look="quiet" onClick={onRevise}>
              Revise
            </Button>
          </p>
        )}
      </div>
      <p className="text-sm sm:text-right">
        <ReplyOwed entry={entry} today={today} />
      </p>
    </li>
  )
}

function notesOf(entry: Entry): string[] {
  const { parties, organization, visibility, recordedBy, revisions } = entry
  const isNamed = !organization || parties.includes(organization.name)
  return [
    parties,
    ...(isNamed ? [] : [organization.name]),
    ...(visibility === 'internal' ? ['internal'] : []),
    ...(recordedBy ? [`recorded by ${recordedBy}`] : []),
    ...(revisions > 0 ? [`revision ${revisions + 1}`] : []),
  ]
}

function provenBy(entry: Entry): string {
  const words = entry.evidenceOf.map(({ title, kind, instance }) => {
    const round = instance > 1 ? `, round ${instance}` : ''
    return `${title ?? kind}${round}`
  })
  return [...new Set(words)].join('; ')
}

const shortCharacters = 280

function EntryText({ text }: { text: string }) {
  const [isWhole, setWhole] = useState(false)
  if (!text) return null
  const isLong = text.length > shortCharacters || text.split('\n').length > 3
  return (
    <div className="mt-1 max-w-prose [&>button]:-ml-1.5">
      <p className={`break-words whitespace-pre-line ${isLong && !isWhole ? 'line-clamp-3' : ''}`}>
        {text}
      </p>
      {isLong && (
        <Button look="quiet" aria-expanded={isWhole} onClick={() => setWhole(!isWhole)}>
          {isWhole ? 'Show the first lines' : 'Show all of it'}
        </Button>
      )}
    </div>
  )
}

function Attachments({ entry }: { entry: Entry }) {
  const { attachments, closedAttachments } = entry
  if (attachments.length === 0 && closedAttachments === 0) return null
  return (
    <ul className="mt-1 grid gap-0.5 text-sm" aria-label="Attachments">
      {attachments.map(({ id, name, size }) => (
        <li key={id}>
          <a href={api.file(id)} download className="break-all underline">
            {name}
          </a>{' '}
          <span className="cap">{formatBytes(size)}</span>
        </li>
      ))}
      {closedAttachments > 0 && (
        <li className="text-ink-2">
          {closedAttachments === 1
            ? 'One restricted file'
            : `${closedAttachments} restricted files`}
          , not open to you
        </li>
      )}
    </ul>
  )
}

function ReplyOwed({ entry, today }: { entry: Entry; today: string }) {
  const { replyOwedBy, replyOwedOn, replySettled } = entry
  if (!replyOwedBy || !replyOwedOn) return null
  if (replySettled) return <StateWord tone="done">answered</StateWord>
  const isLate = replyOwedOn < today
  const tone: Tone = replyOwedBy === 'them' ? 'theirs' : isLate ? 'missed' : 'soon'
  const who = replyOwedBy === 'us' ? 'Reply owed by us' : 'Reply owed by them'
  return (
    <StateWord tone={tone}>
      {who} {formatDate(replyOwedOn, today)}
      {isLate && ', over'}
    </StateWord>
  )
}
