import { route } from '@/lib/http/route'
import { getExhibitRevision } from '@/lib/services/exhibits'

/** One revision as it stands now. */
export const GET = route<undefined, { id: string }>({
  action: 'exhibit.read',
  run: (ctx, _input, { id }) => getExhibitRevision(ctx, id),
})
