import { expect, test } from 'vitest'
import { doors } from '@/lib/http/doors'
import { describeApi } from '@/lib/http/openapi'

interface Described {
  openapi: string
  paths: Record<string, Record<string, { operationId: string; security: unknown[] }>>
}

const described = describeApi() as Described

test('the description is OpenAPI 3.1 and holds every door once', () => {
  expect(described.openapi).toBe('3.1.0')
  const operations = Object.entries(described.paths).flatMap(([path, methods]) =>
    Object.keys(methods).map((method) => `${method} ${path}`),
  )
  expect(operations.sort()).toEqual(doors.map(({ method, path }) => `${method} ${path}`).sort())
})

test('every operation has a name of its own', () => {
  const names = Object.values(described.paths).flatMap((methods) =>
    Object.values(methods).map(({ operationId }) => operationId),
  )
  expect(new Set(names).size).toBe(names.length)
})

test('a door asks for a sign-in exactly where it has an action', () => {
  for (const { method, path, action } of doors) {
    const asks = (described.paths[path]?.[method]?.security.length ?? 0) > 0
    expect([path, asks]).toEqual([path, action !== null])
  }
})
