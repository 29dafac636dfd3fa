import { describe, expect, test } from 'vitest'
import {
  dueLeft,
  dueLine,
  dueTitle,
  groupedRows,
  inHandWords,
  underDate,
} from '@/components/due/due-text'
import { federalCalendar } from '@/lib/domain/clocks/library-calendars'
import { startStanding } from '@/lib/domain/clocks/standing'
import type { DueRow } from '@/lib/schemas/application'

const todayOn = '2026-12-01'

const row = {
  step: 'facilities_agreement',
  instance: 1,
  obligation: '',
  title: 'Return the facilities study agreement',
  party: 'applicant',
  status: 'open',
  rowKind: 'due',
  group: 'this_week',
  on: '2026-12-03',
  dueOn: '2026-12-03',
  dueAt: '2026-12-03T22:00:00.000Z',
  statedDueOn: null,
  startBy: null,
  zone: 'America/Chicago',
  consequence: { effect: 'withdrawn', say: 'The request is withdrawn.', first: 'Call now.' },
  standing: {
    state: 'running',
    tone: 'soon',
    left: '2 BD',
    businessDays: 2,
    closesInMinutes: null,
  },
  acknowledged: null,
} as unknown as DueRow

const missed = { state: 'missed', tone: 'missed', left: 'missed yesterday' } as DueRow['standing']

describe('the line under what is due', () => {
  test('a missed clock says what follows and what to do first', () => {
    expect(dueLine({ ...row, standing: missed }, todayOn)).toEqual({
      tone: 'missed',
      text: 'The request is withdrawn. Call now.',
    })
  })

  test('a near clock says what a miss leads to', () => {
    expect(dueLine(row, todayOn)).toEqual({
      tone: 'soon',
      text: 'If missed: the request is withdrawn.',
    })
  })

  test('two dates that differ stand with the hour that closes', () => {
    expect(dueLine({ ...row, statedDueOn: '2026-12-04' }, todayOn)?.text).toBe(
      'Closes 4 pm CT. They say 4 Dec. If missed: the request is withdrawn.',
    )
  })

  test('a far clock says nothing, a late one of theirs says how to chase it', () => {
    const far = { ...row.standing, tone: 'far' as const }
    expect(dueLine({ ...row, standing: far }, todayOn)).toBeNull()
    const late = { ...row.standing, state: 'theirs_late' as const, tone: 'theirs' as const }
    expect(dueLine({ ...row, party: 'operator', standing: late }, todayOn)?.tone).toBe('theirs')
  })

  test('a preparation names itself and the clock behind it', () => {
    const start = {
      ...row,
      rowKind: 'start_by' as const,
      title: 'Wire, $206,000',
      on: '2026-12-01',
    }
    expect(dueTitle(start)).toBe('Start: Wire, $206,000')
    expect(dueLine(start, todayOn)?.text).toBe('Due Thu 3 Dec, 4 pm CT.')
    expect(underDate(start, todayOn)).toBe('')
  })

  test('another year stands under the date, before the hour', () => {
    const next = {
      ...row,
      on: '2027-01-04',
      dueOn: '2027-01-04',
      dueAt: '2027-01-04T22:00:00.000Z',
    }
    expect(underDate(next, todayOn)).toBe('2027, 4 pm CT')
  })
})

describe('what a row says of its place', () => {
  test('under "Missed" the figure says only since when', () => {
    expect(dueLeft({ ...row, standing: missed, group: 'missed' })).toBe('yesterday')
  })

  test('a clock in hand says by whom, until when and why, and no longer once the day has come', () => {
    const acknowledged = {
      by: 'Dov Castellane',
      reason: 'written today',
      untilOn: '2026-12-03',
      at: '',
    }
    expect(inHandWords({ ...row, acknowledged }, todayOn)).toBe(
      'Dov Castellane has it in hand until Thu 3 Dec: written today',
    )
    expect(inHandWords({ ...row, acknowledged }, '2026-12-03')).toBeNull()
  })

  test('headings stand in reading order, without empty ones', () => {
    const rows = [
      { ...row, group: 'later' as const },
      { ...row, group: 'missed' as const },
    ]
    expect(groupedRows(rows, 'mine').map(({ heading }) => heading)).toEqual(['Missed', 'Later'])
    expect(groupedRows(rows, 'theirs')[0]?.heading).toBe('They are late')
  })
})

describe('the day a preparation must begin', () => {
  const nowAt = '2026-12-01T18:00:00.000Z'
  const of = (startBy: string) => startStanding(startBy, row.zone, nowAt, federalCalendar)

  test('it is near or far by business days, as a due date is', () => {
    expect(of('2026-12-03')).toMatchObject({ tone: 'soon', left: '2 BD' })
    expect(of('2026-12-01').left).toBe('today')
    expect(of('2027-01-04').tone).toBe('far')
  })

  test('a late start is near, never missed: 24 November is four business days back over Thanksgiving', () => {
    expect(of('2026-11-24')).toMatchObject({ state: 'running', tone: 'soon', left: '4 BD late' })
  })
})
