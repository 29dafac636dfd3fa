import { z } from 'zod'

const nothing = z.strictObject({})
const id = z.uuid()

/** Every job by name with the shape of its payload. A job is a nudge: it carries ids, not facts. */
export const jobs = {
  /** Sends what is due in the outbox. */
  sendNotices: nothing,
  /** Looks for rungs that have become due and writes them to the outbox. */
  sweepNotices: nothing,
  /** Schedules one application anew after a shared fact or a calendar changed. */
  recomputeApplication: z.strictObject({ applicationId: id }),
  /** Makes the document of one exhibit revision. */
  renderExhibit: z.strictObject({ exhibitRevisionId: id }),
  /** Compares every kept projection with what the facts say. */
  compareProjections: nothing,
} as const

export type JobName = keyof typeof jobs
export type JobPayload<Name extends JobName> = z.infer<(typeof jobs)[Name]>

/** Which of the two worker processes takes a job, so that rendering never holds up a notice. */
export const jobProcess: Record<JobName, 'send' | 'make'> = {
  sendNotices: 'send',
  sweepNotices: 'send',
  recomputeApplication: 'make',
  renderExhibit: 'make',
  compareProjections: 'make',
}
