import type { CivilDate } from '@/lib/domain/clocks/civil-date'
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
import { datedEvent, receivedByUtility } from '@/lib/domain/clocks/receipt'
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
      /** Something of ours that the utility received: its receipt rule moves day 0. */
      received: boolean
      afterHours: boolean
      provisional: boolean
      lines: DerivationLine[]
    }
  | { state: 'open' }
  /** Done, but nobody recorded when: it lies before the application was taken over. */
  | { state: 'undated' }
  | { state: 'never' }

export interface Graph {
  body: ProcedureBody
  index: FactIndex
  parties: Parties
  terms: Terms
  node(step: string, instance: number): Node
  /** How many rounds of the step there are; one outside loops, none of an unrecorded anytime step. */
  instances(step: string): number
}

/**
 * Whose hour, receipt rule and calendar hold for a step: the organization that acts, or the one
 * that receives what the applicant sends; else the operator.
 */
export function rulesFor(parties: Parties, step: Pick<Step, 'party' | 'to'>): OrganizationRules {
  const role = step.party
  if (role === 'applicant' || role === 'both' || role === 'other')
    return (step.to && parties[step.to]) ?? parties.operator
  return parties[role] ?? parties.operator
}

/** Whether a reference from one step to another stays in the same round. */
function sameRound(graph: Graph, from: Step, step: string): boolean {
  const loop = loopOf(graph.body, step)
  if (loop !== undefined) return loop === loopOf(graph.body, from.key)
  const { kind } = stepOf(graph.body, step)
  return from.kind === 'recurring' && (kind === 'anytime' || kind === 'recurring')
}

/** The round a reference means; 0 where there is none yet. */
function targetInstance(
  graph: Graph,
  ref: { step: string; instance?: string },
  from: Step,
  instance: number,
): number {
  if (ref.instance === 'previous') return instance - 1
  const same = ref.instance !== 'latest' && sameRound(graph, from, ref.step)
  return same ? instance : graph.instances(ref.step)
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
  return truthOf(graph, node, wanted, sameRound(graph, from, ref.step))
}

/** Inside one loop a round is decided by itself; only from outside may a further round matter. */
function truthOf(graph: Graph, node: Node, wanted: string[] | null, inRound: boolean): Truth {
  const provisional = node.provisional || node.presumed
  if (node.status === 'not_needed' || node.status === 'closed') return { value: false, provisional }
  const ended = node.status === 'done' || node.status === 'waived'
  if (!ended && !node.presumed) return unknown
  if (wanted === null) return { value: true, provisional }
  if (node.outcome === null) return unknown
  if (wanted.includes(node.outcome)) return { value: true, provisional }
  if (node.presumed || (!inRound && mayComeAgain(graph, node))) return unknown
  return { value: false, provisional }
}

const unknown: Truth = { value: null, provisional: false }

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
  const deciding = parts.filter((part) => part.value === any)
  if (deciding.length > 0)
    return { value: any, provisional: deciding.every((part) => part.provisional) }
  if (parts.some((part) => part.value === null)) return unknown
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
  const at = targetInstance(graph, ref, from, instance)
  if (at < 1) return { state: 'never' }
  if (ref.date === 'scheduled') return bookedDate(graph, target, at, from)
  const node = graph.node(ref.step, at)
  if (ref.date === 'due') return dueDate(node)
  const truth = truthOf(graph, node, ref.outcome ?? null, sameRound(graph, from, ref.step))
  if (truth.value === false) return { state: 'never' }
  if (truth.value === true) return eventOf(graph, ref, target, node)
  const sure = ref.outcome === undefined || target.outcomes.length === 1
  const ahead = node.status === 'open' || node.status === 'waiting' || node.status === 'stopped'
  return sure && ahead ? bookedDate(graph, target, at, from) : { state: 'open' }
}

function dueDate(node: Node): Resolved {
  if (!node.dueOn) return { state: node.status === 'not_needed' ? 'never' : 'open' }
  return {
    state: 'met',
    on: node.dueOn,
    received: false,
    afterHours: false,
    provisional: node.provisional,
    lines: [startLine(node, node.dueOn, 'due')],
  }
}

function eventOf(graph: Graph, ref: StepRef, target: Step, node: Node): Resolved {
  const fact = graph.index.event(node.step, node.instance)
  const rules = rulesFor(graph.parties, target)
  const event = fact && datedEvent(fact, target, ref.date ?? 'received', rules)
  const on = event?.on ?? node.doneOn ?? (node.presumed ? node.dueOn : null)
  if (!on) return { state: node.status === 'done' || node.status === 'waived' ? 'undated' : 'open' }
  const happened = ref.date === 'sent' ? 'sent' : 'received'
  const basis = event ? happened : node.presumed ? 'presumed' : 'done'
  return {
    state: 'met',
    on,
    received: event !== null && event !== undefined && receivedByUtility(target),
    afterHours: event?.afterHours ?? false,
    provisional: node.provisional || node.presumed,
    lines: [startLine(node, on, basis), ...(event?.lines ?? [])],
  }
}

/**
 * The day a step is booked for; once it happened, the day it did, except for its own clock,
 * which goes on saying what was booked.
 */
function bookedDate(graph: Graph, target: Step, instance: number, from: Step): Resolved {
  const event = graph.index.event(target.key, instance)
  const rules = rulesFor(graph.parties, target)
  const happened = event && datedEvent(event, target, 'received', rules)
  if (happened && from.key !== target.key)
    return {
      ...happened,
      received: false,
      state: 'met',
      provisional: false,
      lines: [
        {
          kind: 'start',
          on: happened.on,
          text: `Starts from: ${target.title}, ${sayDate(happened.on)}.`,
        },
        ...happened.lines,
      ],
    }
  const on = graph.index.booked(target.key, instance)?.dueOn
  if (!on) return { state: 'open' }
  const text = `${target.title}, booked for ${sayDate(on)}.`
  return {
    state: 'met',
    on,
    received: false,
    afterHours: false,
    provisional: !happened,
    lines: [{ kind: 'start', on, text }],
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
  const needed = found.filter((one) => one.state !== 'never')
  if (needed.length === 0) return { state: 'never' }
  const dated = needed.filter((one) => one.state !== 'undated')
  if (dated.length === 0) return { state: 'undated' }
  const met = dated.filter((one) => one.state === 'met')
  const someUndated = rule.mode === 'any' && dated.length < needed.length
  if (met.length === 0) return { state: someUndated ? 'undated' : 'open' }
  if (rule.mode === 'all' && met.length < dated.length) return { state: 'open' }
  const chosen = met.reduce((a, b) => (isLater(a, b) === (rule.mode === 'all') ? b : a))
  const provisional = rule.mode === 'all' ? met.some((one) => one.provisional) : chosen.provisional
  return { ...chosen, provisional }
}

type Met = Extract<Resolved, { state: 'met' }>

/** Whether the second counts from a later day 0 than the first. */
function isLater(a: Met, b: Met): boolean {
  return b.on > a.on || (b.on === a.on && b.afterHours && !a.afterHours)
}
