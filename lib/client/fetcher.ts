import { z } from 'zod'

const problemSchema = z.object({
  title: z.string().catch('The request failed'),
  code: z.string().catch('unexpected'),
  detail: z.string().optional(),
  fields: z.array(z.object({ path: z.string(), message: z.string() })).catch([]),
})

export interface ProblemField {
  path: string
  message: string
}

/** What a handler refused, as its problem document (RFC 9457) says it. */
export class ProblemError extends Error {
  constructor(
    readonly status: number,
    readonly code: string,
    readonly title: string,
    readonly fields: readonly ProblemField[] = [],
    readonly detail?: string,
  ) {
    super(detail ?? title)
    this.name = 'ProblemError'
  }
}

/** The answer never came: no network, or the server is away. `status` is 0. */
export function unreachable(): ProblemError {
  return new ProblemError(
    0,
    'unreachable',
    'The server did not answer',
    [],
    'The server did not answer. Nothing was changed here; check the connection and try again.',
  )
}

/** Reads the text of a refused answer; anything that is no problem document keeps its status. */
export function problemOf(status: number, text: string): ProblemError {
  let body: unknown = {}
  try {
    body = JSON.parse(text)
  } catch {
    body = {}
  }
  const parsed = problemSchema.safeParse(body)
  if (!parsed.success) return new ProblemError(status, 'unexpected', 'The request failed')
  const { title, code, fields, detail } = parsed.data
  return new ProblemError(status, code, title, fields, detail)
}

export interface CallOptions {
  method?: 'GET' | 'POST' | 'PUT' | 'PATCH' | 'DELETE'
  /** Sent as JSON. */
  body?: unknown
  signal?: AbortSignal
  headers?: Record<string, string>
}

/**
 * Calls a handler and reads its answer with the schema both sides share.
 * Throws `ProblemError` for a refusal, an unreachable server (status 0) and an answer of the wrong
 * shape (code `unreadable_answer`); an abort is passed on as it is.
 */
export async function call<S extends z.ZodType>(
  path: string,
  answer: S,
  { method = 'GET', body, signal, headers }: CallOptions = {},
): Promise<z.output<S>> {
  const response = await fetch(path, {
    method,
    signal,
    credentials: 'same-origin',
    headers: {
      accept: 'application/json',
      ...(body !== undefined && { 'content-type': 'application/json' }),
      ...headers,
    },
    body: body === undefined ? undefined : JSON.stringify(body),
  }).catch((error: unknown) => {
    if (signal?.aborted) throw error
    throw unreachable()
  })
  const text = await response.text()
  if (!response.ok) throw problemOf(response.status, text)
  return readAnswer(answer, response.status, text)
}

/** Parses the text of an accepted answer; an empty body counts as `undefined`. */
export function readAnswer<S extends z.ZodType>(
  answer: S,
  status: number,
  text: string,
): z.output<S> {
  let body: unknown
  try {
    body = text === '' ? undefined : JSON.parse(text)
  } catch {
    throw unreadableAnswer(status)
  }
  const parsed = answer.safeParse(body)
  if (!parsed.success) throw unreadableAnswer(status)
  return parsed.data
}

function unreadableAnswer(status: number): ProblemError {
  return new ProblemError(
    status,
    'unreadable_answer',
    'The answer could not be read',
    [],
    'The server answered in a form this page does not know. Reload the page and look whether the change is there.',
  )
}
