import type { TaskList } from 'graphile-worker'
import { jobs } from '@/lib/queue/jobs'
import { recomputeApplication } from '@/lib/services/facts'
import { compareProjections } from '@/lib/services/projection-check'
import { jobContext } from '@/lib/worker/context'
import { renderExhibit } from '@/lib/worker/render-exhibit'

/**
 * What the making worker can do, by job name (lib/queue/jobs.ts). A task parses its payload with
 * the job's schema and calls one service with `jobContext(name)`.
 */
export const makeTasks: TaskList = {
  renderExhibit,
  async compareProjections(payload) {
    jobs.compareProjections.parse(payload)
    await compareProjections(jobContext('compareProjections'))
  },
  async recomputeApplication(payload) {
    const { applicationId } = jobs.recomputeApplication.parse(payload)
    await recomputeApplication(jobContext('recomputeApplication'), applicationId)
  },
}
