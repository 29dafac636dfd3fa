import { z } from 'zod'
import { civilDateSchema, shortText, uuid } from '@/lib/schemas/common'

export const noticeStates = ['sent', 'waiting', 'failed'] as const

/** Which notices to list; `before` continues where a page ended. */
export const noticeFilter = z.object({
  state: z
    .enum(noticeStates, { error: 'Choose sent, waiting or failed, or leave it out.' })
    .optional(),
  applicationId: uuid.optional(),
  before: uuid.optional(),
})
export type NoticeFilter = z.infer<typeof noticeFilter>

export const noticeSchema = z
  .object({
    id: uuid,
    subject: z.string(),
    personName: z.string(),
    to: z.string(),
    applicationId: uuid.nullable(),
    projectName: z.string().nullable(),
    state: z.enum(noticeStates),
    /** Why the last attempt failed, in words. */
    reason: z.string().nullable(),
    attempts: z.number().int(),
    queuedAt: z.iso.datetime(),
    acceptedAt: z.iso.datetime().nullable(),
    /** Null once it was sent or refused for good. */
    nextAttemptAt: z.iso.datetime().nullable(),
  })
  .meta({ id: 'Notice' })
export type Notice = z.infer<typeof noticeSchema>

export const noticePageSchema = z.object({
  items: z.array(noticeSchema),
  counts: z.object({ sent: z.number(), waiting: z.number(), failed: z.number() }),
  /** Id to pass as `before` for the next page. */
  next: uuid.optional(),
})
export type NoticePage = z.infer<typeof noticePageSchema>

const answer = {
  /** Made by the client once a form: a second submit is the same acknowledgment. */
  id: uuid,
  reason: shortText('The reason', 500),
  /** No notice goes out before this day. */
  untilOn: civilDateSchema,
}

export const acknowledgementInput = z.object({
  ...answer,
  applicationId: uuid,
  step: z.string().min(1).max(80),
  instance: z.number().int().min(1).max(99).default(1),
  obligation: z.string().max(80).default(''),
  /** The due date the person saw; another one by now is a conflict. */
  dueOn: civilDateSchema,
})
export type AcknowledgementInput = z.infer<typeof acknowledgementInput>

export const linkAcknowledgement = z.object({ ...answer, secret: z.string().min(20).max(100) })
export type LinkAcknowledgement = z.infer<typeof linkAcknowledgement>

export const acknowledgementSchema = z
  .object({
    id: uuid,
    applicationId: uuid,
    step: z.string(),
    instance: z.number().int(),
    obligation: z.string(),
    dueOn: civilDateSchema,
    personId: uuid,
    reason: z.string(),
    untilOn: civilDateSchema,
    recordedAt: z.iso.datetime(),
  })
  .meta({ id: 'Acknowledgement' })
export type Acknowledgement = z.infer<typeof acknowledgementSchema>
