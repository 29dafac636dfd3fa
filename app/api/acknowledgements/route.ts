import { route } from '@/lib/http/route'
import { acknowledgementInput } from '@/lib/schemas/notice'
import { acknowledge } from '@/lib/services/acknowledgements'

export const POST = route({
  action: 'obligation.acknowledge',
  input: acknowledgementInput,
  status: 201,
  run: (ctx, input) => acknowledge(ctx, input),
})
