import { route } from '@/lib/http/route'
import { estimateInput } from '@/lib/schemas/plant'
import { estimatePlant } from '@/lib/services/plant'

/** A year of a plant; nothing is stored. */
export const POST = route({
  action: 'plant.estimate',
  input: estimateInput,
  run: (ctx, input) => estimatePlant(ctx, input),
})
