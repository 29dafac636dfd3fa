import fc from 'fast-check'
import { afterEach, describe, expect, it, vi } from 'vitest'
import { addDays } from '@/lib/domain/clocks/civil-date'
import { factKinds, type Fact } from '@/lib/domain/clocks/facts'
import { libraryProcedures } from '@/lib/domain/clocks/library/all'
import { schedule } from '@/lib/domain/clocks/schedule'
import { itemOf, on, partiesOf, told } from './told'

const parties = partiesOf('dml')
const aDay = fc.integer({ min: 0, max: 500 }).map((days) => addDays('2026-01-05', days))
const seldom = <T>(value: fc.Arbitrary<T>) => fc.option(value, { nil: undefined, freq: 1 })
const aFact = (steps: readonly { key: string; outcomes: { key: string }[] }[]) =>
  fc.constantFrom(...steps).chain((step) =>
    fc.record({
      kind: fc.oneof(
        { weight: 6, arbitrary: fc.constant('happened' as const) },
        { weight: 4, arbitrary: fc.constantFrom(...factKinds) },
      ),
      step: fc.constant(step.key),
      instance: fc.constantFrom(1, 1, 1, 2, 3),
      outcome: fc.constantFrom(...step.outcomes.map((one) => one.key)),
      receivedOn: fc.option(aDay, { nil: undefined }),
      sentOn: seldom(aDay),
      receivedAt: seldom(aDay.map((day) => `${day}T22:15:00Z`)),
      dueOn: fc.option(aDay, { nil: undefined }),
      channel: seldom(fc.constant('letter' as const)),
      replacesId: seldom(fc.integer({ min: 1, max: 30 }).map((n) => `f${n}`)),
      body: fc.record({
        decision: seldom(fc.constantFrom('asked' as const, 'granted' as const, 'refused' as const)),
        lengthDays: seldom(fc.integer({ min: 1, max: 4000 })),
        sinceOn: seldom(aDay),
        scope: seldom(fc.array(fc.constant(step.key), { minLength: 1, maxLength: 1 })),
      }),
    }),
  )

/** At most one fact points at another, as the database keeps it. */
const sound = (facts: Fact[]) =>
  facts.map((fact, at) => {
    const points = fact.kind === 'correction' || fact.kind === 'retraction'
    const taken = facts.slice(0, at).some((one) => one.replacesId === fact.replacesId)
    return points && !taken ? fact : { ...fact, replacesId: undefined }
  })

describe.each(libraryProcedures)('schedule of $key', ({ body }) => {
  const someFacts = fc
    .array(aFact(body.steps), { maxLength: 30 })
    .map((facts) => sound(told(on('2026-01-05', 'file', 'filed'), ...facts)))

  it('never throws on facts, and gives each item one place', () => {
    fc.assert(
      fc.property(someFacts, (facts) => {
        const { items } = schedule(body, parties, facts)
        const keys = items.map((item) => `${item.step}#${item.instance}#${item.obligation}`)
        expect(new Set(keys).size).toBe(keys.length)
      }),
      { numRuns: 150 },
    )
  })

  it('does not depend on the order in which the facts are read', () => {
    fc.assert(
      fc.property(
        someFacts.chain((facts) =>
          fc.tuple(
            fc.constant(facts),
            fc.shuffledSubarray(facts, { minLength: facts.length, maxLength: facts.length }),
          ),
        ),
        ([facts, shuffled]) => {
          expect(schedule(body, parties, shuffled)).toEqual(schedule(body, parties, facts))
        },
      ),
      { numRuns: 100 },
    )
  })

  it('is unchanged by a fact recorded and then retracted', () => {
    fc.assert(
      fc.property(someFacts, aFact(body.steps), (facts, extra) => {
        fc.pre(extra.kind !== 'correction' && extra.kind !== 'retraction')
        const [made, gone] = told(
          { ...extra, id: 'extra', seq: 900, replacesId: undefined },
          { kind: 'retraction', id: 'gone', seq: 901, replacesId: 'extra' },
        )
        const { stranded: _before, ...before } = schedule(body, parties, facts)
        const { stranded: _after, ...after } = schedule(body, parties, [...facts, made!, gone!])
        expect(after).toEqual(before)
      }),
      { numRuns: 100 },
    )
  })

  it('says of every fact in force that fits nowhere that it is stranded, and of no other twice', () => {
    fc.assert(
      fc.property(someFacts, (facts) => {
        const { stranded } = schedule(body, parties, facts)
        const ids = new Set(facts.map((fact) => fact.id))
        expect(stranded.every((one) => ids.has(one.factId) && one.reason.length > 0)).toBe(true)
      }),
      { numRuns: 50 },
    )
  })
})

describe('the zone of the process', () => {
  const zone = process.env.TZ
  afterEach(() => {
    process.env.TZ = zone
    vi.resetModules()
  })

  it('changes nothing, while it does change what a local clock shows', async () => {
    const facts = told(
      on('2026-03-06', 'file', 'filed', { receivedAt: '2026-03-06T21:45:00Z' }),
      on('2026-03-20', 'completeness', 'deficient'),
      { kind: 'scheduled', step: 'witness_test', dueOn: '2026-11-02' },
    )
    const body = libraryProcedures.find((one) => one.key === 'state_level_two')!.body
    const seen = []
    for (const name of ['UTC', 'America/Los_Angeles', 'Pacific/Auckland']) {
      process.env.TZ = name
      vi.resetModules()
      const fresh = await import('@/lib/domain/clocks/schedule')
      const made = JSON.stringify(fresh.schedule(body, parties, facts))
      seen.push({ made, hour: new Date('2026-03-06T21:45:00Z').getHours() })
    }
    expect(new Set(seen.map((one) => one.hour)).size).toBe(3)
    expect(new Set(seen.map((one) => one.made)).size).toBe(1)
    expect(itemOf(body, parties, facts, 'cure').dueOn).toBe('2026-04-03')
  })
})
