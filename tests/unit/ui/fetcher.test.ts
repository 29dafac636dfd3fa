import { createServer, type Server } from 'node:http'
import type { AddressInfo } from 'node:net'
import { afterAll, beforeAll, describe, expect, test } from 'vitest'
import { z } from 'zod'
import { call, ProblemError } from '@/lib/client/fetcher'

const answers: Record<string, [number, string]> = {
  '/ok': [200, '{"dueOn":"2026-12-10","extra":1}'],
  '/empty': [204, ''],
  '/input': [
    422,
    '{"title":"Input","status":422,"code":"invalid","detail":"x","fields":[{"path":"start","message":"Found nothing."}]}',
  ],
  '/html': [502, '<html>Bad gateway</html>'],
  '/wrong': [200, '{"dueOn":5}'],
  '/torn': [200, '{"dueOn":'],
}

let server: Server
let base: string

beforeAll(async () => {
  server = createServer((request, response) => {
    const [status, body] = answers[request.url ?? ''] ?? [404, '{}']
    response.writeHead(status, { 'content-type': 'application/json' }).end(body)
  })
  await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve))
  base = `http://127.0.0.1:${(server.address() as AddressInfo).port}`
})
afterAll(() => server.close())

const dueSchema = z.object({ dueOn: z.string() })
const refusal = (path: string) =>
  call(path.startsWith('http') ? path : `${base}${path}`, dueSchema).then(
    () => undefined,
    (error: unknown) => error as ProblemError,
  )

describe('calling a handler', () => {
  test('the answer is read by the shared schema', async () => {
    expect(await call(`${base}/ok`, dueSchema)).toEqual({ dueOn: '2026-12-10' })
    expect(await call(`${base}/empty`, z.undefined(), { method: 'DELETE' })).toBeUndefined()
  })

  test('a refusal carries status, code and every field', async () => {
    expect(await refusal('/input')).toMatchObject({
      status: 422,
      code: 'invalid',
      title: 'Input',
      fields: [{ path: 'start', message: 'Found nothing.' }],
    })
  })

  test('an answer that is no problem document keeps its status', async () => {
    expect(await refusal('/html')).toMatchObject({ status: 502, code: 'unexpected', fields: [] })
  })

  test.each(['/wrong', '/torn'])(
    'an answer of another shape is not passed on: %s',
    async (path) => {
      expect(await refusal(path)).toMatchObject({ status: 200, code: 'unreadable_answer' })
    },
  )

  test('a server that is away is said as such', async () => {
    expect(await refusal('http://127.0.0.1:1/ok')).toMatchObject({ status: 0, code: 'unreachable' })
  })
})
