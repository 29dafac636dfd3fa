import Link from 'next/link'
import { LinkButton } from '@/components/ui/link-button'
import { formatDate, formatShortDate } from '@/lib/domain/format-date'
import { routes } from '@/lib/routes'
import type { Entry } from '@/lib/schemas/entry'

interface LatestEntriesProps {
  applicationId: string
  entries: readonly Entry[]
  todayOn: string
  mayRecord: boolean
}

/** The last few letters, calls and e-mails, with the reply that is owed. */
export function LatestEntries({ applicationId, entries, todayOn, mayRecord }: LatestEntriesProps) {
  return (
    <section aria-labelledby="latest">
      <div className="border-rule flex items-baseline justify-between gap-4 border-b pb-2">
        <h2 id="latest">Latest correspondence</h2>
        {entries.length > 0 && (
          <Link
            href={routes.application(applicationId, 'correspondence')}
            className="text-sm underline underline-offset-3"
          >
            All
          </Link>
        )}
      </div>
      {entries.length === 0 && <p className="text-ink-2 py-3">Nothing is recorded yet.</p>}
      <ul>
        {entries.map((entry) => (
          <li key={entry.id} className="border-rule flex gap-4 border-b py-3">
            <span className="mono w-24 shrink-0 pt-px">{formatShortDate(entry.on, todayOn)}</span>
            <span className="min-w-0">
              {channelWords(entry)}: {entry.subject}
              {replyWords(entry, todayOn) && (
                <span className="cap block">{replyWords(entry, todayOn)}</span>
              )}
            </span>
          </li>
        ))}
      </ul>
      {mayRecord && (
        <LinkButton
          className="mt-4"
          href={routes.application(applicationId, 'correspondence', { record: 1 })}
        >
          Record correspondence
        </LinkButton>
      )}
    </section>
  )
}

function channelWords({ channel, direction }: Entry): string {
  const names: Partial<Record<Entry['channel'], string>> = { email: 'E-mail' }
  const name = names[channel] ?? `${channel.slice(0, 1).toUpperCase()}${channel.slice(1)}`
  return channel === 'meeting' ? name : `${name} ${direction}`
}

function replyWords(entry: Entry, todayOn: string): string | null {
  if (entry.replySettled || entry.replyOwedBy === null) return null
  const who = entry.replyOwedBy === 'us' ? 'Reply owed' : 'They owe a reply'
  return entry.replyOwedOn ? `${who} ${formatDate(entry.replyOwedOn, todayOn)}` : who
}
