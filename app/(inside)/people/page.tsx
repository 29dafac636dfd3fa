import type { Metadata } from 'next'
import { InvitePerson } from '@/app/(inside)/people/_components/invite-person'
import { PeopleTable } from '@/app/(inside)/people/_components/people-table'
import { pageContext } from '@/lib/auth/page-person'
import { can } from '@/lib/domain/access'
import { listPeople } from '@/lib/services/people'

export const metadata: Metadata = { title: 'People' }

export default async function PeoplePage() {
  const ctx = await pageContext()
  const { id, roles, zone } = ctx.actor
  const { items } = await listPeople(ctx)
  const mayWrite = can(roles, 'person.write')
  return (
    <>
      <div className="mb-4 flex flex-wrap items-center justify-between gap-3">
        <h1>People</h1>
        {mayWrite && <InvitePerson zone={zone} />}
      </div>
      <PeopleTable people={items} selfId={id} zone={zone} mayWrite={mayWrite} />
      {!mayWrite && (
        <p className="cap mt-4">An administrator invites people and changes their roles.</p>
      )}
    </>
  )
}
