import { z } from 'zod'
import { channels } from '@/lib/domain/clocks/facts'
import { recordableStepSchema } from '@/lib/schemas/application'
import { civilDateSchema, shortText, show, uuid } from '@/lib/schemas/common'
import { factInput } from '@/lib/schemas/fact'
import { fileLinkSchema, sha256Schema, uploadedFileSchema } from '@/lib/schemas/file'

export const directions = ['in', 'out'] as const
export const visibilities = ['internal', 'shareable'] as const
export const replySides = ['us', 'them'] as const

const localTime = z.string({ error: 'The hour is missing.' }).regex(/^([01]\d|2[0-3]):[0-5]\d$/, {
  error: (issue) => `Found ${show(issue.input)}; an hour HH:MM is needed.`,
})

const concerned = z.object({
  applicationId: uuid,
  step: z.string().min(1).max(80).optional(),
  instance: z.number().int().min(1).max(99).optional(),
})

const attachmentInput = z.object({
  sha256: sha256Schema,
  name: shortText('The file name', 255),
  /** Ids of the people it is open to; everybody who reads the entry if left out. */
  restrictedTo: z.array(uuid).min(1, 'Name at least one person.').max(100).optional(),
})

const provenFact = factInput.omit({ evidence: true }).extend({ applicationId: uuid })

const entryFields = z.object({
  /** Made by the client once a form: a second submit is the same entry. */
  id: uuid,
  revisesId: uuid.optional(),
  answersId: uuid.optional(),
  /** Local date and hour in `zone`; the organization's zone if left out. */
  on: civilDateSchema,
  time: localTime,
  zone: z.string().max(60).optional(),
  channel: z.enum(channels, { error: 'Choose how it went.' }),
  direction: z.enum(directions, { error: 'Choose in or out.' }),
  visibility: z.enum(visibilities).optional(),
  organizationId: uuid.optional(),
  parties: shortText('With whom', 300),
  subject: shortText('The subject', 300),
  text: z.string().trim().max(100_000, 'The text may have at most 100000 characters.').default(''),
  messageId: z.string().trim().min(1).max(500).optional(),
  replyOwedBy: z.enum(replySides).optional(),
  replyOwedOn: civilDateSchema.optional(),
  applications: z
    .array(concerned)
    .min(1, 'Choose at least one application.')
    .max(100, 'At most 100 applications.'),
  attachments: z.array(attachmentInput).max(50, 'At most 50 files.').default([]),
  /** Events that this entry proves, each recorded with it. */
  facts: z.array(provenFact).max(100, 'At most 100 events.').default([]),
})

/** What a person records as correspondence, and the events it proves. */
export const entryInput = entryFields.superRefine((entry, context) => {
  const complain = (path: (string | number)[], message: string) =>
    context.addIssue({ code: 'custom', path, message })
  if (entry.replyOwedBy && !entry.replyOwedOn)
    complain(['replyOwedOn'], 'By when the reply is owed is missing.')
  if (entry.replyOwedOn && !entry.replyOwedBy)
    complain(['replyOwedBy'], 'Who owes the reply is missing.')
  if (entry.revisesId && entry.messageId)
    complain(['messageId'], 'A revision keeps the message id of the first entry.')
  const ids = entry.applications.map((one) => one.applicationId)
  ids.forEach((id, index) => {
    if (ids.indexOf(id) !== index)
      complain(['applications', index, 'applicationId'], 'This application is named twice.')
  })
  entry.facts.forEach((fact, index) => {
    if (!ids.includes(fact.applicationId))
      complain(['facts', index, 'applicationId'], 'The entry does not concern this application.')
  })
})
export type EntryInput = z.infer<typeof entryInput>
/** As a caller may write it: what has a default may be left out. */
export type EntryInputGiven = z.input<typeof entryInput>

export const entryFilter = z.object({
  applicationId: uuid.optional(),
  organizationId: uuid.optional(),
  /** Words in subject, text or parties. */
  find: z.string().trim().max(200).optional(),
  limit: z.coerce.number().int().min(1).max(200).default(100),
  /** `next` of the answer before. */
  after: z.string().max(100).optional(),
})
export type EntryFilter = z.input<typeof entryFilter>

export const entrySchema = z.object({
  id: uuid,
  revisesId: uuid.nullable(),
  /** Earlier revisions of this entry. */
  revisions: z.number().int(),
  at: z.string(),
  zone: z.string(),
  on: civilDateSchema,
  time: z.string(),
  channel: z.enum(channels),
  direction: z.enum(directions),
  visibility: z.enum(visibilities),
  organization: z.object({ id: uuid, name: z.string() }).nullable(),
  parties: z.string(),
  subject: z.string(),
  text: z.string(),
  messageId: z.string().nullable(),
  replyOwedBy: z.enum(replySides).nullable(),
  replyOwedOn: civilDateSchema.nullable(),
  replySettled: z.boolean(),
  answersId: uuid.nullable(),
  recordedAt: z.string(),
  recordedBy: z.string().nullable(),
  applications: z.array(
    z.object({
      applicationId: uuid,
      projectName: z.string(),
      step: z.string().nullable(),
      instance: z.number().int().nullable(),
    }),
  ),
  attachments: z.array(fileLinkSchema),
  /** Attachments that are restricted and not open to the reader. */
  closedAttachments: z.number().int(),
  evidenceOf: z.array(
    z.object({
      factId: uuid,
      applicationId: uuid.nullable(),
      kind: z.string(),
      title: z.string().nullable(),
      instance: z.number().int(),
      outcome: z.string().nullable(),
    }),
  ),
})
export type Entry = z.infer<typeof entrySchema>

export const entryPageSchema = z.object({
  items: z.array(entrySchema),
  next: z.string().optional(),
})
export type EntryPage = z.infer<typeof entryPageSchema>

export const repliesFilter = z.object({ by: z.enum(replySides).default('us') })
export const repliesSchema = z.object({ items: z.array(entrySchema) })

export const emlInput = z.object({
  sha256: sha256Schema,
  name: shortText('The file name', 255),
  /** IANA zone in which date and hour are wanted. */
  zone: z.string().max(60),
})
export type EmlInput = z.infer<typeof emlInput>

/** What an e-mail file says, as fields of the form. */
export const emlDraftSchema = z.object({
  on: civilDateSchema.nullable(),
  time: z.string().nullable(),
  direction: z.enum(directions),
  parties: z.string(),
  subject: z.string(),
  text: z.string(),
  messageId: z.string().nullable(),
  /** The e-mail file itself, and the files inside it. */
  attachments: z.array(uploadedFileSchema),
  /** The entry that holds this e-mail already. */
  recordedAs: uuid.nullable(),
})
export type EmlDraft = z.infer<typeof emlDraftSchema>

/** What the form offers for one application. */
export const entryChoicesSchema = z.object({
  /** Zone of the operator, in which the application's dates are read. */
  zone: z.string(),
  organizations: z.array(
    z.object({ id: uuid, name: z.string(), zone: z.string(), contacts: z.array(z.string()) }),
  ),
  /** Further requests with the same organizations. */
  others: z.array(z.object({ id: uuid, projectName: z.string(), operator: z.string() })),
  steps: z.array(recordableStepSchema),
})
export type EntryChoices = z.infer<typeof entryChoicesSchema>

export const entryChoicesFilter = z.object({ applicationId: uuid })
