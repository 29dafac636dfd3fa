import type { CivilDate } from '@/lib/domain/clocks/civil-date'
import { effectiveFacts, type AssigningStudy, type Fact } from '@/lib/domain/clocks/facts'
import { eventDate } from '@/lib/domain/clocks/stops'

/** Network upgrade cost assigned to the request by a study, as it was told. */
export interface AssignedCost {
  factId: string
  amountMinor: number
  by: AssigningStudy | null
  /** The day of the report; null when it was not recorded. */
  on: CivilDate | null
}

/**
 * Every assigned cost in force, the first assigned first. They are `changed` facts whose terms
 * carry `assignedCostMinor`; one asked for or refused assigns nothing. A cost without a date
 * counts as assigned before all that have one.
 */
export function assignedCosts(facts: readonly Fact[]): AssignedCost[] {
  return effectiveFacts(facts)
    .filter(isTold)
    .flatMap((fact) => {
      const { assignedCostMinor: amountMinor, assignedBy: by = null } = fact.body.terms ?? {}
      if (amountMinor === undefined || !Number.isSafeInteger(amountMinor)) return []
      return [{ factId: fact.id, amountMinor, by, on: eventDate(fact) ?? null }]
    })
    .sort((a, b) => (a.on ?? '').localeCompare(b.on ?? ''))
}

/** The cost assigned by the end of a day, the latest of all without one; null where none was. */
export function assignedCostOn(
  costs: readonly AssignedCost[],
  on: CivilDate | null,
): AssignedCost | null {
  return costs.findLast((cost) => on === null || cost.on === null || cost.on <= on) ?? null
}

/** The cost before the latest, to tell by how much it rose. */
export function assignedBefore(costs: readonly AssignedCost[]): AssignedCost | null {
  return costs.at(-2) ?? null
}

/** Changes that hold: neither only asked for nor refused. */
function isTold(fact: Fact): boolean {
  const { decision } = fact.body
  return fact.kind === 'changed' && decision !== 'asked' && decision !== 'refused'
}
