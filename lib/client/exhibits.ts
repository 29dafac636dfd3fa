import { queryOptions } from '@tanstack/react-query'
import { call } from '@/lib/client/fetcher'
import { api } from '@/lib/routes'
import {
  exhibitListSchema,
  exhibitRevisionSchema,
  type CheckExhibitInput,
  type ExhibitList,
  type PrepareExhibitInput,
} from '@/lib/schemas/exhibit'

export const exhibitKeys = {
  ofApplication: (applicationId: string) => ['exhibits', applicationId] as const,
}

const pollMs = 1500

/** An application's exhibits from the page's first paint on; asked anew while a document is made. */
export function exhibitsQuery(applicationId: string, first?: ExhibitList) {
  return queryOptions({
    queryKey: exhibitKeys.ofApplication(applicationId),
    queryFn: ({ signal }) => call(api.exhibits(applicationId), exhibitListSchema, { signal }),
    initialData: first,
    refetchInterval: ({ state }) =>
      state.data?.items.some((one) => one.render === 'waiting' && one.state !== 'superseded')
        ? pollMs
        : false,
  })
}

export const prepareExhibit = (applicationId: string, body: PrepareExhibitInput) =>
  call(api.exhibits(applicationId), exhibitRevisionSchema, { method: 'POST', body })

export const checkExhibit = (id: string, body: CheckExhibitInput) =>
  call(api.checkExhibit(id), exhibitRevisionSchema, { method: 'POST', body })

export const issueExhibit = (id: string) =>
  call(api.issueExhibit(id), exhibitRevisionSchema, { method: 'POST' })

export const makeExhibitAgain = (id: string) =>
  call(api.makeExhibit(id), exhibitRevisionSchema, { method: 'POST' })
