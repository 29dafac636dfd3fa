import { describe, expect, it } from 'vitest'
import { federalFastTrack } from '@/lib/domain/clocks/library/fast-track'
import { schedule } from '@/lib/domain/clocks/schedule'
import { itemOf, on, partiesOf, told, type Told } from './told'

const body = federalFastTrack()
const ave = partiesOf('ave')
const filed = on('2026-05-18', 'file', 'filed')
const complete = on('2026-06-01', 'completeness', 'complete')
const reviewed = (...facts: Told[]) =>
  itemOf(body, ave, told(filed, complete, ...facts), 'initial_review')
const say = (item: { derivation: { text: string }[] }) =>
  item.derivation.map((line) => line.text).join(' ')

// Without a stop the review started on Mon 1 June 2026 is due Tue 23 June (19 June closed).
describe('a stop and a resumption', () => {
  const stop = (day: string, scope?: string[]): Told => ({
    kind: 'stop',
    receivedOn: day,
    body: { scope, note: 'waits for data' },
  })
  const resume = (day: string, scope?: string[]): Told => ({
    kind: 'resume',
    receivedOn: day,
    body: { scope },
  })

  it('do not count, first and last day included', () => {
    expect(reviewed().dueOn).toBe('2026-06-23')
    const item = reviewed(stop('2026-06-04'), resume('2026-06-08'))
    expect([item.status, item.dueOn]).toEqual(['open', '2026-06-26'])
    expect(say(item)).toContain(
      'Thu 4 Jun 2026 to Mon 8 Jun 2026 not counted: clock stopped (waits for data)',
    )
  })

  it('hold whatever order they were recorded in', () => {
    expect(reviewed(resume('2026-06-08'), stop('2026-06-04')).dueOn).toBe('2026-06-26')
  })

  it('of one day end that day, so that a clock is never thought stopped by the order of records', () => {
    const item = reviewed(resume('2026-06-04'), stop('2026-06-04'))
    expect([item.status, item.dueOn]).toEqual(['open', '2026-06-24'])
  })

  it('a stop that lasts leaves the clock stopped and its date provisional', () => {
    const item = reviewed(stop('2026-06-04'))
    expect([item.status, item.dueOn, item.provisional]).toEqual(['stopped', '2026-06-23', true])
  })

  it('an earlier stop still counts while a later one lasts', () => {
    const item = reviewed(stop('2026-06-04'), resume('2026-06-08'), stop('2026-06-22'))
    expect([item.status, item.dueOn]).toEqual(['stopped', '2026-06-26'])
  })

  it('a stop after the clock ran out does not save it', () => {
    const item = reviewed(stop('2026-06-24'))
    expect([item.status, item.dueOn, item.provisional]).toEqual(['open', '2026-06-23', false])
  })

  it('a stop of named steps leaves the others running', () => {
    expect(reviewed(stop('2026-06-04', ['cure']), resume('2026-06-08')).dueOn).toBe('2026-06-23')
    expect(
      reviewed(stop('2026-06-04', ['initial_review']), resume('2026-06-08', ['initial_review']))
        .dueOn,
    ).toBe('2026-06-26')
  })

  it('a stop without a scope does not hold a clock that begins that day or later', () => {
    const facts = told(filed, on('2026-05-29', 'completeness', 'deficient'), stop('2026-05-29'))
    const cure = itemOf(body, ave, facts, 'cure')
    expect([cure.status, cure.dueOn]).toEqual(['open', '2026-06-12'])
  })

  it('a stop never moves a backward count', () => {
    const facts = told(
      filed,
      complete,
      on('2026-06-12', 'initial_review', 'pass'),
      on('2026-06-15', 'agreement_screens', 'sent'),
      on('2026-06-22', 'sign', 'signed'),
      { kind: 'scheduled', step: 'witness_test', dueOn: '2026-09-18' },
      stop('2026-09-14'),
      resume('2026-09-16'),
    )
    expect(itemOf(body, ave, facts, 'test_notice').dueOn).toBe('2026-09-11')
  })
})

describe('withdrawal and reinstatement', () => {
  const withdrawn = (day: string): Told => ({ kind: 'withdrawn', receivedOn: day })
  const reinstated = (day: string): Told => ({ kind: 'reinstated', receivedOn: day })

  it('a withdrawn request has no running clock, and keeps what was done', () => {
    const { items, standing } = schedule(body, ave, told(filed, complete, withdrawn('2026-06-10')))
    expect(standing).toBe('withdrawn')
    expect(items.some((item) => item.status === 'open' || item.status === 'waiting')).toBe(false)
    expect(items.find((item) => item.step === 'completeness')?.status).toBe('done')
  })

  it('from one to the other is one stop over everything', () => {
    const item = reviewed(withdrawn('2026-06-04'), reinstated('2026-06-08'))
    expect([item.status, item.dueOn]).toEqual(['open', '2026-06-26'])
  })

  it('the later day is the last word, in whatever order they were recorded', () => {
    const facts = told(filed, complete, reinstated('2026-06-08'), withdrawn('2026-06-04'))
    expect(schedule(body, ave, facts).standing).toBe('filed')
  })

  it('a stop called withdrawn in its note is an ordinary stop', () => {
    const stop: Told = { kind: 'stop', receivedOn: '2026-06-04', body: { note: 'withdrawn' } }
    const facts = told(filed, complete, stop, reinstated('2026-06-08'))
    expect(itemOf(body, ave, facts, 'initial_review').status).toBe('stopped')
  })
})
