import { z } from 'zod'

const standing = z.enum(['ok', 'down'])

export const healthSchema = z
  .object({
    status: standing,
    database: standing,
    jobs: standing,
    mail: standing,
    files: standing,
    /** What keeps recorded facts unchanged: rights and triggers, or triggers alone under one role. */
    records: z.enum(['role_and_triggers', 'triggers_only']),
  })
  .meta({ id: 'Health' })
export type Health = z.infer<typeof healthSchema>
export type Standing = z.infer<typeof standing>
