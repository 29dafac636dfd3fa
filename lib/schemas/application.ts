import { z } from 'zod'
import { channels, factKinds } from '@/lib/domain/clocks/facts'
import { statuses } from '@/lib/domain/clocks/schedule-types'
import { civilDateSchema, shortText, uuid } from '@/lib/schemas/common'
import { termsSchema } from '@/lib/schemas/fact'

const date = z.string().nullable()

export const standingSchema = z.object({
  state: z.enum([
    'missed',
    'theirs_late',
    'presumed',
    'running',
    'theirs_running',
    'undated',
    'not_begun',
    'stopped',
    'done',
    'done_late',
    'waived',
    'closed',
    'waiting',
    'not_needed',
  ]),
  tone: z.enum(['missed', 'soon', 'far', 'theirs', 'done', 'none']),
  left: z.string(),
  businessDays: z.number().nullable(),
  closesInMinutes: z.number().nullable(),
})

export const derivationLineSchema = z.object({
  kind: z.string(),
  text: z.string(),
  on: z.string().optional(),
})

/** One obligation as it stands at the moment of reading. */
export const itemSchema = z.object({
  step: z.string(),
  instance: z.number(),
  obligation: z.string(),
  title: z.string(),
  short: z.string().nullable(),
  stage: z.string(),
  party: z.enum([
    'applicant',
    'operator',
    'wires_owner',
    'affected_system',
    'load_utility',
    'regulator',
    'both',
    'other',
  ]),
  kind: z.enum(['normal', 'window', 'gate', 'anytime', 'recurring']),
  onLine: z.boolean(),
  ownerRole: z.enum(['developer', 'engineer', 'liaison', 'executive', 'administrator']).nullable(),
  consequence: z.object({ effect: z.string(), say: z.string(), first: z.string().optional() }),
  status: z.enum(statuses),
  provisional: z.boolean(),
  outcome: z.string().nullable(),
  startOn: date,
  dueOn: date,
  dueAt: date,
  zone: z.string(),
  statedDueOn: date,
  startBy: date,
  doneOn: date,
  doneLate: z.boolean().nullable(),
  hourRecorded: z.boolean().nullable(),
  moneyTargetMinor: z.number().nullable(),
  moneyHeldMinor: z.number().nullable(),
  derivation: z.array(derivationLineSchema),
  source: z.object({ document: z.string(), section: z.string(), basis: z.string() }),
  standing: standingSchema,
  owner: z.object({ id: z.string(), name: z.string() }).nullable(),
  acknowledged: z
    .object({ by: z.string(), reason: z.string(), untilOn: z.string(), at: z.string() })
    .nullable(),
})
export type ItemView = z.infer<typeof itemSchema>

const organizationBrief = z.object({
  id: z.string(),
  name: z.string(),
  shortName: z.string(),
  zone: z.string(),
  closesAt: z.string().nullable(),
})

export const factViewSchema = z.object({
  id: z.string(),
  seq: z.number(),
  kind: z.enum(factKinds),
  step: z.string().nullable(),
  stepTitle: z.string().nullable(),
  instance: z.number(),
  obligation: z.string().nullable(),
  sentOn: date,
  sentAt: date,
  receivedOn: date,
  receivedAt: date,
  dueOn: date,
  channel: z.enum(channels).nullable(),
  outcome: z.string().nullable(),
  outcomeTitle: z.string().nullable(),
  amountMinor: z.number().nullable(),
  body: z.record(z.string(), z.unknown()),
  replacesId: z.string().nullable(),
  replacedById: z.string().nullable(),
  reason: z.string().nullable(),
  recordedAt: z.string(),
  recordedBy: z.string().nullable(),
  evidence: z.array(
    z.object({
      entryId: z.string().nullable(),
      entrySubject: z.string().nullable(),
      fileSha256: z.string().nullable(),
    }),
  ),
})
export type FactView = z.infer<typeof factViewSchema>

export const recordableStepSchema = z.object({
  step: z.string(),
  instance: z.number(),
  title: z.string(),
  stage: z.string(),
  party: itemSchema.shape.party,
  status: z.enum(statuses),
  evidence: z.string().nullable(),
  outcomes: z.array(z.object({ key: z.string(), title: z.string() })),
  obligations: z.array(z.object({ key: z.string(), title: z.string(), what: z.string() })),
})
export type RecordableStep = z.infer<typeof recordableStepSchema>

export const applicationViewSchema = z.object({
  id: z.string(),
  seq: z.number(),
  project: z.object({ id: z.string(), name: z.string(), town: z.string().nullable() }),
  entity: z.object({ id: z.string(), name: z.string() }).nullable(),
  operator: organizationBrief,
  /** The operator's desk that runs this request. */
  desk: z.string().nullable(),
  others: z.array(organizationBrief.extend({ role: z.string() })),
  procedure: z.object({
    key: z.string(),
    title: z.string(),
    revisionId: z.string(),
    no: z.number(),
    stages: z.array(z.string()),
  }),
  terms: termsSchema,
  standing: z.enum(['preparing', 'filed', 'in_operation', 'withdrawn']),
  stage: z.string(),
  /** The civil date of now in the operator's zone. */
  todayOn: z.string(),
  items: z.array(itemSchema),
  recordable: z.array(recordableStepSchema),
  /** Steps that are closed: what a correction of their facts chooses from. */
  settled: z.array(recordableStepSchema),
  facts: z.array(factViewSchema),
  stranded: z.array(z.object({ factId: z.string(), reason: z.string() })),
})
export type ApplicationView = z.infer<typeof applicationViewSchema>

/** What the step line needs of an item. */
export const lineItemSchema = itemSchema.pick({
  step: true,
  instance: true,
  obligation: true,
  title: true,
  short: true,
  party: true,
  kind: true,
  onLine: true,
  status: true,
  startOn: true,
  dueOn: true,
  doneOn: true,
  doneLate: true,
  provisional: true,
  standing: true,
})
export type LineItem = z.infer<typeof lineItemSchema>

export const pipelineRowSchema = z.object({
  id: z.string(),
  project: z.string(),
  town: z.string().nullable(),
  operator: z.string(),
  requestNo: z.string().nullable(),
  poi: z.string().nullable(),
  mwAc: z.number().nullable(),
  dcMw: z.number().nullable(),
  standing: applicationViewSchema.shape.standing,
  stage: z.string(),
  todayOn: z.string(),
  line: z.array(lineItemSchema),
  next: z
    .object({
      step: z.string(),
      instance: z.number(),
      title: z.string(),
      dueOn: date,
      dueAt: date,
      statedDueOn: date,
      zone: z.string(),
      closesAt: date,
      standing: standingSchema,
      party: itemSchema.shape.party,
    })
    .nullable(),
})
export type PipelineRow = z.infer<typeof pipelineRowSchema>

export const pipelineSchema = z.object({
  items: z.array(pipelineRowSchema),
  next: z.string().optional(),
  /** Whoever operates for one of the applications, for the filter; by name. */
  organizations: z.array(z.object({ id: z.string(), name: z.string() })),
  totals: z.object({
    open: z.number(),
    filed: z.number(),
    mwAc: z.number(),
    owedInTenDays: z.number(),
    missed: z.number(),
  }),
})
export type Pipeline = z.infer<typeof pipelineSchema>

export const pipelineFilter = z.object({
  standing: z.enum(['open', 'preparing', 'filed', 'in_operation', 'withdrawn', 'all']).optional(),
  organization: uuid.optional(),
  find: z.string().trim().max(80).optional(),
  sort: z.enum(['next', 'project', 'mwAc', 'operator']).optional(),
  /** Turns the order around; MWac begins with the largest unless told. */
  order: z.enum(['asc', 'desc']).optional(),
})
export type PipelineFilter = z.infer<typeof pipelineFilter>

/** A project that is not known yet. */
export const newProjectInput = z.object({
  name: shortText('The project name', 120),
  town: shortText('The town', 120).optional(),
  latitude: z
    .number('The latitude is a number of degrees, such as 37.25.')
    .min(-90, 'A latitude lies between -90 and 90.')
    .max(90, 'A latitude lies between -90 and 90.')
    .optional(),
  longitude: z
    .number('The longitude is a number of degrees, such as -103.5.')
    .min(-180, 'A longitude lies between -180 and 180.')
    .max(180, 'A longitude lies between -180 and 180.')
    .optional(),
})

export const newApplicationInput = z.object({
  id: uuid,
  project: z.union([z.object({ id: uuid }), newProjectInput], {
    error:
      'Give the id of a project, or the name of a new one with its town, latitude (-90 to 90) and longitude (-180 to 180) as far as known.',
  }),
  entityName: shortText('The project company', 160),
  operatorId: uuid,
  desk: shortText('The desk', 80).optional(),
  procedureRevisionId: uuid,
  terms: termsSchema.extend({
    requestedMw: z
      .number({ error: 'MWac at the POI is missing.' })
      .positive('MWac at the POI must be above 0.')
      .max(5000, 'MWac at the POI may be at most 5,000.'),
    poi: shortText('The point of interconnection', 120),
  }),
  openedOn: civilDateSchema.optional(),
})
export type NewApplicationInput = z.infer<typeof newApplicationInput>

/** What a new application chooses from. */
export const applicationChoicesSchema = z.object({
  organizations: z.array(z.object({ id: z.string(), name: z.string(), zone: z.string() })),
  procedures: z.array(
    z.object({
      revisionId: z.string(),
      title: z.string(),
      no: z.number(),
      /** Null for one of the shipped library, which any organization may follow. */
      organizationId: z.string().nullable(),
      key: z.string(),
      steps: z.number(),
    }),
  ),
  projects: z.array(z.object({ id: z.string(), name: z.string(), town: z.string().nullable() })),
  entities: z.array(z.object({ id: z.string(), name: z.string() })),
})
export type ApplicationChoices = z.infer<typeof applicationChoicesSchema>

export const dueScopes = ['mine', 'ours', 'theirs'] as const
export const dueFilter = z.object({
  scope: z.enum(dueScopes).optional(),
  organization: uuid.optional(),
})
export type DueFilter = z.infer<typeof dueFilter>

export const dueRowSchema = itemSchema.extend({
  applicationId: z.string(),
  project: z.string(),
  requestNo: z.string().nullable(),
  operator: z.string(),
  closesAt: date,
  /** due: the clock itself; start_by: the day its preparation must begin. */
  rowKind: z.enum(['due', 'start_by']),
  /** The date the row is sorted and grouped by. */
  on: z.string(),
  group: z.enum(['missed', 'this_week', 'next_week', 'later']),
})
export type DueRow = z.infer<typeof dueRowSchema>

export const dueSchema = z.object({
  rows: z.array(dueRowSchema),
  counts: z.object({ mine: z.number(), ours: z.number(), theirs: z.number() }),
  todayOn: z.string(),
})
export type Due = z.infer<typeof dueSchema>
