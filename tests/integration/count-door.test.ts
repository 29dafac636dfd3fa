import { existsSync, readFileSync } from 'node:fs'
import { beforeAll, describe, expect, it } from 'vitest'
import { POST } from '@/app/api/clocks/count/route'
import { countAnswer } from '@/lib/schemas/count'
import { makeHouse } from '../factories/house'
import { useTestDatabase } from '../setup/database'
import { tokenFor } from './signed-in-as'

const database = useTestDatabase()
let token: string

beforeAll(async () => {
  const house = await makeHouse(database().db)
  token = await tokenFor(database().db, house.people.liaison.id)
})

async function ask(body: unknown): Promise<{ status: number; body: Record<string, unknown> }> {
  const request = new Request('http://127.0.0.1/api/clocks/count', {
    method: 'POST',
    headers: { authorization: `Bearer ${token}`, 'content-type': 'application/json' },
    body: JSON.stringify(body),
  })
  const answer = await POST(request, { params: Promise.resolve({}) })
  return { status: answer.status, body: (await answer.json()) as Record<string, unknown> }
}

const path = '../shared/reference/tariff-examples.json'
interface Example {
  id: string
  start: string
  length: number
  unit: string
  calendar: string
  roll: string
  expected: string
}

// Source: tariff-examples.json, each computed by a plain loop and by numpy busday_offset.
describe.skipIf(!existsSync(path))(
  `POST /api/clocks/count answers ${path} (skipped where absent)`,
  () => {
    const examples = existsSync(path) ? (JSON.parse(readFileSync(path, 'utf8')) as Example[]) : []
    it.each(examples)('$id', async ({ start, length, unit, calendar, roll, expected }) => {
      const { status, body } = await ask({ start, length, unit, calendar, roll })
      expect(status).toBe(200)
      expect(countAnswer.parse(body).dueOn).toBe(expected)
    })
  },
)

describe('POST /api/clocks/count', () => {
  it('names both observed Fridays over a Saturday Christmas', async () => {
    const { body } = await ask({ start: '2027-12-20', length: 10, unit: 'business_day' })
    expect(body.account).toContain('Fri 24 Dec 2027 (Christmas Day, observed)')
    expect(body.account).toContain("Fri 31 Dec 2027 (New Year's Day, observed)")
  })

  it('counts a Saturday receipt by either convention', async () => {
    const saturday = { start: '2026-05-23', length: 3, unit: 'business_day' }
    expect((await ask(saturday)).body.dueOn).toBe('2026-05-28')
    expect((await ask({ ...saturday, receipt: 'next_business_day' })).body.dueOn).toBe('2026-05-29')
  })

  it('counts by the calendar of an organization, named by its key', async () => {
    const { body } = await ask({
      start: '2026-11-12',
      length: 10,
      unit: 'business_day',
      calendar: 'dml',
    })
    expect(body.dueOn).toBe('2026-11-30')
  })

  it('refuses everything that is wrong at once, each at its field', async () => {
    const { status, body } = await ask({ start: '2026-02-30', length: 1.5, unit: 'fortnight' })
    expect(status).toBe(422)
    const fields = body.fields as { path: string; message: string }[]
    expect(fields.map((field) => field.path).sort()).toEqual(['length', 'start', 'unit'])
    expect(fields.find((field) => field.path === 'start')?.message).toContain('"2026-02-30"')
  })

  it('refuses a calendar that is none', async () => {
    const { status, body } = await ask({
      start: '2026-11-12',
      length: 1,
      unit: 'business_day',
      calendar: 'moon',
    })
    expect(status).toBe(422)
    expect((body.fields as { path: string }[])[0]?.path).toBe('calendar')
  })
})
