import { randomUUID } from 'node:crypto'
import type { z } from 'zod'
import { refuseForeignOrigin } from '@/lib/auth/same-origin'
import { visitOf } from '@/lib/auth/visit-of'
import { problemResponse } from '@/lib/http/problem'
import { parse } from '@/lib/http/route'
import type { Visit } from '@/lib/services/one-time-links'

interface OpenRouteOptions<Input> {
  input: z.ZodType<Input>
  run: (visit: Visit & { network: string }, input: Input) => Promise<unknown>
}

/** A handler that opens without a session: it knows the moment and the network address, no person. */
export function openRoute<Input>({ input, run }: OpenRouteOptions<Input>) {
  return async (request: Request): Promise<Response> => {
    const requestId = randomUUID()
    try {
      refuseForeignOrigin(request)
      const visit = visitOf(request, requestId)
      return Response.json(await run(visit, await parse(request, input)))
    } catch (error) {
      return problemResponse(error, requestId)
    }
  }
}
