import {
  assignedCostOn,
  assignedCosts,
  type AssignedCost,
} from '@/lib/domain/clocks/assigned-costs'
import type { CivilDate } from '@/lib/domain/clocks/civil-date'
import type { DerivationLine } from '@/lib/domain/clocks/derivation'
import { termsOf, type Fact } from '@/lib/domain/clocks/facts'
import type { Graph, Node } from '@/lib/domain/clocks/graph'
import { moneyTarget, type MoneyGround } from '@/lib/domain/clocks/money-rules'
import {
  loopOf,
  type MoneyRule,
  type ObligationRule,
  type ProcedureBody,
  type Step,
} from '@/lib/domain/clocks/procedure'
import { eventDate } from '@/lib/domain/clocks/stops'

export interface MoneyState {
  /** The total to reach; null without a rule, or while it cannot be told yet. */
  targetMinor: number | null
  heldMinor: number
  /** When it was met; null: met, date unknown; undefined: open. */
  metOn: CivilDate | null | undefined
  lines: DerivationLine[]
}

/**
 * Where a money obligation of a round stands: its target as the terms and the assigned cost were
 * on its due date, and what its account holds by then. A later study moves later targets only.
 *
 * While the target cannot be told, no posting closes the obligation.
 */
export function moneyState(
  graph: Graph,
  step: Step,
  node: Node,
  rule: ObligationRule,
  target: MoneyRule | null,
): MoneyState {
  const own = graph.index.obligationFacts(step.key, node.instance, rule.key)
  const before = heldOf(earlierPostings(graph, step, node.instance, rule))
  const heldMinor = before + heldOf(own)
  if (!target) {
    const last = own.at(-1)
    return { targetMinor: null, heldMinor, metOn: last && (eventDate(last) ?? null), lines: [] }
  }
  const found = moneyTarget(target, groundOf(graph, node, target), heldMinor)
  if (!found) return { targetMinor: null, heldMinor, metOn: takenOver(own), lines: [unknownLine] }
  const told = target.kind !== 'fixed' || rule.account !== undefined
  return {
    targetMinor: found.targetMinor,
    heldMinor,
    metOn: metOn(node, own, before, found.targetMinor),
    lines: told ? [{ kind: 'note', text: found.account }] : [],
  }
}

const unknownLine: DerivationLine = {
  kind: 'note',
  text: 'No amount yet: it hangs on megawatts or an assigned cost that is not recorded.',
}

/** The day the total was reached; what earlier steps hold may be enough once the step runs. */
function metOn(
  node: Node,
  own: readonly Fact[],
  before: number,
  targetMinor: number,
): CivilDate | null | undefined {
  if (before >= targetMinor && own.length === 0) return node.status === 'waiting' ? undefined : null
  const last = own.find((_, at) => before + heldOf(own.slice(0, at + 1)) >= targetMinor)
  return last && (eventDate(last) ?? null)
}

function takenOver(own: readonly Fact[]): CivilDate | null | undefined {
  const fact = own.find((one) => one.kind === 'taken_over')
  return fact && (eventDate(fact) ?? null)
}

function heldOf(facts: readonly Fact[]): number {
  return facts.reduce((sum, fact) => sum + (fact.amountMinor ?? 0), 0)
}

/** Terms and assigned cost as they were by the due date of the round. */
function groundOf(graph: Graph, node: Node, target: MoneyRule): MoneyGround {
  if (target.kind === 'fixed') return { terms: {}, assignedCostMinor: null }
  const { changed, costs } = changesOf(graph.index.facts)
  const known = changed.filter((fact) => !node.dueOn || (eventDate(fact) ?? '') <= node.dueOn)
  const cost = assignedCostOn(costs, node.dueOn)
  return {
    terms: known.length === changed.length ? graph.terms : termsOf(known),
    assignedCostMinor: cost?.amountMinor ?? null,
  }
}

interface Changes {
  changed: Fact[]
  costs: AssignedCost[]
}

// Every money obligation of a schedule asks for the same ones.
const changesByFacts = new WeakMap<readonly Fact[], Changes>()

function changesOf(facts: readonly Fact[]): Changes {
  const found = changesByFacts.get(facts)
  if (found) return found
  const changed = facts.filter((fact) => fact.kind === 'changed')
  const made = { changed, costs: assignedCosts(changed) }
  changesByFacts.set(facts, made)
  return made
}

/** Postings on the same account to the steps and rounds before this one. */
function earlierPostings(graph: Graph, step: Step, instance: number, rule: ObligationRule): Fact[] {
  if (!rule.account) return []
  return graph.index.facts.filter((fact) => {
    if (fact.amountMinor === undefined || !fact.step || !fact.obligation) return false
    if (fact.kind !== 'happened' && fact.kind !== 'taken_over') return false
    const other = graph.body.steps.find((one) => one.key === fact.step)
    const shares = other?.obligations?.find((one) => one.key === fact.obligation)
    if (shares?.account !== rule.account) return false
    return comesBefore(graph.body, [other!.key, fact.instance], [step.key, instance])
  })
}

type Round = readonly [step: string, instance: number]

function comesBefore(body: ProcedureBody, [a, roundA]: Round, [b, roundB]: Round): boolean {
  const loop = loopOf(body, a)
  if (loop && loop === loopOf(body, b) && roundA !== roundB) return roundA < roundB
  const place = (key: string) => body.steps.findIndex((one) => one.key === key)
  return place(a) < place(b)
}
