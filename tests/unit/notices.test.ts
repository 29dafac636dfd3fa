import { describe, expect, it } from 'vitest'
import { businessCalendar } from '@/lib/domain/clocks/calendar'
import { federalCalendar } from '@/lib/domain/clocks/library-calendars'
import { pauseAfterAttempt } from '@/lib/domain/delivery'
import {
  ladderOf,
  rungsDue,
  type NoticedObligation,
  type NoticedPerson,
} from '@/lib/domain/notices'
import { nextDateRange, obligationKey, obligationOfKey, workingDue } from '@/lib/domain/obligations'

// Ladders are common practice, no source; expected days are counted by hand on the federal calendar.

const zone = 'America/Denver'
const calendar = federalCalendar

/** Due Thursday 10 December 2026 at 5 pm in Denver (UTC−7), a clock of 30 days. */
const cure: NoticedObligation = {
  party: 'applicant',
  effect: 'withdrawn',
  ownerRole: 'developer',
  startOn: '2026-11-10',
  startBy: null,
  dueOn: '2026-12-10',
  dueAt: '2026-12-11T00:00:00Z',
}

const people: NoticedPerson[] = [
  { id: 'dev', roles: ['developer'] },
  { id: 'eng', roles: ['engineer'] },
  { id: 'lia', roles: ['liaison'] },
  { id: 'exe', roles: ['executive'] },
  { id: 'adm', roles: ['administrator'] },
]

const ladder = (change: Partial<NoticedObligation> = {}, today = '2026-12-01') =>
  ladderOf({ obligation: { ...cure, ...change }, zone, calendar }, today)

const dueAt = (now: string, change: Partial<Parameters<typeof rungsDue>[0]> = {}) =>
  rungsDue({ obligation: cure, zone, calendar, people, now: new Date(now), ...change })

const keysAt = (now: string, change: Partial<Parameters<typeof rungsDue>[0]> = {}) =>
  dueAt(now, change).map((rung) => rung.key)

describe('the ladder of a clock that can lose the request', () => {
  it('rungs stand 10, 5, 2 and 1 business days ahead, on the day, before the closing hour and after it', () => {
    expect(ladder().map(({ key, at }) => [key, new Date(at).toISOString()])).toEqual([
      // Thanksgiving, 26 November, is no business day: ten back from 10 December is 25 November.
      ['ahead-10', '2026-11-25T15:00:00.000Z'],
      ['ahead-5', '2026-12-03T15:00:00.000Z'],
      ['ahead-2', '2026-12-08T15:00:00.000Z'],
      ['ahead-1', '2026-12-09T15:00:00.000Z'],
      ['today', '2026-12-10T15:00:00.000Z'],
      ['closing', '2026-12-10T22:00:00.000Z'],
      ['missed', '2026-12-11T00:01:00.000Z'],
    ])
  })

  it.each([
    ['a cure of five business days', '2026-12-03', ['ahead-2', 'ahead-1']],
    ['a clock of one business day', '2026-12-09', []],
    [
      'a clock of four months',
      '2026-08-10',
      ['ahead-30', 'ahead-10', 'ahead-5', 'ahead-2', 'ahead-1'],
    ],
    ['a clock without a start', null, ['ahead-10', 'ahead-5', 'ahead-2', 'ahead-1']],
  ])('%s has only the rungs that lie inside its life', (_, startOn, ahead) => {
    expect(ladder({ startOn }).map((rung) => rung.key)).toEqual([
      ...ahead,
      'today',
      'closing',
      'missed',
    ])
  })

  it('a clock that starts and ends on one day has no morning rung before it began', () => {
    expect(ladder({ startOn: '2026-12-10' }).map((rung) => rung.key)).toEqual(['closing', 'missed'])
  })

  it('a step with a lead time has a rung on the day to start', () => {
    expect(ladder({ startBy: '2026-11-18' })[0]).toMatchObject({
      key: 'start',
      at: expect.stringContaining('2026-11-18'),
    })
  })

  it('an organization that closes later on another calendar moves the rungs by its own days', () => {
    const closed = businessCalendar('Office closed 8 and 9 December', {
      ...calendar.rules,
      closures: ['2026-12-08', '2026-12-09'].map((on) => ({ on, name: 'closed' })),
    })
    const rungs = ladderOf({ obligation: cure, zone, calendar: closed }, '2026-12-01')
    expect(rungs.find((rung) => rung.key === 'ahead-1')?.at).toContain('2026-12-07')
  })

  it('rungs keep to 8 in the morning across a change to summer time', () => {
    const spring = { startOn: '2027-02-01', dueOn: '2027-03-16', dueAt: '2027-03-16T23:00:00Z' }
    const at = new Map(ladder(spring).map((rung) => [rung.key, rung.at]))
    expect(new Date(at.get('ahead-5')!).toISOString()).toBe('2027-03-09T15:00:00.000Z')
    expect(new Date(at.get('ahead-1')!).toISOString()).toBe('2027-03-15T14:00:00.000Z')
  })
})

describe('which rung is due', () => {
  it.each([
    ['before the first rung', '2026-11-25T14:59:59Z', []],
    ['at the first rung', '2026-11-25T15:00:00Z', ['ahead-10']],
    ['between two rungs the earlier', '2026-12-04T20:00:00Z', ['ahead-5']],
    ['in the last minute', '2026-12-10T23:59:59Z', ['closing']],
    ['at the closing instant, which is still in time', '2026-12-11T00:00:00Z', ['closing']],
    ['a minute later', '2026-12-11T00:01:00Z', ['missed']],
    ['weeks later still the last', '2027-01-20T00:00:00Z', ['missed']],
  ])('%s', (_, now, keys) => {
    expect(keysAt(now)).toEqual(keys)
  })

  it('rungs whose time passed while nothing ran give way to the latest', () => {
    expect(keysAt('2026-12-09T16:00:00Z')).toEqual(['ahead-1'])
  })

  it('a clock that only tracks is quiet until two business days before', () => {
    const obligation = { ...cure, effect: 'track' as const }
    expect(keysAt('2026-12-04T20:00:00Z', { obligation })).toEqual([])
    expect(keysAt('2026-12-08T20:00:00Z', { obligation })).toEqual(['ahead-2'])
  })
})

describe('an acknowledged clock', () => {
  const acknowledgedUntil = '2026-12-09'

  it.each(['2026-12-03T15:00:00Z', '2026-12-08T15:00:00Z', '2026-12-09T06:59:59Z'])(
    'is silent before its next date: %s',
    (now) => expect(keysAt(now, { acknowledgedUntil })).toEqual([]),
  )

  it('is told on its next date, and climbs on from there', () => {
    const quiet = { acknowledgedUntil: '2026-12-07' }
    expect(keysAt('2026-12-07T15:00:00Z', quiet)).toEqual(['until-2026-12-07'])
    expect(keysAt('2026-12-08T15:00:00Z', quiet)).toEqual(['ahead-2'])
  })

  it.each([
    [
      'ahead of the due date: to the due date',
      '2026-12-01',
      { from: '2026-12-02', to: '2026-12-10' },
    ],
    [
      'on the due date or past it: thirty days',
      '2026-12-10',
      { from: '2026-12-11', to: '2027-01-09' },
    ],
  ])('may be silent %s', (_, today, range) => {
    expect(nextDateRange('2026-12-10', today)).toEqual(range)
  })
})

describe('what the utility owes', () => {
  const obligation: NoticedObligation = {
    ...cure,
    party: 'operator',
    effect: 'track',
    ownerRole: null,
    dueOn: '2026-12-04',
  }
  it.each([
    ['on its due date nothing', '2026-12-04T20:00:00Z', []],
    ['on the weekend after nothing', '2026-12-06T20:00:00Z', []],
    ['on the business day after', '2026-12-07T15:00:00Z', ['theirs-late-1']],
    ['four business days later still the first', '2026-12-11T20:00:00Z', ['theirs-late-1']],
    ['five business days later the next', '2026-12-14T15:00:00Z', ['theirs-late-2']],
    // Christmas and New Year's Day do not count: 7, 14, 21, 29 December, 6 January.
    ['holidays push a chase on', '2027-01-05T20:00:00Z', ['theirs-late-4']],
    ['and on', '2027-01-06T15:00:00Z', ['theirs-late-5']],
  ])('is chased %s', (_, now, keys) => {
    expect(keysAt(now, { obligation })).toEqual(keys)
  })

  it('is chased by the liaison unless a person is named', () => {
    const at = '2026-12-07T15:00:00Z'
    expect(dueAt(at, { obligation })[0]?.personIds).toEqual(['lia'])
    expect(dueAt(at, { obligation, assignedId: 'eng' })[0]?.personIds).toEqual(['eng'])
  })
})

describe('who hears it', () => {
  const early = '2026-12-03T15:00:00Z'
  it.each([
    ['the assigned person', { assignedId: 'eng' }, ['eng']],
    ['else those of the owner role', {}, ['dev']],
    ['an assigned person who has left counts as none', { assignedId: 'gone' }, ['dev']],
    [
      'developers where nobody has the owner role',
      { obligation: { ...cure, ownerRole: 'executive' as const }, people: people.slice(0, 3) },
      ['dev'],
    ],
    ['administrators where nobody else is there', { people: people.slice(4) }, ['adm']],
    ['nobody where there is nobody', { people: [] }, undefined],
  ])('%s', (_, change, ids) => {
    expect(dueAt(early, change)[0]?.personIds).toEqual(ids)
  })

  it('developers and executives too, from one business day before a request can be lost', () => {
    const assignedId = 'eng'
    expect(dueAt('2026-12-08T15:00:00Z', { assignedId })[0]?.personIds).toEqual(['eng'])
    expect(dueAt('2026-12-09T15:00:00Z', { assignedId })[0]?.personIds).toEqual([
      'eng',
      'dev',
      'exe',
    ])
  })

  it('no one else where a miss costs less than the request', () => {
    const obligation = { ...cure, effect: 'cure' as const }
    expect(dueAt('2026-12-11T15:00:00Z', { obligation, assignedId: 'eng' })[0]?.personIds).toEqual([
      'eng',
    ])
  })
})

it('an obligation is found again from its key', () => {
  const of = {
    subjectKind: 'application',
    subjectId: 'a-1',
    step: 's',
    instance: 2,
    obligation: '',
  }
  expect(obligationOfKey(obligationKey(of))).toEqual(of)
  expect(() => obligationOfKey('application/a-1')).toThrow(/the key of an obligation is needed/)
})

describe('the date to work to', () => {
  const dueAt = '2026-12-09T00:00:00.000Z'
  it.each([
    ['is the counted one where no other is stated', '2026-12-10', null, '2026-12-10'],
    ['stays the counted one where a later is stated', '2026-12-10', '2026-12-14', '2026-12-10'],
    ['is an earlier stated one', '2026-12-10', '2026-12-08', '2026-12-08'],
    ['is a stated one where none can be counted', null, '2026-12-08', '2026-12-08'],
  ])('%s, with the closing that the schedule gave', (_, dueOn, statedDueOn, works) => {
    expect(workingDue({ dueOn, dueAt, statedDueOn })).toEqual({ dueOn: works, dueAt })
  })

  it('is none where neither is known', () => {
    expect(workingDue({ dueOn: null, dueAt: null, statedDueOn: null })).toBeNull()
  })
})

it('the pause after a failed attempt doubles, up to a quarter of an hour', () => {
  const pauses = [1, 2, 3, 6, 7, 100].map(pauseAfterAttempt)
  expect(pauses).toEqual([15, 30, 60, 480, 900, 900])
})
