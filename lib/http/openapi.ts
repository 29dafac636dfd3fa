import { z } from 'zod'
import { createDocument, type ZodOpenApiOperationObject } from 'zod-openapi'
import type { Door } from '@/lib/http/door'
import { doors } from '@/lib/http/doors'

const problemSchema = z
  .object({
    title: z.string(),
    status: z.int(),
    code: z.string(),
    detail: z.string().optional(),
    fields: z.array(z.object({ path: z.string(), message: z.string() })).optional(),
  })
  .meta({ id: 'Problem', description: 'RFC 9457; fields name every faulty input at once.' })

const problem = (description: string) => ({
  description,
  content: { 'application/problem+json': { schema: problemSchema } },
})

/** The OpenAPI 3.1 description of the doors, from the schemas that their handlers use. */
export function describeApi(listed: readonly Door[] = doors): object {
  const paths: Record<string, Record<string, ZodOpenApiOperationObject>> = {}
  for (const door of listed) (paths[door.path] ??= {})[door.method] = operationOf(door)
  return createDocument({
    openapi: '3.1.0',
    info: {
      title: 'Lineside',
      version: '1',
      description:
        'Interconnection applications, their clocks and their paperwork. Civil dates are YYYY-MM-DD, instants ISO 8601 with offset, units stand in names.',
    },
    components: {
      securitySchemes: {
        token: { type: 'http', scheme: 'bearer' },
        session: { type: 'apiKey', in: 'cookie', name: 'next-auth.session-token' },
      },
    },
    paths,
  })
}

function operationOf(door: Door): ZodOpenApiOperationObject {
  const isOpen = door.action === null
  return {
    operationId: `${door.method} ${door.path}`.replaceAll(/[^a-z]+/gi, '_').replace(/_$/, ''),
    summary: door.summary,
    security: isOpen ? [] : [{ token: [] }, { session: [] }],
    ...parametersOf(door),
    ...bodyOf(door),
    responses: { ...successOf(door), ...refusalsOf(door) },
  }
}

function parametersOf(door: Door): Pick<ZodOpenApiOperationObject, 'requestParams'> {
  const names = [...door.path.matchAll(/\{(\w+)\}/g)].map((found) => found[1] ?? '')
  const path = z.object(Object.fromEntries(names.map((name) => [name, z.string()])))
  const query = door.method === 'get' && door.input instanceof z.ZodObject ? door.input : undefined
  return { requestParams: { ...(names.length > 0 && { path }), ...(query && { query }) } }
}

function bodyOf(door: Door): Pick<ZodOpenApiOperationObject, 'requestBody'> {
  if (door.method === 'get') return {}
  if (door.inputType) return { requestBody: { content: { [door.inputType]: {} } } }
  if (!door.input) return {}
  return { requestBody: { content: { 'application/json': { schema: door.input } } } }
}

function successOf(door: Door): ZodOpenApiOperationObject['responses'] {
  const hasAnswer = Boolean(door.output ?? door.outputType)
  const status = String(door.status ?? (hasAnswer ? 200 : 204)) as '200'
  const media = door.output ? { schema: door.output } : {}
  const content = hasAnswer ? { content: { [door.outputType ?? 'application/json']: media } } : {}
  return { [status]: { description: 'Done', ...content } }
}

function refusalsOf(door: Door): ZodOpenApiOperationObject['responses'] {
  const isOpen = door.action === null
  return {
    ...(!isOpen && { '401': problem('Nobody is signed in'), '403': problem('Not allowed') }),
    ...(door.path.includes('{') && { '404': problem('Not there, or not visible') }),
    ...(door.input && { '422': problem('Some fields need another look') }),
  }
}
