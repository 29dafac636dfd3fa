import { describe, expect, it } from 'vitest'
import { assignedBefore, assignedCostOn, assignedCosts } from '@/lib/domain/clocks/assigned-costs'
import { federalCluster } from '@/lib/domain/clocks/library/cluster'
import { schedule } from '@/lib/domain/clocks/schedule'
import { termsSchema } from '@/lib/schemas/fact'
import { itemOf, on, partiesOf, told, type Told } from './told'

const cost = (assignedCostMinor: number, receivedOn?: string, more: Told = {}): Told => ({
  kind: 'changed',
  ...(receivedOn && { receivedOn }),
  ...more,
  body: { terms: { assignedCostMinor, assignedBy: 'cluster_study' }, ...more.body },
})
const amounts = (...facts: Told[]) => assignedCosts(told(...facts)).map((one) => one.amountMinor)

describe('assigned costs', () => {
  it('stand in the order of their reports, whatever order they were recorded in', () => {
    expect(amounts(cost(3, '2026-11-23'), cost(1, '2026-05-04'))).toEqual([1, 3])
  })

  it('without a date count as assigned before all that have one', () => {
    expect(amounts(cost(3, '2026-11-23'), cost(1))).toEqual([1, 3])
  })

  it('asked for or refused assign nothing', () => {
    const asked = cost(2, '2026-06-01', { body: { decision: 'asked' } })
    const refused = cost(2, '2026-06-01', { body: { decision: 'refused' } })
    const withTerms = [asked, refused].map((one) => ({
      ...one,
      body: { ...one.body, terms: { assignedCostMinor: 2 } },
    }))
    expect(amounts(cost(1, '2026-05-04'), ...withTerms)).toEqual([1])
  })

  it('a correction takes the place of what it corrects, a retraction takes it away', () => {
    const corrected = cost(5, '2026-05-04', { kind: 'correction', replacesId: 'f1' })
    expect(amounts(cost(1, '2026-05-04'), cost(3, '2026-11-23'), corrected)).toEqual([5, 3])
    const retracted: Told = { kind: 'retraction', replacesId: 'f2' }
    expect(amounts(cost(1, '2026-05-04'), cost(3, '2026-11-23'), retracted)).toEqual([1])
  })

  it('by the end of a day is the last told by then', () => {
    const costs = assignedCosts(told(cost(1, '2026-05-04'), cost(3, '2026-11-23')))
    const on = ['2026-05-03', '2026-05-04', '2026-11-22', '2026-11-23']
    expect(on.map((day) => assignedCostOn(costs, day)?.amountMinor)).toEqual([undefined, 1, 1, 3])
    expect([assignedCostOn(costs, null)?.amountMinor, assignedBefore(costs)?.amountMinor]).toEqual([
      3, 1,
    ])
  })

  it('pass the door as terms of a request, and part of a cent does not', () => {
    const terms = { assignedCostMinor: 412_000_000, assignedBy: 'cluster_study' }
    expect(termsSchema.parse(terms)).toEqual(terms)
    expect(termsSchema.safeParse({ assignedCostMinor: 0.5 }).success).toBe(false)
  })
})

describe('postings on one account', () => {
  const body = federalCluster()
  const ave = partiesOf('ave')
  const toMeeting: Told[] = [
    { kind: 'changed', body: { terms: { requestedMw: 48 } } },
    on('2026-02-10', 'file', 'filed'),
    on('2026-09-22', 'cluster_report', 'issued'),
    on('2026-10-06', 'report_meeting', 'held', { reason: 'Entered from the report' }),
  ]
  const held = (amountMinor: number): Told => ({
    step: 'file',
    obligation: 'readiness',
    receivedOn: '2026-02-10',
    amountMinor,
  })
  const land: Told = { step: 'gate_1', obligation: 'land', receivedOn: '2026-10-20' }
  const gate = (...facts: Told[]) => itemOf(body, ave, told(...toMeeting, ...facts), 'gate_1')

  it('what earlier steps hold is enough: the gate is done with its other part', () => {
    const found = gate(cost(100_000_00, '2026-09-22'), held(166_000_00), land)
    expect([found.status, found.doneOn]).toEqual(['done', '2026-10-20'])
  })

  it('the fee and the study deposit are not on the account', () => {
    const study: Told = { ...held(900_000_00), obligation: 'study_deposit' }
    expect(gate(cost(4_120_000_00, '2026-09-22'), study, land).status).toBe('open')
  })

  it('what a later gate holds is not counted at an earlier one', () => {
    const later: Told = {
      step: 'gate_2',
      obligation: 'deposit',
      receivedOn: '2026-10-20',
      amountMinor: 900_000_00,
    }
    const facts = [cost(4_120_000_00, '2026-09-22'), held(166_000_00), land, later]
    expect(gate(...facts).status).toBe('open')
  })

  it('a deposit that is enough shows as done only once its gate runs', () => {
    const facts = told(toMeeting[0]!, cost(1_00, '2026-09-22'), held(166_000_00))
    const status = (step: string) => itemOf(body, ave, facts, step, 1, 'deposit').status
    expect(status('gate_1')).toBe('waiting')
    const running = told(...toMeeting, cost(1_00, '2026-09-22'), held(166_000_00))
    expect(itemOf(body, ave, running, 'gate_1', 1, 'deposit').status).toBe('done')
  })
})

describe('an overtaken step', () => {
  const body = federalCluster()
  const facts: Told[] = [
    on('2026-01-05', 'window_open', 'opened'),
    on('2026-02-10', 'file', 'filed'),
    on('2026-02-13', 'validity', 'deficient'),
    on('2026-09-22', 'cluster_report', 'issued', { reason: 'Entered from the report' }),
    on('2026-10-06', 'report_meeting', 'held'),
    on('2026-10-20', 'gate_1', 'proceed'),
  ]
  const restudied = [...facts, on('2026-11-03', 'restudy_decision', 'restudy')]

  it.each([
    ['before', facts],
    ['after', restudied],
  ])('stays overtaken %s a further round begins', (_, some) => {
    const { items } = schedule(body, partiesOf('ave'), told(...some))
    const state = (step: string) =>
      items.find((one) => one.step === step && one.obligation === '')?.status
    expect([state('window_close'), state('engagement_close'), state('acknowledge')]).toEqual([
      'closed',
      'closed',
      'closed',
    ])
  })
})
