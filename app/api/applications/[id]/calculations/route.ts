import { route } from '@/lib/http/route'
import { calculationInput, type CalculationInput } from '@/lib/schemas/design'
import { freezeCalculation, listCalculations } from '@/lib/services/calculations'

/** An application's frozen calculations, the latest first. */
export const GET = route<undefined, { id: string }>({
  action: 'calculation.read',
  run: async (ctx, _input, { id }) => ({ items: await listCalculations(ctx, id) }),
})

/** Runs the chain on a design revision and freezes the figures. */
export const POST = route<CalculationInput, { id: string }>({
  action: 'calculation.freeze',
  input: calculationInput,
  status: 201,
  run: (ctx, input, { id }) => freezeCalculation(ctx, id, input),
})
