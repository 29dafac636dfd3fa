import { route } from '@/lib/http/route'
import { acknowledgementInput } from '@/lib/schemas/notice'
import { acknowledge } from '@/lib/services/acknowledgements'

export const POST = route({
  input: acknowledgementInput,
  status: 201,
  run: (ctx, input) => acknowledge(ctx, input),
})
