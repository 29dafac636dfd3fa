import { route } from '@/lib/http/route'
import { prepareExhibitInput, type PrepareExhibitInput } from '@/lib/schemas/exhibit'
import { listExhibits, prepareExhibit } from '@/lib/services/exhibits'

/** Every revision of an application's exhibits, the latest first. */
export const GET = route<undefined, { id: string }>({
  action: 'exhibit.read',
  run: async (ctx, _input, { id }) => ({ items: await listExhibits(ctx, id) }),
})

/** Prepares the next revision from a frozen calculation. */
export const POST = route<PrepareExhibitInput, { id: string }>({
  action: 'exhibit.prepare',
  input: prepareExhibitInput,
  status: 201,
  run: (ctx, input, { id }) => prepareExhibit(ctx, id, input),
})
