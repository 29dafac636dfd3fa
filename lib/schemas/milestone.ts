import { z } from 'zod'
import { derivationLineSchema, itemSchema, standingSchema } from '@/lib/schemas/application'

export const milestoneSchema = z.object({
  step: z.string(),
  instance: z.number(),
  title: z.string(),
  party: itemSchema.shape.party,
  state: standingSchema.shape.state,
  dueOn: z.string().nullable(),
  dueAt: z.string().nullable(),
  statedDueOn: z.string().optional(),
  startBy: z.string().optional(),
  forecastOn: z.string().nullable(),
  doneOn: z.string().nullable(),
  left: z.string(),
  derivation: z.array(derivationLineSchema),
})
export const milestonesSchema = z.object({ items: z.array(milestoneSchema) })
export type Milestones = z.infer<typeof milestonesSchema>
