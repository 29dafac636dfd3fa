import { statusOf, titleOf } from '@/lib/http/status'
import { ServiceError } from '@/lib/services/errors'
import { log } from '@/lib/services/log'

/** A problem document (RFC 9457) for any error; an unknown one becomes one fixed sentence. */
export function problemResponse(error: unknown, requestId: string): Response {
  if (!(error instanceof ServiceError)) {
    log.error({ requestId, error }, 'unexpected error')
    return problem(500, 'Something failed on our side', 'unexpected', {
      detail: `Nothing was saved. The failure is logged under ${requestId}.`,
    })
  }
  const headers = error.retryAfterSeconds
    ? { 'retry-after': String(error.retryAfterSeconds) }
    : undefined
  return problem(
    statusOf[error.code],
    titleOf[error.code],
    error.code,
    { detail: error.message, ...(error.fields.length > 0 && { fields: error.fields }) },
    headers,
  )
}

function problem(
  status: number,
  title: string,
  code: string,
  rest: object,
  headers?: Record<string, string>,
): Response {
  return new Response(JSON.stringify({ title, status, code, ...rest }), {
    status,
    headers: { 'content-type': 'application/problem+json', ...headers },
  })
}
