import { route } from '@/lib/http/route'
import { issueExhibit } from '@/lib/services/exhibits'

/** Issues a checked revision and freezes its bytes. */
export const POST = route<undefined, { id: string }>({
  action: 'exhibit.issue',
  run: (ctx, _input, { id }) => issueExhibit(ctx, id),
})
