import { route } from '@/lib/http/route'
import { factInput, type FactInput } from '@/lib/schemas/fact'
import { recordFact } from '@/lib/services/facts'

export const POST = route<FactInput, { id: string }>({
  action: 'fact.record',
  input: factInput,
  status: 201,
  run: (ctx, input, { id }) => recordFact(ctx, id, input),
})
