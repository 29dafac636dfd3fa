import { route } from '@/lib/http/route'
import { entryFilter, entryInput } from '@/lib/schemas/entry'
import { listEntries, recordEntry } from '@/lib/services/entries'

export const GET = route({
  action: 'entry.read',
  input: entryFilter,
  run: (ctx, filter) => listEntries(ctx, filter),
})

export const POST = route({
  action: 'entry.record',
  input: entryInput,
  status: 201,
  run: (ctx, input) => recordEntry(ctx, input),
})
