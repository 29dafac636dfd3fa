import { randomUUID } from 'node:crypto'
import { eq } from 'drizzle-orm'
import { beforeAll, describe, expect, it } from 'vitest'
import type { SeededHouse } from '@/db/demo/seed-house'
import { facts, obligations } from '@/db/schema/applications'
import { audit } from '@/db/schema/people'
import type { ApplicationView } from '@/lib/schemas/application'
import { getApplication } from '@/lib/services/applications'
import type { ServiceError } from '@/lib/services/errors'
import { as, makeApplication, makeHouse, record } from '../factories/house'
import { useTestDatabase } from '../setup/database'

const database = useTestDatabase()
let house: SeededHouse
const now = '2026-12-01T18:00:00Z'
const at = (instant: string) => as(database().db, house, 'developer', instant)

beforeAll(async () => {
  house = await makeHouse(database().db)
})

const item = (view: ApplicationView, step: string, instance = 1) =>
  view.items.find((one) => one.step === step && one.instance === instance && one.obligation === '')!

const filed = {
  kind: 'happened',
  step: 'file',
  outcome: 'filed',
  receivedOn: '2026-11-02',
} as const

async function refusal(work: Promise<unknown>): Promise<ServiceError> {
  try {
    await work
  } catch (error) {
    return error as ServiceError
  }
  throw new Error('It was not refused.')
}

describe('recording a fact', () => {
  it('moves all later dates when it is corrected and keeps the row as it was', async () => {
    const { id } = await makeApplication(at(now), house)
    const first = randomUUID()
    const before = await record(at(now), id, { ...filed, id: first })
    expect(item(before, 'completeness').dueOn).toBe('2026-11-17')
    const after = await record(at(now), id, {
      kind: 'correction',
      replaces: first,
      reason: 'The stamp says the 4th.',
      step: 'file',
      outcome: 'filed',
      receivedOn: '2026-11-04',
    })
    expect(item(after, 'completeness').dueOn).toBe('2026-11-19')
    expect(item(after, 'acknowledge').dueOn).toBe('2026-11-09')
    const [kept] = await database().db.select().from(facts).where(eq(facts.id, first))
    expect(kept?.receivedOn).toBe('2026-11-02')
    expect(after.facts.find((fact) => fact.id === first)?.replacedById).toBeTruthy()
  })

  it('makes one fact of the same form sent twice, at once or later', async () => {
    const { id } = await makeApplication(at(now), house)
    const same = { ...filed, id: randomUUID() }
    await Promise.all([record(at(now), id, same), record(at(now), id, same)])
    const view = await record(at(now), id, same)
    expect(view.facts.filter((fact) => fact.step === 'file')).toHaveLength(1)
    const other = await refusal(record(at(now), id, { ...same, receivedOn: '2026-11-03' }))
    expect(other.code).toBe('conflict')
  })

  it('loses neither of two facts written at once', async () => {
    const { id } = await makeApplication(at(now), house)
    await record(at(now), id, filed)
    await Promise.all([
      record(at(now), id, { kind: 'happened', step: 'acknowledge', receivedOn: '2026-11-03' }),
      record(at(now), id, {
        kind: 'happened',
        step: 'completeness',
        outcome: 'deficient',
        receivedOn: '2026-11-10',
      }),
    ])
    const view = await getApplication(at(now), id)
    expect(view.facts.map((fact) => fact.seq)).toEqual([1, 2, 3, 4])
    expect(item(view, 'cure').status).toBe('open')
  })

  it('refuses a stale page, names what was recorded meanwhile and saves nothing', async () => {
    const { id, seq } = await makeApplication(at(now), house)
    await record(at(now), id, { ...filed, atSeq: seq })
    const stale = await refusal(
      record(at(now), id, {
        kind: 'happened',
        step: 'acknowledge',
        receivedOn: '2026-11-03',
        atSeq: seq,
      }),
    )
    expect(stale.code).toBe('conflict')
    expect(stale.message).toContain('File the request')
    expect((await getApplication(at(now), id)).facts).toHaveLength(2)
  })

  it.each([
    [
      'an outcome that does not exist',
      { step: 'completeness', outcome: 'fine', receivedOn: '2026-11-09' },
      'outcome',
      'complete, deficient',
    ],
    [
      'a receipt in the future',
      { step: 'completeness', outcome: 'complete', receivedOn: '2026-12-03' },
      'receivedOn',
      'Thu 3 Dec 2026',
    ],
    [
      'an hour in the future',
      { step: 'completeness', outcome: 'complete', receivedAt: '2026-12-01T19:00:00Z' },
      'receivedAt',
      'cannot lie in the future',
    ],
    [
      'a receipt before the request was filed',
      { step: 'completeness', outcome: 'complete', receivedOn: '2026-10-30' },
      'receivedOn',
      'Mon 2 Nov 2026',
    ],
    [
      'a receipt before it was sent',
      { step: 'completeness', outcome: 'complete', sentOn: '2026-11-10', receivedOn: '2026-11-09' },
      'receivedOn',
      'cannot be received before',
    ],
    ['a step that is none', { step: 'scoping', receivedOn: '2026-11-09' }, 'step', 'no such step'],
    [
      'a round that is not there',
      { step: 'cure', instance: 3, outcome: 'supplied', receivedOn: '2026-11-09' },
      'instance',
      'round 3',
    ],
    [
      'an event before its predecessor without a reason',
      { step: 'initial_review', outcome: 'pass', receivedOn: '2026-11-09' },
      'reason',
      'with a reason',
    ],
    [
      'a missing outcome',
      { step: 'completeness', receivedOn: '2026-11-09' },
      'outcome',
      'Choose how it ended',
    ],
    ['a missing day', { step: 'completeness', outcome: 'complete' }, 'receivedOn', 'Give the day'],
  ])('refuses %s at its field', async (_name, fact, path, words) => {
    const { id } = await makeApplication(at(now), house)
    await record(at(now), id, filed)
    const error = await refusal(record(at(now), id, { kind: 'happened', ...fact }))
    expect(error.code).toBe('invalid')
    const field = error.fields.find((one) => one.path === path)
    expect(field?.message).toContain(words)
    expect((await getApplication(at(now), id)).facts).toHaveLength(2)
  })

  it('takes an event before its predecessor with a reason', async () => {
    const { id } = await makeApplication(at(now), house)
    await record(at(now), id, filed)
    const view = await record(at(now), id, {
      kind: 'happened',
      step: 'initial_review',
      outcome: 'pass',
      receivedOn: '2026-11-09',
      reason: 'Their letter came without a completeness notice.',
    })
    expect(item(view, 'initial_review').status).toBe('done')
  })

  it('writes who did what into the audit in the same transaction', async () => {
    const { id } = await makeApplication(at(now), house)
    await record(at(now), id, filed)
    const rows = await database().db.select().from(audit).where(eq(audit.subjectId, id))
    expect(rows.map((row) => row.action)).toEqual(['application.create', 'fact.happened'])
    expect(rows[1]?.actorName).toBe('Maren Oxley')
  })
})

describe('the database', () => {
  it.each(['update facts set outcome = null', 'delete from facts', 'truncate facts cascade'])(
    'refuses "%s" to the role of the application',
    async (statement) => {
      const { id } = await makeApplication(at(now), house)
      await record(at(now), id, filed)
      await expect(database().db.execute(statement)).rejects.toThrow()
    },
  )
})

describe('the closing hour', () => {
  it('turns a clock to missed with no write', async () => {
    const { id } = await makeApplication(at(now), house, {
      organization: 'dml',
      procedure: 'state_level_two',
    })
    await record(at(now), id, { ...filed, receivedOn: '2026-10-26' })
    await record(at(now), id, {
      kind: 'happened',
      step: 'completeness',
      outcome: 'deficient',
      receivedOn: '2026-11-12',
    })
    const rowsBefore = await database()
      .db.select()
      .from(obligations)
      .where(eq(obligations.applicationId, id))
    const open = item(await getApplication(at('2026-11-30T21:29:59Z'), id), 'cure')
    expect(open.dueOn).toBe('2026-11-30')
    expect(open.standing.state).toBe('running')
    expect(open.standing.left).toBe('today')
    const missed = item(await getApplication(at('2026-11-30T21:30:01Z'), id), 'cure')
    expect(missed.standing.state).toBe('missed')
    const rowsAfter = await database()
      .db.select()
      .from(obligations)
      .where(eq(obligations.applicationId, id))
    expect(rowsAfter).toEqual(rowsBefore)
  })
})
