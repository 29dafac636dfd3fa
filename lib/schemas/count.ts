import { z } from 'zod'
import { longestCount } from '@/lib/domain/clocks/count'
import { civilDateSchema, show } from '@/lib/schemas/common'

const oneOf = <const T extends readonly [string, ...string[]]>(values: T) =>
  z.enum(values, {
    error: (issue) => `Found ${show(issue.input)}; allowed are: ${values.join(', ')}.`,
  })

export const countInput = z
  .object({
    start: civilDateSchema,
    length: z
      .number({ error: (issue) => `Found ${show(issue.input)}; a whole number is needed.` })
      .int({ error: (issue) => `Found ${show(issue.input)}; a whole number is needed.` })
      .min(0, { error: (issue) => `Found ${show(issue.input)}; the least is 0.` }),
    unit: oneOf(['business_day', 'calendar_day', 'month', 'year']),
    direction: oneOf(['after', 'before']).optional(),
    /** `federal`, or the id or key of a calendar. */
    calendar: z.string().min(1).max(80).optional(),
    roll: oneOf(['none', 'next_business_day', 'previous_business_day']).optional(),
    receipt: oneOf(['as_is', 'next_business_day']).optional(),
    includeStart: z.boolean().optional(),
  })
  .refine((input) => input.length <= longestCount[input.unit], {
    path: ['length'],
    error: (issue) => {
      const { unit, length } = issue.input as { unit: keyof typeof longestCount; length: number }
      return `Found ${length}; at most ${longestCount[unit]} for ${unit}.`
    },
  })
export type CountInputBody = z.infer<typeof countInput>

export const countAnswer = z.object({
  dueOn: z.string(),
  derivation: z.array(z.object({ on: z.string(), counted: z.boolean(), reason: z.string() })),
  account: z.string(),
})
export type CountAnswer = z.infer<typeof countAnswer>
