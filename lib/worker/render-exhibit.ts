import type { Task } from 'graphile-worker'
import { renderExhibitC } from '@/lib/documents/exhibit-c'
import { jobs } from '@/lib/queue/jobs'
import type { Context } from '@/lib/services/context'
import {
  failRender,
  findRenderInput,
  settleRender,
  type RenderInput,
} from '@/lib/services/exhibit-renders'
import { log } from '@/lib/services/log'
import { jobContext } from '@/lib/worker/context'

/**
 * Makes the document of one exhibit revision and keeps it. A worker killed half-way leaves nothing
 * behind; the next one makes the same bytes.
 */
export const renderExhibit: Task = async (payload, { job }) => {
  const { exhibitRevisionId } = jobs.renderExhibit.parse(payload)
  const ctx = jobContext('renderExhibit')
  await makeDocument(ctx, exhibitRevisionId, { isLast: job.attempts >= job.max_attempts })
}

/**
 * Makes and keeps a revision's document where one is waited for.
 * @throws what went wrong; on the last attempt the revision says so first
 */
export async function makeDocument(
  ctx: Context,
  id: string,
  { isLast = true }: { isLast?: boolean } = {},
): Promise<void> {
  const input = await findRenderInput(ctx, id)
  if (!input) return
  const { ticket } = input
  try {
    await settleRender(ctx, id, { ticket, bytes: await documentOf(input) })
  } catch (error) {
    log.error({ error, exhibitRevisionId: id }, 'no document could be made')
    const reason = error instanceof Error ? error.message : 'the cause is in the log'
    if (isLast) await failRender(ctx, id, { ticket, reason })
    throw error
  }
}

function documentOf({ source, previous }: RenderInput): Promise<Uint8Array> {
  return renderExhibitC(source, previous)
}
