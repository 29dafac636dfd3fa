import { route } from '@/lib/http/route'
import { downloadExhibit } from '@/lib/services/exhibits'

/** The DOCX of a revision, as an attachment. */
export const GET = route<undefined, { id: string }>({
  action: 'exhibit.read',
  run: (ctx, _input, { id }) => downloadExhibit(ctx, id),
})
