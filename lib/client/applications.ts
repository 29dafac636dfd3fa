import { queryOptions, useMutation, useQueryClient } from '@tanstack/react-query'
import { z } from 'zod'
import { call, type ProblemError } from '@/lib/client/fetcher'
import { api } from '@/lib/routes'
import { applicationViewSchema, type ApplicationView } from '@/lib/schemas/application'
import type { AssignmentInput } from '@/lib/schemas/assignment'
import type { FactInput } from '@/lib/schemas/fact'
import { acknowledgementSchema, type AcknowledgementInput } from '@/lib/schemas/notice'

export const applicationKeys = {
  all: ['applications'] as const,
  one: (id: string) => ['applications', id] as const,
}

/** One application as it stands now; pages hydrate it from their first paint. */
export function applicationQuery(id: string) {
  return queryOptions({
    queryKey: applicationKeys.one(id),
    queryFn: ({ signal }) => call(api.application(id), applicationViewSchema, { signal }),
  })
}

/**
 * Records a fact: the answer is the new schedule and takes the place of the old one in the cache;
 * whatever else is shown is asked anew. The fact's own id makes a second submit the same fact.
 */
export function useRecordFact(applicationId: string) {
  const client = useQueryClient()
  return useMutation<ApplicationView, ProblemError, FactInput>({
    mutationFn: (body) =>
      call(api.facts(applicationId), applicationViewSchema, { method: 'POST', body }),
    onSuccess: async (view) => {
      const queryKey = applicationKeys.one(applicationId)
      await client.cancelQueries({ queryKey })
      client.setQueryData(queryKey, view)
      const others = (key: readonly unknown[]) => key.join('/') !== queryKey.join('/')
      void client.invalidateQueries({ predicate: (query) => others(query.queryKey) })
    },
  })
}

const assignedSchema = z.object({ personId: z.string(), name: z.string() })

/** Names who holds an obligation. */
export const assignObligation = (body: AssignmentInput) =>
  call(api.assignments(), assignedSchema, { method: 'POST', body })

/** Says that a clock is in hand: no notice about it before the next date. */
export const acknowledgeClock = (body: AcknowledgementInput) =>
  call(api.acknowledgements(), acknowledgementSchema, { method: 'POST', body })
