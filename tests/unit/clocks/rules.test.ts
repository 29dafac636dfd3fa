import { describe, expect, it } from 'vitest'
import { federalFastTrack } from '@/lib/domain/clocks/library/fast-track'
import { federalStudyProcess } from '@/lib/domain/clocks/library/study-process'
import type { Step } from '@/lib/domain/clocks/procedure'
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

describe('an extension', () => {
  const extension = (more: Told): Told => ({ kind: 'extension', step: 'initial_review', ...more })
  it.each([
    [
      'asked for moves nothing',
      extension({ body: { decision: 'asked', lengthDays: 5 } }),
      '2026-06-23',
    ],
    [
      'refused moves nothing',
      extension({ dueOn: '2026-07-10', body: { decision: 'refused' } }),
      '2026-06-23',
    ],
    [
      'to a date ends on that date',
      extension({ dueOn: '2026-07-10', body: { decision: 'granted' } }),
      '2026-07-10',
    ],
    [
      'to an earlier date leaves the later one',
      extension({ dueOn: '2026-06-10', body: { decision: 'granted' } }),
      '2026-06-23',
    ],
    [
      'by business days counts from the date it extends',
      extension({ body: { decision: 'granted', lengthDays: 10 } }),
      '2026-07-08',
    ],
    [
      'by calendar days too',
      extension({ body: { decision: 'granted', lengthDays: 10, unit: 'calendar_day' } }),
      '2026-07-03',
    ],
  ])('%s', (_, fact, dueOn) => {
    expect(reviewed(fact).dueOn).toBe(dueOn)
  })

  it('a second one counts from the end of the first', () => {
    const five = extension({ body: { decision: 'granted', lengthDays: 5 } })
    expect(reviewed(five, five).dueOn).toBe('2026-07-08')
  })

  it('gives a date to a step that has no clock', () => {
    const facts = told(
      filed,
      complete,
      on('2026-06-12', 'initial_review', 'fail'),
      on('2026-06-15', 'options', 'modifications'),
      {
        kind: 'extension',
        step: 'accept_modifications',
        dueOn: '2026-07-01',
        body: { decision: 'granted' },
      },
    )
    expect(itemOf(body, ave, facts, 'accept_modifications').dueOn).toBe('2026-07-01')
  })
})

describe('a date that the utility states', () => {
  const stated = (dueOn: string): Told => ({ kind: 'stated', step: 'initial_review', dueOn })
  it('stands beside our count; the earlier of both closes', () => {
    const earlier = reviewed(stated('2026-06-22'))
    expect([earlier.dueOn, earlier.statedDueOn, earlier.dueAt]).toEqual([
      '2026-06-23',
      '2026-06-22',
      '2026-06-23T06:00:00.000Z',
    ])
    expect(reviewed(stated('2026-06-25')).dueAt).toBe('2026-06-24T06:00:00.000Z')
  })

  it('is kept for a step that has not begun', () => {
    const facts = told(filed, { kind: 'stated', step: 'sign', dueOn: '2026-12-04' })
    const sign = itemOf(body, ave, facts, 'sign')
    expect([sign.status, sign.statedDueOn]).toEqual(['waiting', '2026-12-04'])
  })
})

describe('a request taken over under way', () => {
  const before = (step: string, more: Told = {}): Told => ({ kind: 'taken_over', step, ...more })
  const running = before('accept_supplemental', {
    dueOn: '2026-06-23',
    body: { sinceOn: '2026-06-01' },
  })

  it('has its running step since and due as entered', () => {
    const item = itemOf(body, ave, told(before('file'), running), 'accept_supplemental')
    expect([item.status, item.startOn, item.dueOn, item.provisional]).toEqual([
      'open',
      '2026-06-01',
      '2026-06-23',
      false,
    ])
  })

  it('counts a later stop on the date entered, in the days of its clock', () => {
    const facts = told(
      before('file'),
      running,
      { kind: 'stop', receivedOn: '2026-06-04' },
      { kind: 'resume', receivedOn: '2026-06-08' },
    )
    expect(itemOf(body, ave, facts, 'accept_supplemental').dueOn).toBe('2026-06-26')
  })

  it('extends the date entered', () => {
    const facts = told(running, {
      kind: 'extension',
      step: 'accept_supplemental',
      body: { decision: 'granted', lengthDays: 2 },
    })
    expect(itemOf(body, ave, facts, 'accept_supplemental').dueOn).toBe('2026-06-25')
  })

  it('a step taken over as done went the usual way, with or without a day', () => {
    const facts = told(before('file'), before('completeness'))
    expect(itemOf(body, ave, facts, 'completeness').outcome).toBe('complete')
    const review = itemOf(body, ave, facts, 'initial_review')
    expect([review.status, review.startOn, review.dueOn]).toEqual(['open', null, null])
    const dated = told(before('file'), before('completeness', { receivedOn: '2026-06-01' }))
    expect(itemOf(body, ave, dated, 'initial_review').dueOn).toBe('2026-06-23')
  })
})

describe('a waived step', () => {
  it('counts as its usual outcome, and starts what follows', () => {
    const studies = federalStudyProcess()
    const facts = told(filed, complete, {
      kind: 'waived',
      step: 'scoping',
      receivedOn: '2026-06-03',
    })
    const scoping = itemOf(studies, ave, facts, 'scoping')
    expect([scoping.status, scoping.outcome, scoping.doneOn]).toEqual([
      'waived',
      'held',
      '2026-06-03',
    ])
    expect(itemOf(studies, ave, facts, 'study_tender').dueOn).toBe('2026-06-10')
  })

  it('of a test counts as passed', () => {
    const facts = told(
      filed,
      complete,
      on('2026-06-12', 'initial_review', 'pass'),
      on('2026-06-15', 'agreement_screens', 'sent'),
      on('2026-06-22', 'sign', 'signed'),
      on('2026-07-01', 'test_notice', 'given'),
      { kind: 'waived', step: 'witness_test', receivedOn: '2026-07-10' },
    )
    expect(itemOf(body, ave, facts, 'authorization').status).toBe('open')
  })
})

describe('a presumed outcome', () => {
  const cured = [
    filed,
    on('2026-05-29', 'completeness', 'deficient'),
    on('2026-06-05', 'cure', 'supplied'),
  ]
  it('is shown as presumed, and what follows is provisional until a person confirms it', () => {
    const presumed = itemOf(body, ave, told(...cured), 'completeness', 2)
    expect([presumed.status, presumed.outcome]).toEqual(['open', 'complete'])
    expect(say(presumed)).toContain('until a person confirms')
    expect(itemOf(body, ave, told(...cured), 'initial_review').provisional).toBe(true)
    const confirmed = told(...cured, on('2026-06-05', 'completeness', 'complete', { instance: 2 }))
    expect(itemOf(body, ave, confirmed, 'initial_review').provisional).toBe(false)
  })

  it('gives way to a second deficiency', () => {
    const facts = told(...cured, on('2026-06-12', 'completeness', 'deficient', { instance: 2 }))
    expect(itemOf(body, ave, facts, 'cure', 2).dueOn).toBe('2026-06-29')
    expect(itemOf(body, ave, facts, 'initial_review').status).toBe('waiting')
  })
})

describe('a booked day', () => {
  it('starts a provisional clock until the meeting is held, which then decides', () => {
    const studies = federalStudyProcess()
    const booked = told(filed, complete, {
      kind: 'scheduled',
      step: 'scoping',
      dueOn: '2026-06-10',
    })
    const ahead = itemOf(studies, ave, booked, 'study_tender')
    expect([ahead.dueOn, ahead.provisional]).toEqual(['2026-06-17', true])
    const held = told(
      filed,
      complete,
      { kind: 'scheduled', step: 'scoping', dueOn: '2026-06-10' },
      on('2026-06-11', 'scoping', 'held'),
    )
    const begun = itemOf(studies, ave, held, 'study_tender')
    expect([begun.dueOn, begun.provisional]).toEqual(['2026-06-18', false])
  })
})

describe('a step that may come any time', () => {
  const invoices: Told[] = [
    on('2026-07-01', 'supplemental_account', 'invoice'),
    on('2026-08-03', 'supplemental_account', 'refund', { instance: 2 }),
    on('2026-09-01', 'supplemental_account', 'invoice', { instance: 3 }),
  ]
  const facts = told(filed, ...invoices, on('2026-07-20', 'supplemental_invoice', 'paid'))
  it('has no item before it is recorded', () => {
    const { items } = schedule(body, ave, told(filed))
    expect(
      items.some(
        (item) => item.step === 'supplemental_account' || item.step === 'supplemental_invoice',
      ),
    ).toBe(false)
  })

  it('has a numbered round for each record, and what follows one for each', () => {
    expect(schedule(body, ave, facts).stranded).toEqual([])
    expect(itemOf(body, ave, facts, 'supplemental_invoice', 1).doneLate).toBe(false)
    expect(itemOf(body, ave, facts, 'supplemental_invoice', 2).status).toBe('not_needed')
    expect(itemOf(body, ave, facts, 'supplemental_refund', 2).dueOn).toBe('2026-08-31')
    expect(itemOf(body, ave, facts, 'supplemental_invoice', 3).dueOn).toBe('2026-09-30')
  })

  it('does not decide the stage of the request', () => {
    expect(
      schedule(body, ave, told(filed, complete, on('2026-06-02', 'dispute_notice', 'given'))).stage,
    ).toBe('Screens')
  })
})

describe('the parts of a step', () => {
  const step = (kind: Step['kind']): Step[] =>
    body.steps.map((one) => (one.key === 'file' ? { ...one, kind } : one))
  const parts: Told[] = [
    on('2026-05-11', 'file', undefined, { obligation: 'form' }),
    on('2026-05-12', 'file', undefined, { obligation: 'land' }),
    on('2026-05-13', 'file', undefined, { obligation: 'fee', amountMinor: 30_000 }),
    on('2026-05-15', 'file', undefined, { obligation: 'fee', amountMinor: 20_000 }),
  ]
  const fileAs = (kind: Step['kind'], facts: Told[]) =>
    itemOf({ ...body, steps: step(kind) }, ave, told(...facts), 'file')

  it('close a gate with the last of them', () => {
    const gate = fileAs('gate', parts)
    expect([gate.status, gate.doneOn]).toEqual(['done', '2026-05-15'])
    expect(fileAs('gate', parts.slice(0, 3)).status).toBe('open')
  })

  it('do not file a request that nobody sent', () => {
    expect(fileAs('normal', parts).status).toBe('open')
  })
})

describe('the end of a clock', () => {
  const withClock = (more: Partial<Step['clocks'][number]>) => ({
    ...body,
    steps: body.steps.map((one) =>
      one.key === 'initial_review' ? { ...one, clocks: [{ ...one.clocks[0]!, ...more }] } : one,
    ),
  })
  const due = (more: Partial<Step['clocks'][number]>, ...facts: Told[]) =>
    itemOf(withClock(more), ave, told(filed, complete, ...facts), 'initial_review')

  it('is never after the event it must not pass, nor is an extension', () => {
    const cap = { neverAfter: { step: 'dispute_notice' } }
    const closes = on('2026-06-19', 'dispute_notice', 'given')
    const item = due(cap, closes, {
      kind: 'extension',
      step: 'initial_review',
      dueOn: '2026-07-10',
      body: { decision: 'granted' },
    })
    expect(item.dueOn).toBe('2026-06-19')
    expect(say(item)).toContain('Earlier of')
  })

  it('is never after the date due of what has not come yet, and then provisional', () => {
    const item = due({ neverAfter: { step: 'acknowledge' } })
    expect([item.dueOn, item.provisional]).toEqual(['2026-05-21', true])
  })

  it('is not before a date it has to wait for', () => {
    expect(
      due({ notBefore: { step: 'dispute_notice' } }, on('2026-07-06', 'dispute_notice', 'given'))
        .dueOn,
    ).toBe('2026-07-06')
  })

  it('is provisional while an alternative before it is not decided', () => {
    const clocks: Step['clocks'] = [
      { when: { term: 'requestedMw', op: '>', value: 5 }, length: 30, unit: 'business_day' },
      { length: 15, unit: 'business_day' },
    ]
    const either = {
      ...body,
      steps: body.steps.map((one) => (one.key === 'initial_review' ? { ...one, clocks } : one)),
    }
    const asked = (...facts: Told[]) =>
      itemOf(either, ave, told(filed, complete, ...facts), 'initial_review')
    expect([asked().dueOn, asked().provisional]).toEqual(['2026-06-23', true])
    const large = asked({ kind: 'changed', body: { terms: { requestedMw: 8 } } })
    expect([large.dueOn, large.provisional]).toEqual(['2026-07-15', false])
  })

  it('goes by the calendar and the hour of whom it is sent to', () => {
    const parties = { ...ave, affected_system: { ...partiesOf('tfec').operator } }
    const steps = body.steps.map((one) =>
      one.key === 'accept_supplemental' ? { ...one, to: 'affected_system' as const } : one,
    )
    const facts = told(
      filed,
      complete,
      on('2026-06-12', 'initial_review', 'fail'),
      on('2026-06-15', 'options', 'supplemental'),
    )
    const item = itemOf({ ...body, steps }, parties, facts, 'accept_supplemental')
    expect([item.dueOn, item.dueAt, item.zone]).toEqual([
      '2026-07-06',
      '2026-07-06T21:00:00.000Z',
      'America/Chicago',
    ])
  })
})
