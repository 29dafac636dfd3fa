'use client'

import { useQueryClient } from '@tanstack/react-query'
import { useRouter } from 'next/navigation'
import { Button } from '@/components/ui/button'
import { Menu, MenuItem } from '@/components/ui/menu'
import { useToast } from '@/components/ui/toast'
import { applicationKeys, assignObligation } from '@/lib/client/applications'
import { ProblemError } from '@/lib/client/fetcher'
import type { ItemView } from '@/lib/schemas/application'

export interface Holder {
  id: string
  name: string
  /** Roles in words. */
  role: string
}

interface AssignMenuProps {
  applicationId: string
  item: Pick<ItemView, 'step' | 'instance' | 'obligation' | 'title' | 'owner'>
  people: readonly Holder[]
}

/** Names who holds an obligation. */
export function AssignMenu({ applicationId, item, people }: AssignMenuProps) {
  const client = useQueryClient()
  const router = useRouter()
  const toast = useToast()

  async function assign(person: Holder) {
    const { step, instance, obligation, title } = item
    try {
      await assignObligation({ applicationId, step, instance, obligation, personId: person.id })
      toast({ title: `${person.name} holds: ${title}` })
      void client.invalidateQueries({ queryKey: applicationKeys.all })
      router.refresh()
    } catch (error) {
      if (!(error instanceof ProblemError)) throw error
      toast({ title: 'Nothing was changed', detail: error.message, tone: 'missed' })
    }
  }

  return (
    <Menu
      trigger={
        <Button look="quiet" aria-label={`Who holds: ${item.title}`}>
          {item.owner ? 'Hand over' : 'Name a person'}
        </Button>
      }
    >
      {people.map((person) => (
        <MenuItem
          key={person.id}
          onSelect={() => void assign(person)}
          disabled={person.id === item.owner?.id}
        >
          {person.name}
          <span className="text-sm opacity-85">{person.role}</span>
        </MenuItem>
      ))}
    </Menu>
  )
}
