import { randomUUID } from 'node:crypto'
import { asc, eq } from 'drizzle-orm'
import fc from 'fast-check'
import { beforeAll, describe, expect, it } from 'vitest'
import type { SeededHouse } from '@/db/demo/seed-house'
import { obligations } from '@/db/schema/applications'
import { addDays } from '@/lib/domain/clocks/civil-date'
import type { ApplicationView } from '@/lib/schemas/application'
import { getApplication } from '@/lib/services/applications'
import { ServiceError } from '@/lib/services/errors'
import { computeSchedule, obligationRows } from '@/lib/services/projection'
import { as, makeApplication, makeHouse, record } from '../factories/house'
import { useTestDatabase } from '../setup/database'

const database = useTestDatabase()
let house: SeededHouse
const ctx = () => as(database().db, house, 'developer', '2027-12-31T18:00:00Z')

beforeAll(async () => {
  house = await makeHouse(database().db)
})

interface Move {
  pick: number
  outcome: number
  days: number
  kind: 'happened' | 'correct' | 'retract' | 'waive' | 'extend' | 'book' | 'stop' | 'state'
}

const moves = fc.array(
  fc.record<Move>({
    pick: fc.nat(1000),
    outcome: fc.nat(10),
    days: fc.integer({ min: 0, max: 12 }),
    kind: fc.constantFrom(
      'happened',
      'happened',
      'happened',
      'happened',
      'correct',
      'retract',
      'waive',
      'extend',
      'book',
      'stop',
      'state',
    ),
  }),
  { minLength: 1, maxLength: 9 },
)

/** The fact that a random move becomes on the state the application is in. */
function factOf(view: ApplicationView, move: Move, on: string) {
  const open = view.recordable.filter((step) => step.status !== 'waiting')
  const step = (open.length > 0 ? open : view.recordable)[
    move.pick % Math.max(1, open.length || view.recordable.length)
  ]
  const standing = view.facts.filter(
    (fact) => fact.kind === 'happened' && !fact.replacedById && fact.step,
  )
  const old = standing[move.pick % Math.max(1, standing.length)]
  const place = step && { step: step.step, instance: step.instance }
  const outcome = step?.outcomes[move.outcome % step.outcomes.length]?.key
  switch (move.kind) {
    case 'correct':
      return (
        old && {
          kind: 'correction' as const,
          replaces: old.id,
          reason: 'typed wrong',
          step: old.step!,
          instance: old.instance,
          outcome: old.outcome ?? undefined,
          receivedOn: on,
        }
      )
    case 'retract':
      return old && { kind: 'retraction' as const, replaces: old.id, reason: 'another request' }
    case 'waive':
      return place && { kind: 'waived' as const, ...place, receivedOn: on }
    case 'extend':
      return (
        place && {
          kind: 'extension' as const,
          ...place,
          decision: 'granted' as const,
          lengthDays: move.days + 1,
          unit: 'business_day' as const,
        }
      )
    case 'book':
      return place && { kind: 'scheduled' as const, ...place, dueOn: addDays(on, 30) }
    case 'stop':
      return { kind: 'stop' as const, receivedOn: on, scope: place ? [place.step] : undefined }
    case 'state':
      return place && { kind: 'stated' as const, ...place, dueOn: addDays(on, 20) }
    default:
      return (
        place && {
          kind: 'happened' as const,
          ...place,
          outcome,
          receivedOn: on,
          reason: 'as it came',
        }
      )
  }
}

/** Plays the moves; a move the rules refuse is left out, as a person would see it refused. */
async function play(list: Move[]): Promise<string> {
  let view = await makeApplication(ctx(), house)
  let on = '2026-02-02'
  for (const move of list) {
    on = addDays(on, move.days)
    const fact = factOf(view, move, on)
    if (!fact) continue
    try {
      view = await record(ctx(), view.id, { ...fact, id: randomUUID() })
    } catch (error) {
      if (!(error instanceof ServiceError)) throw error
      view = await getApplication(ctx(), view.id)
    }
  }
  return view.id
}

describe('the projection', () => {
  it('equals the recompute in every column over 300 random sequences of facts', async () => {
    let recorded = 0
    await fc.assert(
      fc.asyncProperty(moves, async (list) => {
        const id = await play(list)
        const rows = await database()
          .db.select()
          .from(obligations)
          .where(eq(obligations.applicationId, id))
          .orderBy(asc(obligations.position), asc(obligations.obligation))
        const { schedule, facts } = await database().db.transaction((tx) => computeSchedule(tx, id))
        const fresh = obligationRows(id, facts.length, schedule.items)
        recorded += facts.length - 1
        const key = (row: { step: string; instance: number; obligation?: string }) =>
          `${row.step}#${row.instance}#${row.obligation}`
        const stored = new Map(rows.map(({ id: _id, ...row }) => [key(row), row]))
        expect(stored.size).toBe(fresh.length)
        for (const row of fresh) expect(stored.get(key(row))).toEqual(row)
      }),
      { numRuns: 300 },
    )
    expect(recorded).toBeGreaterThan(600)
  }, 240_000)
})
