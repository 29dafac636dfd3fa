import type { Sort } from '@/components/ui/data-table'
import { routes } from '@/lib/routes'
import { type PipelineFilter, pipelineFilter } from '@/lib/schemas/application'

type AddressParams = Record<string, string | string[] | undefined>

/** The filters an address holds; a part that says nothing known counts as left out. */
export function pipelineFilterOf(params: AddressParams): PipelineFilter {
  const known = Object.entries(pipelineFilter.shape).flatMap(([key, schema]) => {
    const given = params[key]
    const parsed = schema.safeParse(Array.isArray(given) ? given[0] : given)
    return parsed.success && parsed.data ? [[key, parsed.data]] : []
  })
  return Object.fromEntries(known) as PipelineFilter
}

/** How the rows are ordered, as the table's head shows it. */
export function sortOf({ sort = 'next', order }: PipelineFilter): Sort {
  return { by: sort, order: order ?? firstOrder(sort) }
}

/** The address of the same rows in another order; a column's first order is its natural one. */
export function sortAddress(filter: PipelineFilter, wanted: Sort): string {
  const order =
    filter.sort === wanted.by || wanted.by === 'next' ? wanted.order : firstOrder(wanted.by)
  const isPlain = wanted.by === 'next' && order === 'asc'
  return routes.pipeline({
    ...filter,
    sort: isPlain ? undefined : wanted.by,
    order: order === firstOrder(wanted.by) ? undefined : order,
  })
}

function firstOrder(by: string): Sort['order'] {
  return by === 'mwAc' ? 'desc' : 'asc'
}

/** Whether the rows are fewer than the open applications. */
export function isNarrowed({ find, organization, standing }: PipelineFilter): boolean {
  return Boolean(find || organization || (standing && standing !== 'open'))
}
