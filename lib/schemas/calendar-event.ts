import { z } from 'zod'
import { itemSchema, standingSchema } from '@/lib/schemas/application'
import { civilDateSchema, uuid } from '@/lib/schemas/common'

export const calendarSides = ['ours', 'theirs'] as const

export const calendarFilter = z.object({
  from: civilDateSchema,
  to: civilDateSchema,
  /** Ids of organizations, comma between; all where it is left out. */
  organizations: z.string().max(2000).optional(),
  side: z.enum(calendarSides).optional(),
  project: uuid.optional(),
})
export type CalendarFilter = z.infer<typeof calendarFilter>

export const calendarEventSchema = z.object({
  key: z.string(),
  applicationId: z.string(),
  project: z.string(),
  requestNo: z.string().nullable(),
  organization: z.string(),
  step: z.string(),
  instance: z.number(),
  title: z.string(),
  party: itemSchema.shape.party,
  kind: itemSchema.shape.kind,
  /** due: a clock; start_by: begin its preparation; open: a missed one, still open today. */
  entry: z.enum(['due', 'start_by', 'open']),
  on: civilDateSchema,
  dueAt: z.string().nullable(),
  zone: z.string(),
  /** Whether the organization has a closing hour that ends this clock. */
  hasHour: z.boolean(),
  provisional: z.boolean(),
  say: z.string(),
  standing: standingSchema,
})
export type CalendarEvent = z.infer<typeof calendarEventSchema>

export const closedDaySchema = z.object({
  on: civilDateSchema,
  /** Every shown organization is closed. */
  all: z.boolean(),
  /** Who is closed, by short name; empty on an ordinary weekend. */
  closed: z.array(z.string()),
  /** The day's name where it has one that all give it. */
  name: z.string().nullable(),
})
export type ClosedDay = z.infer<typeof closedDaySchema>

export const calendarSchema = z.object({
  events: z.array(calendarEventSchema),
  closedDays: z.array(closedDaySchema),
  organizations: z.array(z.object({ id: z.string(), name: z.string() })),
  todayOn: civilDateSchema,
})
export type CalendarAnswer = z.infer<typeof calendarSchema>

export const calendarAddressSchema = z.object({ made: z.boolean(), address: z.string().nullable() })
export const newCalendarAddressSchema = z.object({ made: z.literal(true), address: z.string() })
