import { later, type CivilDate } from '@/lib/domain/clocks/civil-date'
import type { DerivationLine } from '@/lib/domain/clocks/derivation'
import type { Terms } from '@/lib/domain/clocks/facts'
import type { FactIndex } from '@/lib/domain/clocks/fact-index'
import {
  loopOf,
  stepOf,
  type Expr,
  type ProcedureBody,
  type StartRule,
  type Step,
  type StepRef,
} from '@/lib/domain/clocks/procedure'
import { datedEvent } from '@/lib/domain/clocks/receipt'
import { sayDate } from '@/lib/domain/clocks/say'
import type { OrganizationRules, Parties, ScheduledItem } from '@/lib/domain/clocks/schedule-types'

export interface Node extends ScheduledItem {
  /** The outcome counts only until a person confirms it. */
  presumed: boolean
}

/** A three-valued answer: null is not known yet. */
export interface Truth {
  value: boolean | null
  provisional: boolean
}

export type Resolved =
  | {
      state: 'met'
      on: CivilDate
      afterHours: boolean
      provisional: boolean
      lines: DerivationLine[]
    }
  | { state: 'open' }
  | { state: 'never' }

export interface Graph {
  body: ProcedureBody
  index: FactIndex
  parties: Parties
  terms: Terms
  node(step: string, instance: number): Node
  /** How many rounds of the step there are; one outside loops. */
  instances(step: string): number
}

/** Whose rules a step is counted by: the organization it names, else the operator. */
export function rulesFor(parties: Parties, step: Step): OrganizationRules {
  const role = step.party
  if (role === 'applicant' || role === 'both' || role === 'other') return parties.operator
  return parties[role] ?? parties.operator
}

function targetInstance(
  graph: Graph,
  ref: { step: string; instance?: string },
  from: Step,
  instance: number,
) {
  if (ref.instance === 'previous') return instance - 1
  const loop = loopOf(graph.body, ref.step)
  const same = loop !== undefined && loop === loopOf(graph.body, from.key)
  return ref.instance === 'latest' || !same ? graph.instances(ref.step) : instance
}

/** Whether an expression over outcomes and terms holds for this round of the step. */
export function evaluate(graph: Graph, expr: Expr, from: Step, instance: number): Truth {
  if ('all' in expr)
    return combine(
      expr.all.map((part) => evaluate(graph, part, from, instance)),
      false,
    )
  if ('any' in expr)
    return combine(
      expr.any.map((part) => evaluate(graph, part, from, instance)),
      true,
    )
  if ('not' in expr) {
    const inner = evaluate(graph, expr.not, from, instance)
    return { ...inner, value: inner.value === null ? null : !inner.value }
  }
  if ('term' in expr) return { value: compareTerm(graph.terms, expr), provisional: false }
  if ('instanceAbove' in expr) return { value: instance > expr.instanceAbove, provisional: false }
  const ref =
    'outcome' in expr
      ? { step: expr.outcome, instance: expr.instance }
      : { step: expr.done, instance: expr.instance }
  const at = targetInstance(graph, ref, from, instance)
  if (at < 1) return { value: false, provisional: false }
  const node = graph.node(ref.step, at)
  const wanted = 'outcome' in expr ? expr.in : null
  return truthOf(graph, node, wanted, inRound(graph, from, ref.step))
}

/** Inside one loop a round is decided by itself; only from outside may a further round matter. */
function inRound(graph: Graph, from: Step, step: string): boolean {
  const loop = loopOf(graph.body, step)
  return loop !== undefined && loop === loopOf(graph.body, from.key)
}

function truthOf(graph: Graph, node: Node, wanted: string[] | null, sameRound: boolean): Truth {
  const provisional = node.provisional || node.presumed
  if (node.status === 'not_needed' || node.status === 'closed') return { value: false, provisional }
  if (node.status !== 'done' && node.status !== 'waived' && !node.presumed)
    return { value: null, provisional: false }
  if (node.status === 'waived') return { value: true, provisional }
  if (wanted === null || (node.outcome !== null && wanted.includes(node.outcome)))
    return { value: true, provisional }
  if (node.presumed || (!sameRound && mayComeAgain(graph, node)))
    return { value: null, provisional: false }
  return { value: false, provisional }
}

/** Whether the loop of this step may still bring another round. */
function mayComeAgain(graph: Graph, node: Node): boolean {
  const loop = loopOf(graph.body, node.step)
  if (!loop || node.instance < graph.instances(node.step)) return false
  if (loop.max !== undefined && node.instance >= loop.max) return false
  if (loop.again.step === node.step) return false
  const again = graph.node(loop.again.step, node.instance)
  return again.status === 'open' || again.status === 'waiting' || again.status === 'stopped'
}

function combine(parts: Truth[], any: boolean): Truth {
  const decided = parts.find((part) => part.value === any)
  if (decided) return decided
  if (parts.some((part) => part.value === null)) return { value: null, provisional: false }
  return { value: !any, provisional: parts.some((part) => part.provisional) }
}

function compareTerm(terms: Terms, expr: Extract<Expr, { term: string }>): boolean | null {
  const found = (terms as Record<string, unknown>)[expr.term]
  if (found === undefined) return null
  const { op, value } = expr
  if (op === '=') return found === value
  if (op === '!=') return found !== value
  if (typeof found !== 'number' || typeof value !== 'number') return null
  if (op === '<') return found < value
  if (op === '<=') return found <= value
  return op === '>' ? found > value : found >= value
}

/** The date a reference gives this round of the step, or why it gives none. */
export function resolveRef(graph: Graph, ref: StepRef, from: Step, instance: number): Resolved {
  const target = stepOf(graph.body, ref.step)
  if (ref.date === 'scheduled')
    return bookedDate(graph, target, inRound(graph, from, ref.step) ? instance : undefined)
  const at = targetInstance(graph, ref, from, instance)
  if (at < 1) return { state: 'never' }
  if (target.kind === 'anytime' && !graph.index.happened(ref.step, at)) return { state: 'never' }
  const node = graph.node(ref.step, at)
  if (ref.date === 'due')
    return node.dueOn
      ? {
          state: 'met',
          on: node.dueOn,
          afterHours: false,
          provisional: node.provisional,
          lines: [startLine(node, node.dueOn, 'due')],
        }
      : { state: node.status === 'not_needed' ? 'never' : 'open' }
  const truth = truthOf(graph, node, ref.outcome ?? null, inRound(graph, from, ref.step))
  if (truth.value === null) return { state: 'open' }
  return truth.value ? eventOf(graph, ref, target, node) : { state: 'never' }
}

function eventOf(graph: Graph, ref: StepRef, target: Step, node: Node): Resolved {
  const fact =
    graph.index.happened(node.step, node.instance) ??
    graph.index.takenOver(node.step, node.instance)
  const rules = rulesFor(graph.parties, target)
  const event = fact && datedEvent(fact, target, ref.date ?? 'received', rules)
  const on = event?.on ?? node.doneOn ?? (node.presumed ? node.dueOn : null)
  if (!on) return { state: 'open' }
  const basis = event
    ? ref.date === 'sent'
      ? 'sent'
      : 'received'
    : node.presumed
      ? 'presumed'
      : 'done'
  return {
    state: 'met',
    on,
    afterHours: event?.afterHours ?? false,
    provisional: node.provisional || node.presumed,
    lines: [startLine(node, on, basis), ...(event?.lines ?? [])],
  }
}

/** The day booked for a round of a step; from outside its loop, the last day booked. */
function bookedDate(graph: Graph, target: Step, round?: number): Resolved {
  const fact = graph.index.booked(target.key, round)
  if (!fact?.dueOn) return { state: 'open' }
  const done = graph.index.happened(target.key, fact.instance) !== undefined
  return {
    state: 'met',
    on: fact.dueOn,
    afterHours: false,
    provisional: !done,
    lines: [
      {
        kind: 'start',
        on: fact.dueOn,
        text: `${target.title}, booked for ${sayDate(fact.dueOn)}.`,
      },
    ],
  }
}

function startLine(node: Node, on: CivilDate, basis: string): DerivationLine {
  const round = node.instance > 1 ? `, round ${node.instance}` : ''
  return { kind: 'start', on, text: `Starts from: ${node.title}${round}, ${basis} ${sayDate(on)}.` }
}

/** What starts this round of the step: the last of all, or the first of any. */
export function resolveStart(
  graph: Graph,
  rule: StartRule,
  from: Step,
  instance: number,
): Resolved {
  const inRound = rule.of.filter((ref) => instance > 1 === (ref.instance === 'previous'))
  const hasPrevious = rule.of.some((ref) => ref.instance === 'previous')
  const refs = hasPrevious ? inRound : rule.of
  const found = refs.map((ref) => resolveRef(graph, ref, from, instance))
  const live = found.filter((one) => one.state !== 'never')
  if (live.length === 0) return { state: 'never' }
  const met = live.filter((one) => one.state === 'met')
  if (met.length === 0 || (rule.mode === 'all' && met.length < live.length))
    return { state: 'open' }
  const chosen = met.reduce((a, b) => {
    const bIsLater = later(a.on, b.on) === b.on && a.on !== b.on
    return (rule.mode === 'all') === bIsLater ? b : a
  })
  const provisional = rule.mode === 'all' ? met.some((one) => one.provisional) : chosen.provisional
  return { ...chosen, provisional }
}
