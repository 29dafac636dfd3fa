import { describe, expect, test } from 'vitest'
import { nextDateWords, titleWithRound } from '@/components/pipeline/clock-text'
import { dcAcWords, megawattWords, owedWords } from '@/components/pipeline/figures'
import { isNarrowed, pipelineFilterOf, sortAddress } from '@/components/pipeline/pipeline-address'

const todayOn = '2026-12-01'
const zone = 'America/Chicago'
const clock = { dueOn: '2026-12-03', dueAt: '2026-12-03T22:00:00.000Z', statedDueOn: null, zone }

describe('the next clock in words', () => {
  test('our count with its closing hour', () => {
    expect(nextDateWords(clock, todayOn)).toBe('Thu 3 Dec, 4 pm CT')
  })

  test('a later date of theirs stands beside our count', () => {
    const words = nextDateWords({ ...clock, statedDueOn: '2026-12-04' }, todayOn)
    expect(words).toBe('Thu 3 Dec, 4 pm CT · they say 4 Dec')
  })

  test('an earlier date of theirs is the one worked to, at the same hour', () => {
    const dates = { statedDueOn: '2026-12-02', dueAt: '2026-12-02T22:00:00.000Z' }
    const words = nextDateWords({ ...clock, ...dates }, todayOn)
    expect(words).toBe('Wed 2 Dec, 4 pm CT · our count is 3 Dec')
  })

  test('the end of a day has no hour, another year is named', () => {
    const endOfDay = { ...clock, dueOn: '2027-01-04', dueAt: '2027-01-05T06:00:00.000Z' }
    expect(nextDateWords(endOfDay, todayOn)).toBe('Mon 4 Jan 2027')
  })

  test('a step that waits has no date, a repeated one has its round', () => {
    expect(nextDateWords({ ...clock, dueOn: null, dueAt: null }, todayOn)).toBe('no date')
    expect(titleWithRound({ title: 'Cure the deficiency', instance: 2 })).toBe(
      'Cure the deficiency, round 2',
    )
  })
})

describe('figures of the pipeline', () => {
  const totals = { open: 12, filed: 11, mwAc: 706.1, owedInTenDays: 6, missed: 1 }

  test('the missed ones among what we owe are named', () => {
    expect(owedWords(totals)).toBe('6, one missed')
    expect(owedWords({ ...totals, missed: 0 })).toBe('6')
    expect(owedWords({ ...totals, owedInTenDays: 14, missed: 12 })).toBe('14, 12 missed')
  })

  test('megawatts keep their decimals, the ratio has two, the unknown is a dash', () => {
    expect([2, 2.75, 1250.5, null].map(megawattWords)).toEqual(['2.0', '2.75', '1,250.5', '—'])
    expect(dcAcWords({ dcMw: 3.5, mwAc: 2.8 })).toBe('1.25')
    expect(dcAcWords({ dcMw: null, mwAc: 2.8 })).toBe('—')
  })
})

describe('the filters in the address', () => {
  test('a part that says nothing known counts as left out', () => {
    const given = {
      standing: 'sideways',
      find: '  mesa ',
      sort: 'mwAc',
      organization: 'x',
      page: '2',
    }
    expect(pipelineFilterOf(given)).toEqual({ find: 'mesa', sort: 'mwAc' })
  })

  test('a column is sorted in its natural order first, then turned; the filters stay', () => {
    const filter = { find: 'mesa' }
    expect(sortAddress(filter, { by: 'mwAc', order: 'asc' })).toBe('/pipeline?find=mesa&sort=mwAc')
    expect(sortAddress({ ...filter, sort: 'mwAc' }, { by: 'mwAc', order: 'asc' })).toBe(
      '/pipeline?find=mesa&sort=mwAc&order=asc',
    )
    expect(sortAddress({ sort: 'project' }, { by: 'project', order: 'desc' })).toBe(
      '/pipeline?sort=project&order=desc',
    )
    expect(sortAddress({ sort: 'project' }, { by: 'next', order: 'asc' })).toBe('/pipeline')
  })

  test('all applications are not fewer than the open ones, a search is', () => {
    expect(isNarrowed({ sort: 'project' })).toBe(false)
    expect(isNarrowed({ standing: 'open' })).toBe(false)
    expect(isNarrowed({ find: 'mesa' })).toBe(true)
  })
})
