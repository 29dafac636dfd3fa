import { route } from '@/lib/http/route'
import { stringsInput } from '@/lib/schemas/plant'
import { checkStrings } from '@/lib/services/plant'

/** Longest and shortest string; nothing is stored. */
export const POST = route({
  action: 'plant.estimate',
  input: stringsInput,
  run: (ctx, input) => checkStrings(ctx, input),
})
