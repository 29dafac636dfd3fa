import { route } from '@/lib/http/route'
import { entryChoicesFilter } from '@/lib/schemas/entry'
import { getEntryChoices } from '@/lib/services/entry-choices'

export const GET = route({
  action: 'entry.read',
  input: entryChoicesFilter,
  run: (ctx, { applicationId }) => getEntryChoices(ctx, applicationId),
})
