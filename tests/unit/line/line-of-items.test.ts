import { describe, expect, it } from 'vitest'
import { midSentence, runningClockOf, type ClockSource } from '@/components/line/clock-of-items'
import { lineModelOf, lineStateOf, workingDueOf } from '@/components/line/line-of-items'

const todayOn = '2026-12-01'

function item(over: Partial<ClockSource>): ClockSource {
  return {
    step: 'cure',
    instance: 1,
    obligation: '',
    title: 'Cure the deficiency',
    short: 'Deficiency cured',
    party: 'applicant',
    kind: 'normal',
    onLine: true,
    status: 'open',
    startOn: '2026-11-10',
    dueOn: '2026-12-10',
    dueAt: '2026-12-11T00:00:00.000Z',
    statedDueOn: null,
    startBy: null,
    doneOn: null,
    doneLate: null,
    provisional: false,
    moneyHeldMinor: null,
    consequence: { say: 'The request is withdrawn.' },
    derivation: [
      { kind: 'start', on: '2026-11-10', text: 'Starts from: Notice, received Tue 10 Nov 2026.' },
      {
        kind: 'count',
        on: '2026-12-10',
        text: '30 calendar days, calendar of Ambrel: Thu 10 Dec 2026.',
      },
    ],
    standing: { state: 'running', tone: 'soon', left: '7 BD', businessDays: 7 },
    ...over,
  }
}

describe('the step line of an application', () => {
  it('draws steps on the line and leaves out parts and steps off it', () => {
    const items = [
      item({}),
      item({ obligation: 'deposit' }),
      item({ step: 'other', onLine: false }),
    ]
    expect(lineModelOf(items, todayOn).steps.map((step) => step.key)).toEqual(['cure'])
  })

  it('leaves out what a later step overtook without a record of its own', () => {
    expect(lineModelOf([item({ status: 'closed' })], todayOn).steps).toEqual([])
  })

  it('hangs the parts of a gate between its bars, closed where done or waived', () => {
    const items = [
      item({ step: 'gate', kind: 'gate' }),
      item({ step: 'gate', obligation: 'deposit', title: 'Deposit', status: 'waived' }),
      item({ step: 'gate', obligation: 'site', title: 'Site control' }),
      item({ step: 'gate', instance: 2, obligation: 'site', title: 'Another round' }),
    ]
    expect(lineModelOf(items, todayOn).steps[0]?.obligations).toEqual([
      { title: 'Deposit', done: true },
      { title: 'Site control', done: false },
    ])
  })

  it('numbers every round of a step that has a second one', () => {
    const steps = lineModelOf([item({}), item({ instance: 2 })], todayOn).steps
    expect(steps.map((step) => [step.instance, step.repeated])).toEqual([
      [1, true],
      [2, true],
    ])
  })

  it.each([
    ['done', { status: 'done', doneOn: '2026-02-18' }, '18 Feb'],
    ['done late', { status: 'done', doneOn: '2026-02-18', doneLate: true }, '18 Feb, late'],
    ['waived', { status: 'waived', doneOn: '2026-02-18' }, '18 Feb, waived'],
    ['running', {}, 'due 10 Dec'],
    ['provisional', { status: 'waiting', provisional: true }, '10 Dec, provisional'],
    ['stated earlier', { statedDueOn: '2026-12-04' }, 'due 4 Dec'],
    ['in another year', { dueOn: '2027-01-04' }, 'due 4 Jan 2027'],
  ] as const)('words the date of a step that is %s', (_name, over, label) => {
    expect(lineModelOf([item(over)], todayOn).steps[0]?.onLabel).toBe(label)
  })

  it('gives the flag to what we missed, never to what they owe', () => {
    const standing = { tone: 'theirs', left: 'theirs, 11 BD over', businessDays: -11 }
    const late = item({ party: 'operator', standing: { ...standing, state: 'theirs_late' } })
    const missed = item({ standing: { ...standing, state: 'missed' } })
    expect(lineStateOf(late)).toBe('running')
    expect(lineStateOf(missed)).toBe('missed')
    expect(lineModelOf([late], todayOn).steps[0]?.onLabel).toBe('due 10 Dec, 11 BD over')
  })

  it('works to the earlier of our count and the stated date', () => {
    expect(workingDueOf({ dueOn: '2026-12-10', statedDueOn: '2026-12-04' })).toBe('2026-12-04')
    expect(workingDueOf({ dueOn: null, statedDueOn: '2026-12-04' })).toBe('2026-12-04')
    expect(workingDueOf({ dueOn: null, statedDueOn: null })).toBeNull()
  })
})

describe('the running clock in words', () => {
  it('says length, from what, and the days left in its own unit', () => {
    const clock = runningClockOf([item({})], todayOn)
    expect(clock).toMatchObject({
      fromOn: '2026-11-10',
      toOn: '2026-12-10',
      label: '30 calendar days from receipt, 9 left',
      note: 'missed: the request is withdrawn',
      tone: 'soon',
    })
  })

  it('names the day a wire must start for an open deposit', () => {
    const deposit = item({ obligation: 'deposit', startBy: '2026-12-03', moneyHeldMinor: 0 })
    expect(runningClockOf([item({}), deposit], todayOn)?.note).toBe(
      'missed: the request is withdrawn · start the wire by Thu 3 Dec',
    )
    const paid = { ...deposit, status: 'done' }
    expect(runningClockOf([item({}), paid], todayOn)?.note).toBe('missed: the request is withdrawn')
  })

  it('takes ours before theirs, however early theirs is', () => {
    const theirs = item({
      step: 'review',
      party: 'operator',
      dueOn: '2026-12-02',
      dueAt: '2026-12-03T00:00:00.000Z',
    })
    expect(runningClockOf([theirs, item({})], todayOn)?.toOn).toBe('2026-12-10')
    expect(runningClockOf([theirs], todayOn)?.toOn).toBe('2026-12-02')
  })

  it('says that a clock was extended once it runs past its count', () => {
    const extended = item({ dueOn: '2026-12-18' })
    expect(runningClockOf([extended], todayOn)?.label).toBe('30 calendar days, extended, 17 left')
  })

  it('draws what is left of a count back from a booked day, and names that day', () => {
    const derivation = [
      { kind: 'start', text: 'Starts from: Sign, received Thu 26 Feb 2026.' },
      { kind: 'start', text: 'Witness test, booked for Fri 18 Dec 2026.' },
      { kind: 'count', on: '2026-12-10', text: 'At least 5 business days before, calendar of X.' },
    ]
    expect(runningClockOf([item({ derivation, startOn: '2026-02-26' })], todayOn)).toMatchObject({
      fromOn: todayOn,
      label: 'at least 5 business days before the witness test, 7 left',
    })
  })

  it('draws none where nothing dated runs', () => {
    expect(runningClockOf([item({ status: 'done' })], todayOn)).toBeUndefined()
    expect(runningClockOf([item({ dueOn: null, dueAt: null })], todayOn)).toBeUndefined()
  })

  it('keeps a name in capitals when a sentence follows a colon', () => {
    expect(midSentence('FERC is told.')).toBe('FERC is told')
    expect(midSentence('The request is withdrawn.')).toBe('the request is withdrawn')
  })
})
