import type { z } from 'zod'
import type { Action } from '@/lib/domain/access'

/** One door of the API as its description tells it; schemas are the ones the handler uses. */
export interface Door {
  method: 'get' | 'post' | 'put' | 'patch' | 'delete'
  /** With parameters in braces: `/api/people/{id}`. */
  path: string
  summary: string
  /** What a person must be allowed to do; null where the door opens without a session. */
  action: Action | null
  /** JSON body, or the query of a GET. */
  input?: z.ZodType
  /** JSON answer; nothing is answered where it is absent. */
  output?: z.ZodType
  /** Status of a success; 200 with an answer, 204 without one. */
  status?: number
  /** Media type of an answer or a body that is no JSON, such as `text/calendar`. */
  inputType?: string
  outputType?: string
}
