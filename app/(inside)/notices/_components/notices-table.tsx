import Link from 'next/link'
import { type Column, DataTable } from '@/components/ui/data-table'
import { EmptyState } from '@/components/ui/empty-state'
import { StateWord } from '@/components/ui/state-word'
import { formatInstant } from '@/lib/domain/format-date'
import { routes } from '@/lib/routes'
import type { Notice, NoticeFilter } from '@/lib/schemas/notice'

interface NoticesTableProps {
  notices: readonly Notice[]
  state: NoticeFilter['state']
  /** Zone of who is looking. */
  zone: string
  today: string
}

/** One row a notice: what, to whom, how it stands in words. */
export function NoticesTable({ notices, state, zone, today }: NoticesTableProps) {
  return (
    <DataTable
      caption="Notices, newest first"
      columns={columns(zone, today)}
      rows={notices}
      rowKey={(notice) => notice.id}
      empty={<NoNotices state={state} />}
    />
  )
}

function columns(zone: string, today: string): Column<Notice>[] {
  const when = (at: string) => formatInstant(at, zone, today)
  return [
    {
      key: 'subject',
      header: 'Notice',
      className: 'align-top',
      cell: (notice) => (
        <>
          <span className="block font-medium">{notice.subject}</span>
          {notice.applicationId && notice.projectName && (
            <Link className="cap underline" href={routes.application(notice.applicationId)}>
              {notice.projectName}
            </Link>
          )}
        </>
      ),
    },
    {
      key: 'to',
      header: 'To',
      phone: 'bare',
      className: 'align-top',
      cell: (notice) => (
        <>
          <span className="block">{notice.personName}</span>
          <span className="cap break-all">{notice.to}</span>
        </>
      ),
    },
    {
      key: 'queued',
      header: 'Queued',
      mono: true,
      className: 'align-top whitespace-nowrap',
      cell: (notice) => when(notice.queuedAt),
    },
    {
      key: 'state',
      header: 'How it stands',
      phone: 'bare',
      className: 'align-top max-w-md',
      cell: (notice) => <HowItStands notice={notice} when={when} />,
    },
  ]
}

interface HowItStandsProps {
  notice: Notice
  when: (at: string) => string
}

function HowItStands({ notice, when }: HowItStandsProps) {
  const { state, reason, attempts, acceptedAt, nextAttemptAt } = notice
  if (state === 'sent' && acceptedAt)
    return (
      <>
        <StateWord tone="done">sent</StateWord>
        <span className="mono ml-2">{when(acceptedAt)}</span>
      </>
    )
  if (state === 'waiting') return <StateWord tone="plain">waiting to be sent</StateWord>
  const tries = attempts === 1 ? 'failed once' : `failed ${attempts} times`
  return (
    <>
      <StateWord tone={nextAttemptAt ? 'soon' : 'missed'}>
        {nextAttemptAt ? tries : 'given up'}
      </StateWord>
      {nextAttemptAt && (
        <>
          , next try <span className="mono">{when(nextAttemptAt)}</span>
        </>
      )}
      <span className="text-ink-2 block text-sm break-words">{reason}</span>
      {!nextAttemptAt && (
        <span className="text-ink-2 block text-sm">
          Tell the person in another way; an administrator corrects the address under People.
        </span>
      )}
    </>
  )
}

const emptyWords = {
  all: 'No notice has been queued yet',
  sent: 'No notice was sent yet',
  waiting: 'No notice is waiting',
  failed: 'No notice failed',
}

function NoNotices({ state }: { state: NoticeFilter['state'] }) {
  return (
    <EmptyState title={emptyWords[state ?? 'all']}>
      Notices about clocks are queued as their dates come near. Due shows what is owed now:{' '}
      <Link className="underline" href={routes.due()}>
        open Due
      </Link>
      .
    </EmptyState>
  )
}
