import { expect } from 'vitest'
import { federalCluster } from '@/lib/domain/clocks/library/cluster'
import type { ProcedureBody } from '@/lib/domain/clocks/procedure'
import { schedule } from '@/lib/domain/clocks/schedule'
import type { Parties } from '@/lib/domain/clocks/schedule-types'
import { partiesOf, told, type Told } from '../../unit/clocks/told'

/*
 * Source of the rules: pro forma LGIP after Orders 2023 and 2023-A, most numbers from memory as
 * each step is marked. The requests are invented; every date was counted by hand.
 */

export const ave = partiesOf('ave')
export const pro = federalCluster()
export const cbto = partiesOf('cbto')
export const rolling = federalCluster({
  calendarRoll: 'next_business_day',
  applicationFeeMinor: 1_000_000,
})

type Due = [step: string, dueOn: string | null, instance?: number]

/** Each step of a request is due on the day given, and no fact is stranded. */
export function expectDue(body: ProcedureBody, parties: Parties, facts: Told[], rows: Due[]) {
  const { items, stranded } = schedule(body, parties, told(...facts))
  expect(stranded).toEqual([])
  const found = rows.map(([step, , instance = 1]) => {
    const item = items.find(
      (one) => one.step === step && one.instance === instance && one.obligation === '',
    )
    return [step, item?.dueOn, instance]
  })
  expect(found).toEqual(rows.map(([step, dueOn, instance = 1]) => [step, dueOn, instance]))
}

export const dollars = (amount: number) => amount * 100
export const posted = (
  receivedOn: string,
  step: string,
  obligation: string,
  amount: number,
): Told => ({
  step,
  obligation,
  receivedOn,
  amountMinor: dollars(amount),
})
export const assigned = (
  receivedOn: string,
  amount: number,
  assignedBy: 'cluster_study' | 'cluster_restudy',
): Told => ({
  kind: 'changed',
  receivedOn,
  body: { terms: { assignedCostMinor: dollars(amount), assignedBy } },
})
export const requested = (requestedMw: number): Told => ({
  kind: 'changed',
  body: { terms: { requestedMw } },
})
