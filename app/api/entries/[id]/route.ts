import { route } from '@/lib/http/route'
import { getEntry } from '@/lib/services/entries'

export const GET = route<undefined, { id: string }>({
  action: 'entry.read',
  run: (ctx, _input, { id }) => getEntry(ctx, id),
})
