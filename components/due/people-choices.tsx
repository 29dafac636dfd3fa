'use client'

import { useQuery } from '@tanstack/react-query'
import { MenuChoices } from '@/components/ui/menu'
import { activePeopleQuery } from '@/lib/client/due'

interface PeopleChoicesProps {
  /** Who holds it now, '' for nobody. */
  ownerId: string
  onChoose: (personId: string) => void
}

/** The people in a menu; asked for when the menu opens, then kept. */
export function PeopleChoices({ ownerId, onChoose }: PeopleChoicesProps) {
  const { data, error } = useQuery(activePeopleQuery())
  if (error) {
    return (
      <p className="text-late px-3.5 py-2 text-sm">The people could not be read. Open again.</p>
    )
  }
  if (!data) return <p className="text-ink-2 px-3.5 py-2 text-sm">Reading the people</p>
  return (
    <MenuChoices
      label="Assign to"
      value={ownerId}
      options={data.map(({ id, name, roles }) => ({
        value: id,
        label: `${name}, ${roles.join(', ')}`,
      }))}
      onChange={onChoose}
    />
  )
}
