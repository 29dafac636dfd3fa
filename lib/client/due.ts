import { queryOptions } from '@tanstack/react-query'
import { z } from 'zod'
import { call } from '@/lib/client/fetcher'
import { api } from '@/lib/routes'
import type { AssignmentInput } from '@/lib/schemas/assignment'
import { acknowledgementSchema, type AcknowledgementInput } from '@/lib/schemas/notice'
import { personListSchema } from '@/lib/schemas/person'

const assignedSchema = z.object({ personId: z.string(), name: z.string() })

export const acknowledgeClock = (body: AcknowledgementInput) =>
  call(api.acknowledgements(), acknowledgementSchema, { method: 'POST', body })

export const assignClock = (body: AssignmentInput) =>
  call(api.assignments(), assignedSchema, { method: 'POST', body })

/** Everybody who can hold an obligation: the active people, by name. */
export function activePeopleQuery() {
  return queryOptions({
    queryKey: ['people', 'active'],
    queryFn: async ({ signal }) => {
      const { items } = await call(api.people(), personListSchema, { signal })
      return items
        .filter((person) => person.standing === 'active')
        .sort((a, b) => a.name.localeCompare(b.name))
    },
  })
}
