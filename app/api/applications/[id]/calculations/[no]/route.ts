import { route } from '@/lib/http/route'
import { getCalculation } from '@/lib/services/calculations'

/** One frozen calculation by its number, with inputs and result. */
export const GET = route<undefined, { id: string; no: string }>({
  action: 'calculation.read',
  run: (ctx, _input, { id, no }) => getCalculation(ctx, id, Number(no)),
})
