import { describe, expect, it } from 'vitest'
import { forecast } from '@/lib/domain/clocks/forecast'
import { libraryProcedures } from '@/lib/domain/clocks/library/all'
import { federalCluster } from '@/lib/domain/clocks/library/cluster'
import type { ProcedureBody, Step } from '@/lib/domain/clocks/procedure'
import { schedule } from '@/lib/domain/clocks/schedule'
import { on, partiesOf, told, type Told } from './told'

const today = '2026-12-01'
const ave = partiesOf('ave')
const foreseen = (body: ProcedureBody, facts: Told[], asOfOn = today) => {
  const all = told(...facts)
  return forecast(body, schedule(body, ave, all), all, asOfOn)
}

const step = (key: string, more: Partial<Step>): Step => ({
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
const after = (...keys: string[]) => ({
  start: { mode: 'all' as const, of: keys.map((key) => ({ step: key })) },
})
const days = (shortest: number, likely: number, longest: number) => ({
  typical: { shortest, likely, longest },
})
const body = (...steps: Step[]): ProcedureBody => ({
  key: 'test',
  title: 'Test',
  stages: ['Request'],
  loops: [],
  filedStep: 'file',
  operationStep: 'end',
  steps: [step('file', { party: 'applicant' }), ...steps],
})
const filed = on('2026-11-30', 'file')
const spread = (one: { shortestOn: string; likelyOn: string; longestOn: string } | null) =>
  one && [one.shortestOn, one.likelyOn, one.longestOn]

describe('a forecast', () => {
  const join = body(
    step('left', { ...after('file'), ...days(10, 20, 30) }),
    step('right', { ...after('file'), ...days(5, 40, 50) }),
    step('end', { ...after('left', 'right'), ...days(1, 2, 3) }),
  )

  it('chains the typical days, and a join waits for the slower branch at each pace', () => {
    // From 30 November: 10, 40 and 50 days to the join, then 1, 2 and 3.
    expect(spread(foreseen(join, [filed]).operation)).toEqual([
      '2026-12-11',
      '2027-01-11',
      '2027-01-22',
    ])
  })

  it('counts on from the day a step was done, not from the day it was expected', () => {
    const done = [filed, on('2026-12-20', 'right')]
    expect(spread(foreseen(join, done, '2026-12-21').operation)).toEqual([
      '2026-12-22',
      '2026-12-23',
      '2027-01-02',
    ])
  })

  it('foresees nothing before the day as of which it is made', () => {
    expect(foreseen(join, [filed], '2027-06-01').steps.map((one) => one.longestOn)).toEqual([
      '2027-06-01',
      '2027-06-01',
      '2027-06-04',
    ])
  })

  it('takes a booked day as it is booked', () => {
    const booked: Told = { kind: 'scheduled', step: 'right', dueOn: '2027-03-01' }
    const end = foreseen(join, [filed, booked]).operation
    expect(spread(end)).toEqual(['2027-03-02', '2027-03-03', '2027-03-04'])
  })

  it('breaks at a step whose length nobody gave, and names it', () => {
    const broken = body(
      step('middle', after('file')),
      step('end', { ...after('middle'), ...days(1, 2, 3) }),
    )
    const { operation, gaps } = foreseen(broken, [filed])
    expect(operation).toBeNull()
    expect(gaps).toEqual([{ step: 'middle', title: 'middle' }])
  })

  it('takes the length of its clock for a step without typical days', () => {
    const clocked = body(
      step('end', { ...after('file'), clocks: [{ length: 10, unit: 'business_day' }] }),
    )
    // Open, so its due date: 10 business days from Monday 30 November.
    expect(spread(foreseen(clocked, [filed]).operation)).toEqual([
      '2026-12-14',
      '2026-12-14',
      '2026-12-14',
    ])
  })

  it('is empty for a request that was withdrawn', () => {
    const gone: Told = { kind: 'withdrawn', receivedOn: '2026-12-01' }
    expect(foreseen(join, [filed, gone])).toMatchObject({ steps: [], operation: null })
  })
})

const toGateTwo: Told[] = [
  on('2026-01-05', 'window_open', 'opened'),
  on('2026-02-10', 'file', 'filed'),
  on('2026-02-13', 'validity', 'valid'),
  on('2026-02-19', 'window_close', 'closed'),
  on('2026-02-26', 'cluster_tender', 'sent'),
  on('2026-04-10', 'cluster_agreement', 'signed'),
  on('2026-04-20', 'engagement_close', 'closed'),
  on('2026-09-22', 'cluster_report', 'issued'),
  on('2026-10-06', 'report_meeting', 'held'),
  on('2026-10-22', 'gate_1', 'proceed'),
  on('2026-11-03', 'restudy_decision', 'none'),
  on('2026-11-10', 'facilities_tender', 'sent'),
]

describe('Juniper Flat, gate 2 running', () => {
  const found = foreseen(federalCluster(), toGateTwo)

  it('is expected in operation in September 2029, at the longest in June 2030', () => {
    expect(found.operation?.likelyOn.slice(0, 7)).toBe('2029-09')
    expect(found.operation?.longestOn.slice(0, 7)).toBe('2030-06')
  })

  it('its draft report is expected in mid-April, after gate 2 on its due date', () => {
    const likely = (key: string) => found.steps.find((one) => one.step === key)?.likelyOn
    expect([likely('gate_2'), likely('facilities_draft')]).toEqual(['2026-12-10', '2027-04-14'])
  })

  it('foresees no step of an affected system that nobody named', () => {
    expect(found.steps.filter((one) => one.step.startsWith('affected_s'))).toEqual([])
  })
})

describe.each(libraryProcedures.filter(({ key }) => key !== 'outline'))(
  'the forecast of $key',
  ({ body: shipped }) => {
    it('reaches operation from the day of filing, shortest before likely before longest', () => {
      const facts = [on('2026-11-02', 'file', 'filed')]
      if (shipped.steps.some((one) => one.key === 'window_open'))
        facts.push(on('2026-11-02', 'window_open', 'opened'))
      const { operation, steps } = foreseen(shipped, facts)
      expect(operation).not.toBeNull()
      for (const one of steps) {
        expect(one.shortestOn <= one.likelyOn && one.likelyOn <= one.longestOn, one.step).toBe(true)
        expect(one.shortestOn >= today, one.step).toBe(true)
      }
    })
  },
)
