import { z } from 'zod'
import { assigningStudies, channels, factKinds } from '@/lib/domain/clocks/facts'
import { civilDateSchema, instantSchema, shortText, uuid } from '@/lib/schemas/common'

export const termsSchema = z.object({
  requestNo: shortText('The request number', 60).optional(),
  poi: shortText('The point of interconnection', 120).optional(),
  poiVoltageKv: z
    .number('The voltage is a number of kV, such as 13.2.')
    .positive('The voltage must be above 0 kV.')
    .max(1200, 'The voltage may be at most 1,200 kV.')
    .optional(),
  requestedMw: z.number().positive('MWac must be above 0.').max(5000).optional(),
  studiedMw: z.number().positive().max(5000).optional(),
  grantedMw: z.number().positive().max(5000).optional(),
  installedMw: z.number().positive().max(5000).optional(),
  dcMw: z
    .number('MWdc is a number, such as 4.5.')
    .positive('MWdc must be above 0.')
    .max(8000, 'MWdc may be at most 8,000.')
    .optional(),
  technology: shortText('The technology', 60).optional(),
  storageMw: z.number().nonnegative().max(5000).optional(),
  storageMwh: z.number().nonnegative().max(50000).optional(),
  serviceType: shortText('The service type', 60).optional(),
  onMainline: z.boolean().optional(),
  codOn: civilDateSchema.optional(),
  assignedCostMinor: z.number().int().nonnegative().max(1e13).optional(),
  assignedBy: z.enum(assigningStudies).optional(),
  allocatedStudyCostMinor: z.number().int().nonnegative().max(1e13).optional(),
})

export const evidenceInput = z.object({
  entryId: uuid.optional(),
  fileSha256: z
    .string()
    .regex(/^[0-9a-f]{64}$/, 'A SHA-256 has 64 hexadecimal digits.')
    .optional(),
})

/** One form for every kind of fact; what a kind needs is checked against the procedure. */
export const factInput = z.object({
  id: uuid,
  kind: z.enum(factKinds),
  step: z.string().min(1).max(80).optional(),
  instance: z.number().int().min(1).max(99).optional(),
  obligation: z.string().min(1).max(80).optional(),
  sentOn: civilDateSchema.optional(),
  sentAt: instantSchema.optional(),
  receivedOn: civilDateSchema.optional(),
  receivedAt: instantSchema.optional(),
  dueOn: civilDateSchema.optional(),
  dueAt: instantSchema.optional(),
  channel: z.enum(channels).optional(),
  outcome: z.string().min(1).max(80).optional(),
  amountMinor: z.number().int().nonnegative().max(1e13).optional(),
  terms: termsSchema.optional(),
  decision: z.enum(['asked', 'granted', 'refused']).optional(),
  lengthDays: z.number().int().positive().max(3660).optional(),
  unit: z.enum(['business_day', 'calendar_day']).optional(),
  scope: z.array(z.string().min(1).max(80)).optional(),
  sinceOn: civilDateSchema.optional(),
  note: z.string().trim().max(2000).optional(),
  effect: z.string().trim().max(500).optional(),
  procedureRevisionId: uuid.optional(),
  /** The fact this one corrects or retracts. */
  replaces: uuid.optional(),
  reason: z.string().trim().max(1000).optional(),
  evidence: z.array(evidenceInput).max(20).optional(),
  /** The sequence the page was drawn from; a newer fact in between is a conflict. */
  atSeq: z.number().int().nonnegative().optional(),
})
export type FactInput = z.infer<typeof factInput>
