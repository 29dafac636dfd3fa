import type { Metadata } from 'next'
import { NoticesTable } from '@/app/(inside)/notices/_components/notices-table'
import { LinkButton } from '@/components/ui/link-button'
import { LinkTabs } from '@/components/ui/link-tabs'
import { pageContext } from '@/lib/auth/page-person'
import { localOf } from '@/lib/domain/clocks/zoned'
import { routes } from '@/lib/routes'
import { noticeFilter, type NoticeFilter, type NoticePage } from '@/lib/schemas/notice'
import { listNotices } from '@/lib/services/notice-list'

export const metadata: Metadata = { title: 'Notices' }

interface Props {
  searchParams: Promise<Record<string, string | string[] | undefined>>
}

/** What was sent, what waits and what failed; the filter stands in the address. */
export default async function NoticesPage({ searchParams }: Props) {
  const ctx = await pageContext()
  // An address with a filter that is none shows everything.
  const filter = noticeFilter.safeParse(await searchParams).data ?? {}
  const page = await listNotices(ctx, filter)
  const { zone } = ctx.actor
  const { state, applicationId } = filter
  return (
    <>
      <h1>Notices</h1>
      <p className="text-ink-2 mt-1 max-w-2xl">
        E-mails about clocks, exhibits to check and invitations. While the mail server is away they
        wait; none is lost.
      </p>
      <LinkTabs
        label="Notices by state"
        tabs={tabs(page, applicationId)}
        current={routes.notices({ state, applicationId })}
      />
      {applicationId && <OneApplication page={page} state={state} applicationId={applicationId} />}
      <NoticesTable
        notices={page.items}
        state={state}
        zone={zone}
        today={localOf(ctx.now.toISOString(), zone).on}
      />
      <nav aria-label="Pages" data-screen-only className="mt-4 flex gap-2.5">
        {filter.before && (
          <LinkButton href={routes.notices({ state, applicationId })}>Newest</LinkButton>
        )}
        {page.next && (
          <LinkButton href={routes.notices({ state, applicationId, before: page.next })}>
            Older
          </LinkButton>
        )}
      </nav>
    </>
  )
}

function tabs({ counts }: NoticePage, applicationId?: string) {
  const tab = (label: string, count: number, state?: NoticeFilter['state']) => ({
    label,
    count,
    href: routes.notices({ state, applicationId }),
  })
  return [
    tab('All', counts.sent + counts.waiting + counts.failed),
    tab('Sent', counts.sent, 'sent'),
    tab('Waiting', counts.waiting, 'waiting'),
    tab('Failed', counts.failed, 'failed'),
  ]
}

interface OneApplicationProps {
  page: NoticePage
  state: NoticeFilter['state']
  applicationId: string
}

function OneApplication({ page, state, applicationId }: OneApplicationProps) {
  const name = page.items[0]?.projectName ?? 'one application'
  return (
    <p className="mb-3">
      Only {name}. <a href={routes.notices({ state })}>Show all applications</a> or{' '}
      <a href={routes.application(applicationId)}>open it</a>.
    </p>
  )
}
