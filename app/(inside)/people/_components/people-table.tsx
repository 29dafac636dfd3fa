import { PersonActs } from '@/app/(inside)/people/_components/person-acts'
import { zoneName } from '@/components/people/zone-field'
import { type Column, DataTable } from '@/components/ui/data-table'
import { StateWord, type Tone } from '@/components/ui/state-word'
import { formatInstant } from '@/lib/domain/format-date'
import type { Person } from '@/lib/schemas/person'

const tones: Record<Person['standing'], Tone> = {
  active: 'plain',
  invited: 'soon',
  disabled: 'far',
}

interface PeopleTableProps {
  people: readonly Person[]
  /** Who is looking. */
  selfId: string
  /** Zone of who is looking. */
  zone: string
  mayWrite: boolean
}

/** Everybody of the company; whoever may change them finds the acts at the end of the row. */
export function PeopleTable({ people, selfId, zone, mayWrite }: PeopleTableProps) {
  const acts: Column<Person> = {
    key: 'acts',
    header: <span className="sr-only">Change</span>,
    align: 'end',
    phone: 'bare',
    cell: (person) => <PersonActs person={person} isSelf={person.id === selfId} />,
  }
  return (
    <DataTable
      caption="People of the company"
      columns={[...columns(selfId, zone), ...(mayWrite ? [acts] : [])]}
      rows={people}
      rowKey={(person) => person.id}
    />
  )
}

function columns(selfId: string, zone: string): Column<Person>[] {
  return [
    {
      key: 'name',
      header: 'Name',
      cell: (person) => (
        <>
          <strong className="block font-semibold">
            {person.name}
            {person.id === selfId && <span className="cap ml-1.5">you</span>}
          </strong>
          <span className="cap break-all">{person.email}</span>
        </>
      ),
    },
    {
      key: 'standing',
      header: 'Standing',
      phone: 'aside',
      cell: ({ standing }) => <StateWord tone={tones[standing]}>{standing}</StateWord>,
    },
    { key: 'roles', header: 'Roles', phone: 'bare', cell: ({ roles }) => roles.join(', ') },
    { key: 'zone', header: 'Time zone', cell: (person) => zoneName(person.zone) },
    {
      key: 'seen',
      header: 'Last sign-in',
      mono: true,
      cell: ({ lastSignInAt }) => (lastSignInAt ? formatInstant(lastSignInAt, zone) : 'never'),
    },
  ]
}
