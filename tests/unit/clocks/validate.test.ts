import { describe, expect, it } from 'vitest'
import { libraryProcedures } from '@/lib/domain/clocks/library/all'
import type { Loop, MoneyRule, ProcedureBody, Step } from '@/lib/domain/clocks/procedure'
import { schedule } from '@/lib/domain/clocks/schedule'
import { validateProcedure } from '@/lib/domain/clocks/validate'
import { partiesOf } from './told'

const step = (key: string, more: Partial<Step> = {}): Step => ({
  key,
  title: key,
  stage: 'Request',
  party: 'operator',
  kind: 'normal',
  clocks: [],
  outcomes: [{ key: 'done', title: 'Done' }],
  onMiss: { effect: 'duty', say: 'Nothing.' },
  source: { document: 'Test', section: '1', basis: 'from_memory' },
  ...more,
})
const after = (...keys: string[]): Pick<Step, 'start'> => ({
  start: { mode: 'all', of: keys.map((key) => ({ step: key })) },
})
const body = (steps: Step[], loops: Loop[] = []): ProcedureBody => ({
  key: 'test',
  title: 'Test',
  stages: ['Request'],
  steps,
  loops,
  filedStep: 'file',
})
const file = step('file', { party: 'applicant' })
const again: Step = step('again', {
  start: { mode: 'any', of: [{ step: 'file' }, { step: 'again', instance: 'previous' }] },
  outcomes: [
    { key: 'done', title: 'Done' },
    { key: 'failed', title: 'Failed' },
  ],
})
const loop: Loop = { key: 'retry', scope: ['again'], again: { step: 'again', outcome: 'failed' } }

describe('a procedure of the library', () => {
  it.each(libraryProcedures)('$key has no fault', ({ body: shipped }) => {
    expect(validateProcedure(shipped, { calendarRoles: ['operator'] })).toEqual([])
  })

  it.each(libraryProcedures)(
    '$key can be computed before anything happened',
    ({ body: shipped }) => {
      const { items, standing, stranded } = schedule(shipped, partiesOf('ave'), [])
      expect(standing).toBe('preparing')
      expect(stranded).toEqual([])
      expect(items.find((item) => item.step === 'file')?.status).toBe('open')
    },
  )

  it('names its key only once', () => {
    const keys = libraryProcedures.map((one) => one.key)
    expect(new Set(keys).size).toBe(keys.length)
  })

  it.each([
    ['federal_fast_track', [...range(4, 13), ...range(20, 37), ...range(70, 81)]],
    ['federal_study_process', [...range(4, 13), ...range(50, 68), ...range(70, 81)]],
  ])('%s quotes each rule of the federal list by its number', (key, wanted) => {
    const shipped = libraryProcedures.find((one) => one.key === key)!.body
    const quoted = JSON.stringify(shipped.steps.map((one) => one.source))
    expect(wanted.filter((id) => !quoted.includes(id))).toEqual([])
  })
})

function range(from: number, to: number): string[] {
  return Array.from(
    { length: to - from + 1 },
    (_, at) => `SG-${String(from + at).padStart(2, '0')}`,
  )
}

describe('a sound procedure', () => {
  it('with a loop and a join has no fault', () => {
    const steps = [file, again, step('join', after('file', 'again'))]
    expect(validateProcedure(body(steps, [loop]))).toEqual([])
  })
})

const owing = (target: MoneyRule) =>
  step('a', { obligations: [{ key: 'fee', title: 'Fee', what: 'money', target }] })

type Case = [rule: string, faulty: ProcedureBody, field: string, words: RegExp, at?: string]

const cases: Case[] = [
  [
    'a start that names no step',
    body([file, step('a', after('x'))]),
    'start',
    /"x".*no such step/,
    'a',
  ],
  [
    'an expression that names no step',
    body([file, step('a', { needs: { not: { any: [{ done: 'x' }] } } })]),
    'needs',
    /no such step/,
    'a',
  ],
  [
    'a clock counted from no step',
    body([file, step('a', { clocks: [{ length: 1, unit: 'month', from: { step: 'x' } }] })]),
    'clocks.0.from',
    /no such step/,
    'a',
  ],
  ['two steps with one key', body([file, step('a'), step('a')]), 'key', /"a" more than once/, 'a'],
  [
    'a circle without a loop',
    body([file, step('a', after('b')), step('b', after('a'))]),
    'start',
    /wait for one another.*a, b/,
    'a',
  ],
  [
    'a circle through a clock',
    body([
      file,
      step('a', { clocks: [{ length: 1, unit: 'month', neverAfter: { step: 'b', date: 'due' } }] }),
      step('b', after('a')),
    ]),
    'start',
    /wait for one another/,
    'a',
  ],
  [
    'a step that nothing starts',
    body([file, step('a', { start: { mode: 'any', of: [] } })]),
    'start',
    /Nothing can start this step/,
    'a',
  ],
  [
    'a join with a step that can never start',
    body([file, step('a', { start: { mode: 'any', of: [] } }), step('j', after('file', 'a'))]),
    'start',
    /join never closes: a can never start/,
    'j',
  ],
  [
    'a negative length',
    body([file, step('a', { clocks: [{ length: -1, unit: 'business_day' }] })]),
    'clocks.0.length',
    /Found -1; allowed are whole numbers from 0 to 2600/,
    'a',
  ],
  [
    'a length beyond reason',
    body([file, step('a', { clocks: [{ length: 241, unit: 'month' }] })]),
    'clocks.0.length',
    /Found 241/,
    'a',
  ],
  [
    'half a day',
    body([file, step('a', { clocks: [{ length: 1.5, unit: 'calendar_day' }] })]),
    'clocks.0.length',
    /Found 1.5/,
    'a',
  ],
  [
    'a loop whose steps do not follow one another',
    body([file, again, step('b'), step('c')], [{ ...loop, scope: ['again', 'c'] }]),
    'loops.retry.scope',
    /must follow one another/,
  ],
  [
    'a loop that repeats by a step outside it',
    body([file, again, step('b')], [{ ...loop, again: { step: 'b', outcome: 'done' } }]),
    'loops.retry.again',
    /must be a step of the loop/,
  ],
  [
    'a loop that repeats by an outcome its step has not',
    body([file, again], [{ ...loop, again: { step: 'again', outcome: 'lost' } }]),
    'loops.retry.again',
    /"lost"; the outcomes of "again" are: done, failed/,
  ],
  [
    'a loop whose next round nothing starts',
    body([file, step('again', { outcomes: again.outcomes })], [loop]),
    'loops.retry.scope',
    /started by the round before/,
  ],
  [
    'a round before outside any loop',
    body([
      file,
      step('a', {
        start: { mode: 'any', of: [{ step: 'file' }, { step: 'a', instance: 'previous' }] },
      }),
    ]),
    'start',
    /Only inside a loop/,
    'a',
  ],
  [
    'an unknown outcome in an expression',
    body([file, step('a', { needs: { outcome: 'file', in: ['lost'] } })]),
    'needs',
    /"lost"; the outcomes of "file" are: done/,
    'a',
  ],
  [
    'an unknown outcome in a start',
    body([file, step('a', { start: { mode: 'any', of: [{ step: 'file', outcome: ['lost'] }] } })]),
    'start',
    /"lost"/,
    'a',
  ],
  [
    'a presumed outcome the step has not',
    body([file, step('a', { onMiss: { effect: 'presumed', outcome: 'lost', say: '' } })]),
    'onMiss',
    /"lost"/,
    'a',
  ],
  [
    'a money bracket above one without an upper edge',
    body([file, owing({ kind: 'bracketed', brackets: [{ plusMinor: 1 }, { belowMw: 80 }] })]),
    'obligations.fee.target',
    /last bracket, and only it, has no upper edge/,
    'a',
  ],
  [
    'money brackets that do not rise',
    body([
      file,
      owing({ kind: 'bracketed', brackets: [{ belowMw: 80 }, { belowMw: 80 }, { plusMinor: 1 }] }),
    ]),
    'obligations.fee.target',
    /must rise/,
    'a',
  ],
  [
    'a share of nothing',
    body([file, owing({ kind: 'share', percent: 0 })]),
    'obligations.fee.target',
    /Found 0 %/,
    'a',
  ],
  [
    'part of a cent in a rule inside another',
    body([file, owing({ kind: 'multiple', times: 2, of: { kind: 'fixed', amountMinor: 0.5 } })]),
    'obligations.fee.target',
    /amountMinor: found 0.5; allowed are whole minor units/,
    'a',
  ],
  [
    'an amount on what is not money',
    body([
      file,
      step('a', {
        obligations: [
          { key: 'fee', title: 'Fee', what: 'data', target: { kind: 'fixed', amountMinor: 1 } },
        ],
      }),
    ]),
    'obligations.fee.target',
    /only money has one/,
    'a',
  ],
  ['no step that files', { ...body([file]), filedStep: '' }, 'filedStep', /Name the step/],
  [
    'a filing step that is not there',
    { ...body([file]), filedStep: 'x' },
    'filedStep',
    /no such step/,
  ],
  [
    'an alternative after one that always holds',
    body([
      file,
      step('a', {
        clocks: [
          { length: 1, unit: 'month' },
          { length: 2, unit: 'month' },
        ],
      }),
    ]),
    'clocks.1',
    /never chosen/,
    'a',
  ],
  [
    'a stage that is not listed',
    body([file, step('a', { stage: 'Else' })]),
    'stage',
    /"Else"/,
    'a',
  ],
  [
    'a recurring step that follows no anytime step',
    body([file, step('a', { kind: 'recurring', ...after('file') })]),
    'start',
    /started by an anytime step/,
    'a',
  ],
]

describe('a fault is told with its field', () => {
  it.each(cases)('%s', (_, faulty, field, words, at) => {
    const faults = validateProcedure(faulty)
    const found = faults.filter((fault) => fault.field === field && fault.step === at)
    expect(found.map((fault) => fault.message).join(' ')).toMatch(words)
  })

  it('all faults come at once', () => {
    const clocks: Step['clocks'] = [{ length: -1, unit: 'month' }]
    const faults = validateProcedure({
      ...body([file, step('a', { clocks, ...after('x') })]),
      filedStep: 'y',
    })
    expect(faults.map((fault) => fault.field)).toEqual(['filedStep', 'start', 'clocks.0.length'])
  })

  it('a calendar of a role that nobody has', () => {
    const clocks: Step['clocks'] = [
      { length: 1, unit: 'business_day', calendar: 'affected_system' },
    ]
    const faults = validateProcedure(body([file, step('a', { clocks })]), {
      calendarRoles: ['operator'],
    })
    expect(faults).toEqual([
      {
        step: 'a',
        field: 'clocks.0.calendar',
        message: expect.stringContaining('affected_system'),
      },
    ])
  })
})
