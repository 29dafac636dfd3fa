import { route } from '@/lib/http/route'
import { makeDocumentAgain } from '@/lib/services/exhibit-renders'

/** Asks once more for a document that failed or never came. */
export const POST = route<undefined, { id: string }>({
  action: 'exhibit.prepare',
  run: (ctx, _input, { id }) => makeDocumentAgain(ctx, id),
})
