import { describe, expect, it } from 'vitest'
import { codExtension } from '@/lib/domain/clocks/cod-extension'
import { attachedProcedures } from '@/lib/domain/clocks/library/all'
import {
  modificationDetermination,
  suspension,
  technologyChange,
} from '@/lib/domain/clocks/library/attached'
import { operatorPhases } from '@/lib/domain/clocks/library/operator-phases'
import { stateThreeLevels } from '@/lib/domain/clocks/library/state-levels'
import type { ProcedureBody } from '@/lib/domain/clocks/procedure'
import { schedule } from '@/lib/domain/clocks/schedule'
import { validateProcedure } from '@/lib/domain/clocks/validate'
import { itemOf, on, partiesOf, told, type Told } from './told'

const ave = partiesOf('ave')
const dml = partiesOf('dml')
const status = (body: ProcedureBody, facts: Told[], step: string) =>
  itemOf(body, dml, told(...facts), step).status

describe('a state procedure in three levels', () => {
  const body = stateThreeLevels()
  const complete = [
    on('2026-10-05', 'file', 'filed'),
    on('2026-10-19', 'completeness', 'complete', { sentOn: '2026-10-19' }),
  ]
  const levelled = (key: string) => [...complete, on('2026-10-19', 'level', key)]

  it.each([
    ['level_1', ['level_one_review'], ['level_two_review', 'supplemental']],
    ['level_2', ['level_two_review'], ['level_one_review']],
    ['level_3', ['scoping'], ['level_one_review', 'level_two_review']],
  ])('at %s only its own steps run', (level, open, unneeded) => {
    expect(open.map((step) => status(body, levelled(level), step))).toEqual(open.map(() => 'open'))
    expect(unneeded.map((step) => status(body, levelled(level), step))).toEqual(
      unneeded.map(() => 'not_needed'),
    )
  })

  it('whether a study is needed stays open until the review at level 1 is given', () => {
    expect(status(body, levelled('level_1'), 'scoping')).toBe('waiting')
    const passed = [...levelled('level_1'), on('2026-11-02', 'level_one_review', 'pass')]
    expect(status(body, passed, 'scoping')).toBe('not_needed')
  })

  it('a review at level 1 has 15 business days from the notice that the request is complete', () => {
    // Closed in between: 11 November. 20 October is day 1.
    const item = itemOf(body, dml, told(...levelled('level_1')), 'level_one_review')
    expect(item.dueOn).toBe('2026-11-09')
  })

  it('what level 2 does not pass is studied, with 10 business days from that day to scoping', () => {
    const failed = [...levelled('level_2'), on('2026-11-06', 'level_two_review', 'level_3')]
    const scoping = itemOf(body, dml, told(...failed), 'scoping')
    expect([scoping.status, scoping.dueOn]).toEqual(['open', '2026-11-23'])
  })

  it('a pass brings the agreement, and no study is needed', () => {
    const passed = [...levelled('level_2'), on('2026-11-06', 'level_two_review', 'pass')]
    expect(itemOf(body, dml, told(...passed), 'agreement').dueOn).toBe('2026-11-16')
    expect(status(body, passed, 'impact_report')).toBe('not_needed')
  })

  it('a supplemental review that is not accepted in time falls to level 3', () => {
    const offered = [...levelled('level_2'), on('2026-11-06', 'level_two_review', 'supplemental')]
    const item = itemOf(body, dml, told(...offered), 'supplemental')
    // Closed in between: 11, 26 and 27 November. 9 November is day 1, 30 November day 13.
    expect([item.dueOn, item.consequence.effect]).toEqual(['2026-12-02', 'track'])
  })
})

describe('an operator process in phases', () => {
  const body = operatorPhases()
  it('each decision point asks a higher total of what is assigned by then', () => {
    const facts = told(
      { kind: 'changed', body: { terms: { requestedMw: 100 } } },
      on('2026-01-05', 'window_open', 'opened'),
      { step: 'file', obligation: 'readiness', receivedOn: '2026-02-02', amountMinor: 30_000_000 },
      on('2026-02-02', 'file', 'filed'),
      on('2026-03-06', 'window_close', 'closed'),
      on('2026-07-06', 'phase_1_report', 'issued'),
      {
        kind: 'changed',
        receivedOn: '2026-07-06',
        body: { terms: { assignedCostMinor: 500_000_000, assignedBy: 'cluster_study' } },
      },
    )
    const deposit = itemOf(body, ave, facts, 'decision_1', 1, 'deposit')
    expect([deposit.dueOn, deposit.moneyTargetMinor, deposit.moneyHeldMinor]).toEqual([
      '2026-08-05',
      50_000_000,
      30_000_000,
    ])
  })

  it('takes as many phases as it is given', () => {
    const two = operatorPhases({
      phases: [
        { studyDays: 90, decisionDays: 20, percent: 5 },
        { studyDays: 120, decisionDays: 20, percent: 15 },
      ],
    })
    expect(validateProcedure(two)).toEqual([])
    expect(two.steps.filter((step) => step.kind === 'gate').map((step) => step.key)).toEqual([
      'decision_1',
      'decision_2',
      'sign',
    ])
  })
})

describe('a procedure attached to a request', () => {
  it.each(attachedProcedures)('$key has no fault, and opens with what we ask', ({ body }) => {
    expect(validateProcedure(body, { calendarRoles: ['operator'] })).toEqual([])
    expect(schedule(body, ave, []).items[0]).toMatchObject({ step: 'file', status: 'open' })
  })

  // Goshawk Prairie, asked 9 November 2026: 30 calendar days.
  it('a modification is answered in 30 calendar days, and silence grants nothing', () => {
    const facts = told(on('2026-11-09', 'file', 'filed'))
    const answer = itemOf(modificationDetermination(), partiesOf('cbto'), facts, 'answer')
    expect([answer.dueOn, answer.outcome, answer.consequence.effect]).toEqual([
      '2026-12-09',
      null,
      'duty',
    ])
  })

  it('a change found not material needs nothing more of us', () => {
    const facts = [on('2026-11-09', 'file', 'filed'), on('2026-12-01', 'answer', 'granted')]
    expect(status(technologyChange(), facts, 'settle')).toBe('not_needed')
    const material = [facts[0]!, on('2026-12-01', 'answer', 'material')]
    expect(status(technologyChange(), material, 'settle')).toBe('open')
  })

  it('a suspension ends after three years, on the last day of a shorter February', () => {
    const facts = told(on('2028-02-29', 'file', 'filed'))
    expect(itemOf(suspension(), partiesOf('cbto'), facts, 'resumed').dueOn).toBe('2031-02-28')
  })
})

describe('extensions of the commercial operation date', () => {
  const cod = (codOn: string, more: Told['body'] = {}): Told => ({
    kind: 'changed',
    body: { terms: { codOn }, ...more },
  })
  const first = cod('2028-02-29')

  it('are counted from the first date stated', () => {
    const found = codExtension(told(first, cod('2028-12-31'), cod('2029-06-30')))
    expect(found).toMatchObject({
      originalOn: '2028-02-29',
      currentOn: '2029-06-30',
      daysGranted: 487,
      limitOn: '2031-02-28',
      within: true,
    })
  })

  it.each([
    ['2031-02-28', true],
    ['2031-03-01', false],
  ])('a wish for %s is within 3 years: %s', (wish, within) => {
    expect(codExtension(told(first, cod('2029-06-30')), wish)?.within).toBe(within)
  })

  it('an extension asked for or refused adds nothing', () => {
    const asked = cod('2032-01-01', { decision: 'asked' })
    const refused = cod('2032-01-01', { decision: 'refused' })
    expect(codExtension(told(first, asked, refused))?.daysGranted).toBe(0)
  })

  it('without any date there is nothing to extend', () => {
    expect(codExtension([])).toBeNull()
  })
})
