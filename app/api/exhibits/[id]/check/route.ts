import { route } from '@/lib/http/route'
import { checkExhibitInput, type CheckExhibitInput } from '@/lib/schemas/exhibit'
import { checkExhibit } from '@/lib/services/exhibits'

/** Signs a draft as checked; refused to its preparer. */
export const POST = route<CheckExhibitInput, { id: string }>({
  action: 'exhibit.check',
  input: checkExhibitInput,
  run: (ctx, input, { id }) => checkExhibit(ctx, id, input),
})
