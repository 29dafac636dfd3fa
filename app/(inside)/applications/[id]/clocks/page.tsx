import type { Metadata } from 'next'
import { ClocksTable } from '@/app/(inside)/applications/[id]/clocks/_components/clocks-table'
import { readPageApplication } from '@/app/(inside)/applications/[id]/_read'
import { zoneWords } from '@/components/applications/clock-words'
import { can } from '@/lib/domain/access'
import { listPeople } from '@/lib/services/people'

export const metadata: Metadata = { title: 'Clocks' }

interface PageProps {
  params: Promise<{ id: string }>
  searchParams: Promise<{ open?: string; all?: string }>
}

/** Every step of the procedure with its clock; `?open=` shows how one was counted. */
export default async function ClocksPage({ params, searchParams }: PageProps) {
  const { ctx, view, roles } = await readPageApplication((await params).id)
  const { open, all } = await searchParams
  const may = {
    record: can(roles, 'fact.record'),
    correct: can(roles, 'fact.correct'),
    assign: can(roles, 'obligation.assign'),
    acknowledge: can(roles, 'obligation.acknowledge'),
  }
  const people = may.assign ? (await listPeople(ctx)).items : []
  const { title, no } = view.procedure
  return (
    <>
      <ClocksTable
        view={view}
        may={may}
        people={people
          .filter((person) => person.standing === 'active')
          .map(({ id, name, roles: held }) => ({ id, name, role: held.join(', ') }))}
        open={open}
        showsAll={all === '1'}
      />
      <p className="cap mt-3">
        {title}, revision {no}. Times are {zoneWords(view.operator.zone)}. A count is only as good
        as the dates recorded and the procedure as written here: the utility’s tariff and letters
        come first.
      </p>
    </>
  )
}
