import { route } from '@/lib/http/route'
import { designRevisionInput, type DesignRevisionInput } from '@/lib/schemas/design'
import { listDesignRevisions, reviseDesign } from '@/lib/services/designs'

/** A project's design revisions, the latest first. */
export const GET = route<undefined, { id: string }>({
  action: 'design.read',
  run: async (ctx, _input, { id }) => ({ items: await listDesignRevisions(ctx, id) }),
})

/** Adds a revision. */
export const POST = route<DesignRevisionInput, { id: string }>({
  action: 'design.write',
  input: designRevisionInput,
  status: 201,
  run: (ctx, input, { id }) => reviseDesign(ctx, id, input),
})
