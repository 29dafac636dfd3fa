import { z } from 'zod'
import { roles } from '@/lib/domain/access'
import { uuid } from '@/lib/schemas/common'

/** Who holds an obligation; step `*` with a role names the person for the whole application. */
export const assignmentInput = z.object({
  applicationId: uuid,
  step: z.string().min(1).max(80),
  instance: z.number().int().min(0).max(99),
  obligation: z.union([z.enum(roles), z.string().max(80)]).default(''),
  personId: uuid,
})
export type AssignmentInput = z.infer<typeof assignmentInput>
