import { z } from 'zod'
import { call } from '@/lib/client/fetcher'
import { api } from '@/lib/routes'
import type { NewApplicationInput } from '@/lib/schemas/application'

const startedSchema = z.object({ id: z.string() })

/** Starts an application; the same id sent twice is the same application. */
export const createApplication = (body: NewApplicationInput) =>
  call(api.applications(), startedSchema, { method: 'POST', body })
