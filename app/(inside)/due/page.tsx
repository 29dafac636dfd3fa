import type { Metadata } from 'next'
import { DueTable } from '@/components/due/due-table'
import { NothingDue } from '@/components/due/nothing-due'
import { LinkTabs } from '@/components/ui/link-tabs'
import { pageContext } from '@/lib/auth/page-person'
import { can } from '@/lib/domain/access'
import { routes } from '@/lib/routes'
import { type DueFilter, dueFilter } from '@/lib/schemas/application'
import { listDue } from '@/lib/services/due'

export const metadata: Metadata = { title: 'Due' }

interface DuePageProps {
  searchParams: Promise<Record<string, string | string[] | undefined>>
}

export default async function DuePage({ searchParams }: DuePageProps) {
  const ctx = await pageContext()
  const filter = filterOf(await searchParams)
  const scope = filter.scope ?? 'mine'
  const due = await listDue(ctx, filter)
  const { roles } = ctx.actor
  const may = {
    acknowledge: can(roles, 'obligation.acknowledge'),
    assign: can(roles, 'obligation.assign'),
  }
  const { organization } = filter
  const addressOf = (of?: 'ours' | 'theirs') => routes.due({ scope: of, organization })
  return (
    <>
      <h1>{scope === 'theirs' ? 'Owed by utilities' : 'Owed by us'}</h1>
      <LinkTabs
        label="Whose"
        current={addressOf(scope === 'mine' ? undefined : scope)}
        tabs={[
          { href: addressOf(), label: 'Mine', count: due.counts.mine },
          { href: addressOf('ours'), label: 'Our projects', count: due.counts.ours },
          { href: addressOf('theirs'), label: 'Utilities owe', count: due.counts.theirs },
        ]}
      />
      {due.rows.length === 0 ? (
        <NothingDue scope={scope} counts={due.counts} />
      ) : (
        <DueTable due={due} scope={scope} may={may} />
      )}
    </>
  )
}

/** An address that names no known list shows one's own. */
function filterOf(params: Record<string, string | string[] | undefined>): DueFilter {
  const parsed = dueFilter.safeParse(params)
  return parsed.success ? parsed.data : {}
}
