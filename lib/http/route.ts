import { randomUUID } from 'node:crypto'
import type { z } from 'zod'
import { contextOf } from '@/lib/auth/context-of'
import type { Action } from '@/lib/domain/access'
import { problemResponse } from '@/lib/http/problem'
import { authorize, type Context } from '@/lib/services/context'
import { ServiceError, type FieldError } from '@/lib/services/errors'

interface RouteOptions<Input, Params> {
  /** Asked before the body is read, so that who may not is told so whatever was sent. */
  action?: Action
  /** Body for POST, PUT, PATCH and DELETE; query string for GET. */
  input?: z.ZodType<Input>
  status?: number
  run: (ctx: Context, input: Input, params: Params, request: Request) => Promise<unknown>
}

type NextParams<Params> = { params: Promise<Params> }

/**
 * A handler: who, parse, service, JSON. A service's answer that is already a Response goes out
 * as it is. Every error leaves as a problem document (RFC 9457).
 */
export function route<Input = undefined, Params = Record<string, string>>(
  options: RouteOptions<Input, Params>,
) {
  return async (request: Request, next: NextParams<Params>): Promise<Response> => {
    const requestId = randomUUID()
    try {
      const ctx = await contextOf(request, requestId)
      if (options.action) authorize(ctx, options.action)
      const input = options.input ? await parse(request, options.input) : (undefined as Input)
      const answer = await options.run(ctx, input, await next.params, request)
      if (answer instanceof Response) return answer
      const status = answer === undefined ? 204 : (options.status ?? 200)
      return status === 204 ? new Response(null, { status }) : Response.json(answer, { status })
    } catch (error) {
      return problemResponse(error, requestId)
    }
  }
}

/** Reads and checks a request's input; all faults at once. */
export async function parse<Input>(request: Request, schema: z.ZodType<Input>): Promise<Input> {
  const raw = request.method === 'GET' ? queryOf(request) : await bodyOf(request)
  const result = schema.safeParse(raw)
  if (result.success) return result.data
  throw new ServiceError('invalid', 'Some fields need another look.', fieldsOf(result.error))
}

/** The faults of a zod error as fields, each with its path. */
export function fieldsOf(error: z.ZodError): FieldError[] {
  return error.issues.map((issue) => ({ path: issue.path.join('.'), message: issue.message }))
}

function queryOf(request: Request): Record<string, string> {
  return Object.fromEntries(new URL(request.url).searchParams)
}

async function bodyOf(request: Request): Promise<unknown> {
  try {
    return await request.json()
  } catch {
    throw new ServiceError('unreadable', 'The body is no readable JSON.')
  }
}
