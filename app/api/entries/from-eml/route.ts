import { route } from '@/lib/http/route'
import { emlInput } from '@/lib/schemas/entry'
import { readEml } from '@/lib/services/eml'

export const POST = route({
  action: 'entry.record',
  input: emlInput,
  run: (ctx, input) => readEml(ctx, input),
})
