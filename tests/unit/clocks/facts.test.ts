import { describe, expect, it } from 'vitest'
import { effectiveFacts, termsOf } from '@/lib/domain/clocks/facts'
import { federalFastTrack } from '@/lib/domain/clocks/library/fast-track'
import { schedule } from '@/lib/domain/clocks/schedule'
import { itemOf, on, partiesOf, told, type Told } from './told'

const body = federalFastTrack()
const ave = partiesOf('ave')
const filed = on('2026-09-28', 'file', 'filed')
const correction = (replacesId: string, content: Told): Told => ({
  ...content,
  kind: 'correction',
  replacesId,
})
const retraction = (replacesId: string): Told => ({ kind: 'retraction', replacesId })

describe('facts in force', () => {
  it('a correction takes the kind and the place of what it corrects', () => {
    const facts = told(
      filed,
      on('2026-10-09', 'completeness', 'deficient'),
      correction('f1', on('2026-09-29', 'file', 'filed')),
    )
    const inForce = effectiveFacts(facts)
    expect(inForce.map((fact) => [fact.id, fact.kind, fact.receivedOn])).toEqual([
      ['f3', 'happened', '2026-09-29'],
      ['f2', 'happened', '2026-10-09'],
    ])
  })

  it('a correction of a correction wins over both', () => {
    const facts = told(
      filed,
      correction('f1', on('2026-09-29', 'file', 'filed')),
      correction('f2', on('2026-09-30', 'file', 'filed')),
    )
    expect(effectiveFacts(facts).map((fact) => fact.receivedOn)).toEqual(['2026-09-30'])
  })

  it('a retracted fact is gone', () => {
    expect(effectiveFacts(told(filed, retraction('f1')))).toEqual([])
  })

  it('retracting a correction takes the whole statement away', () => {
    const facts = told(filed, correction('f1', on('2026-09-29', 'file', 'filed')), retraction('f2'))
    expect(effectiveFacts(facts)).toEqual([])
  })

  it('correcting a retraction brings the statement back', () => {
    const facts = told(filed, retraction('f1'), correction('f2', on('2026-09-28', 'file', 'filed')))
    expect(effectiveFacts(facts).map((fact) => [fact.kind, fact.receivedOn])).toEqual([
      ['happened', '2026-09-28'],
    ])
  })

  it('two corrections that point at each other come to an end', () => {
    const facts = told({ ...correction('f2', filed) }, { ...correction('f1', filed) })
    expect(effectiveFacts(facts)).toEqual([])
  })

  it('a correction of a fact that is not here is stranded', () => {
    const { stranded } = schedule(body, ave, told(filed, correction('f9', filed)))
    expect(stranded).toEqual([{ factId: 'f2', reason: expect.stringContaining('not here') }])
  })

  it('of the terms the later statement wins, field by field; what was only asked does not count', () => {
    const changed = (terms: object, decision?: 'asked' | 'granted' | 'refused'): Told => ({
      kind: 'changed',
      body: { terms, ...(decision && { decision }) },
    })
    const facts = told(
      changed({ requestedMw: 5, poi: 'North' }),
      changed({ requestedMw: 4 }),
      changed({ requestedMw: 3 }, 'asked'),
      changed({ poi: 'South' }, 'refused'),
      changed({ dcMw: 6 }, 'granted'),
    )
    expect(termsOf(facts)).toEqual({ requestedMw: 4, poi: 'North', dcMw: 6 })
  })
})

describe('a fact that does not fit is stranded with its reason, and nothing is thrown', () => {
  const cases: [rule: string, fact: Told, reason: RegExp][] = [
    ['a step the procedure has not', on('2026-10-01', 'scoping'), /no step "scoping"/],
    [
      'a date that is none',
      on('2026-02-30', 'completeness', 'complete'),
      /"2026-02-30" is no date/,
    ],
    [
      'a year beyond reason',
      { kind: 'scheduled', step: 'witness_test', dueOn: '9999-12-31' },
      /9999-12-31/,
    ],
    [
      'an instant that is none',
      on('2026-10-01', 'completeness', 'complete', { receivedAt: 'noon' }),
      /"noon" is no instant/,
    ],
    ['an event without a step', { receivedOn: '2026-10-01' }, /names no step/],
    [
      'a part the step has not',
      on('2026-10-01', 'file', undefined, { obligation: 'seal' }),
      /no part "seal"/,
    ],
    [
      'a round that is none',
      on('2026-10-01', 'completeness', 'complete', { instance: 3 }),
      /no round 3/,
    ],
    [
      'a step that is not needed',
      on('2026-10-01', 'agreement_modifications', 'sent', { instance: 0 }),
      /Round 0 is none/,
    ],
    ['an outcome the step has not', on('2026-10-01', 'completeness', 'lost'), /no outcome "lost"/],
    ['a stop without a day', { kind: 'stop' }, /none is given/],
    [
      'an extension beyond reason',
      { kind: 'extension', step: 'completeness', body: { decision: 'granted', lengthDays: 9000 } },
      /9000 days/,
    ],
    ['the same event twice', filed, /recorded already/],
  ]
  it.each(cases)('%s', (_, fact, reason) => {
    const { stranded, items } = schedule(body, ave, told(filed, fact))
    expect(stranded.map((one) => one.factId)).toContain('f2')
    expect(stranded.map((one) => one.reason).join(' ')).toMatch(reason)
    expect(items.find((item) => item.step === 'file')?.doneOn).toBe('2026-09-28')
  })

  it('an unknown outcome closes the step, and what depends on it waits', () => {
    const facts = told(filed, on('2026-10-01', 'completeness', 'lost'))
    expect(itemOf(body, ave, facts, 'completeness').status).toBe('done')
    expect(itemOf(body, ave, facts, 'initial_review').status).toBe('waiting')
  })

  it('an event of a branch not taken', () => {
    const facts = told(
      filed,
      on('2026-10-01', 'completeness', 'complete'),
      on('2026-10-05', 'initial_review', 'pass'),
      on('2026-10-06', 'options', 'study'),
    )
    const { stranded } = schedule(body, ave, facts)
    expect(stranded).toEqual([{ factId: 'f4', reason: expect.stringContaining('not needed') }])
  })
})

describe('a fact out of order', () => {
  it('closes its step with the reason given and leaves what it follows open', () => {
    const facts = told(
      filed,
      on('2026-10-20', 'initial_review', 'pass', { reason: 'The notice got lost' }),
    )
    const review = itemOf(body, ave, facts, 'initial_review')
    expect([review.status, review.doneOn]).toEqual(['done', '2026-10-20'])
    expect(review.derivation.map((line) => line.text).join(' ')).toContain('The notice got lost')
    expect(itemOf(body, ave, facts, 'completeness').status).toBe('open')
    expect(itemOf(body, ave, facts, 'agreement_screens').dueOn).toBe('2026-10-27')
  })
})
