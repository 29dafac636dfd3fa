import { route } from '@/lib/http/route'
import { repliesFilter } from '@/lib/schemas/entry'
import { listRepliesOwed } from '@/lib/services/entries'

export const GET = route({
  action: 'entry.read',
  input: repliesFilter,
  run: async (ctx, { by }) => ({ items: await listRepliesOwed(ctx, by) }),
})
