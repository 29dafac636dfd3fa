import { obligationItems } from '@/lib/domain/clocks/closing'
import { indexFacts, type FactIndex } from '@/lib/domain/clocks/fact-index'
import { termsOf, type Fact } from '@/lib/domain/clocks/facts'
import { rulesFor, type Graph, type Node } from '@/lib/domain/clocks/graph'
import { makeNode } from '@/lib/domain/clocks/node'
import { loopOf, stepOf, type ProcedureBody, type Step } from '@/lib/domain/clocks/procedure'
import { roundsInOrder, roundsOf } from '@/lib/domain/clocks/rounds'
import { sayDate } from '@/lib/domain/clocks/say'
import type { Parties, Schedule, ScheduledItem } from '@/lib/domain/clocks/schedule-types'
import { eventDate } from '@/lib/domain/clocks/stops'

/**
 * Every dated obligation that follows from a procedure, the calendars of those on the
 * application, and the facts. Pure: no clock, no storage; the same facts give the same answer,
 * in whatever order they are passed.
 *
 * It never throws on facts: what fits no step as things stand comes back under `stranded`.
 *
 * @throws RangeError when the procedure itself is not sound (a cycle outside declared loops, a
 * reference to a step it does not have); `validateProcedure` tells beforehand.
 */
export function schedule(body: ProcedureBody, parties: Parties, facts: readonly Fact[]): Schedule {
  const steps = new Map(body.steps.map((step) => [step.key, step]))
  const zoneOf = (key?: string) => {
    const step = key === undefined ? undefined : steps.get(key)
    return (step ? rulesFor(parties, step) : parties.operator).zone
  }
  const index = indexFacts(body, facts, zoneOf)
  const graph = graphOf(body, parties, index)
  const settled = roundsInOrder(graph).map(({ step, instance }, position) => {
    const node = overtaken(graph, graph.node(step.key, instance), step)
    return { step, node: withdrawnNode(index, { ...node, position }) }
  })
  const items = settled.flatMap(({ step, node }) => [
    itemOf(node),
    ...obligationItems(graph, step, node),
  ])
  strandMisfits(items, body, index)
  return {
    items,
    terms: graph.terms,
    stranded: index.stranded,
    ...standingOf(body, index, items),
  }
}

/** The procedure with its facts, each round of a step computed once when it is asked for. */
function graphOf(body: ProcedureBody, parties: Parties, index: FactIndex): Graph {
  const nodes = new Map<string, Node>()
  const rounds = new Map<string, number>()
  const running = new Set<string>()
  const graph: Graph = {
    body,
    index,
    parties,
    terms: termsOf(index.facts),
    node(step, instance) {
      const key = `${step}#${instance}`
      const known = nodes.get(key)
      if (known) return known
      if (running.has(key))
        throw new RangeError(`The procedure ${body.key} runs in a circle at "${step}".`)
      running.add(key)
      const made = makeNode(graph, stepOf(body, step), instance)
      running.delete(key)
      nodes.set(key, made)
      return made
    },
    instances(step) {
      const known = rounds.get(step) ?? roundsOf(graph, step)
      rounds.set(step, known)
      return known
    },
  }
  return graph
}

function overtaken(graph: Graph, node: Node, step: Step): Node {
  if (!step.overtakenBy || (node.status !== 'open' && node.status !== 'waiting')) return node
  const by = step.overtakenBy
    .flatMap((key) => laterRounds(graph, step, node.instance, key))
    .find((later) => later.status === 'done')
  if (!by) return node
  return {
    ...node,
    status: 'closed',
    // It was skipped, on no day: nothing to draw.
    onLine: false,
    derivation: [...node.derivation, { kind: 'note', text: `Overtaken by: ${by.title}.` }],
  }
}

/** Any round of a later step; within one loop those from the same round on. */
function laterRounds(graph: Graph, step: Step, instance: number, key: string): Node[] {
  const loop = loopOf(graph.body, step.key)
  const first = loop && loop === loopOf(graph.body, key) ? instance : 1
  const last = Math.max(first, graph.instances(key))
  return Array.from({ length: last - first + 1 }, (_, at) => graph.node(key, first + at))
}

function withdrawnNode(index: FactIndex, node: Node): Node {
  const fact = index.withdrawn
  if (!fact || (node.status !== 'open' && node.status !== 'waiting' && node.status !== 'stopped'))
    return node
  const on = eventDate(fact)
  const text = `The request was withdrawn${on ? ` ${sayDate(on)}` : ''}.`
  return {
    ...node,
    status: 'closed',
    onLine: false,
    derivation: [...node.derivation, { kind: 'note', text }],
  }
}

function itemOf(node: Node): ScheduledItem {
  const { presumed: _presumed, ...item } = node
  return item
}

/** Facts of a step that is not needed, of a round that is none, with an outcome unknown to it. */
function strandMisfits(
  items: readonly ScheduledItem[],
  body: ProcedureBody,
  index: FactIndex,
): void {
  const byRound = new Map(items.map((item) => [`${item.step}#${item.instance}`, item]))
  const outcomes = new Map(
    body.steps.map((step) => [step.key, new Set(step.outcomes.map((one) => one.key))]),
  )
  const strand = (fact: Fact, reason: string) => index.stranded.push({ factId: fact.id, reason })
  for (const fact of index.facts) {
    if (!fact.step) continue
    const item = byRound.get(`${fact.step}#${fact.instance}`)
    const closes = fact.kind === 'happened' && !fact.obligation
    if (!item) strand(fact, `As the facts stand, there is no round ${fact.instance} of this step.`)
    else if (item.status === 'not_needed')
      strand(fact, 'As the facts stand, this step is not needed.')
    else if (closes && fact.outcome && !outcomes.get(fact.step)!.has(fact.outcome))
      strand(fact, `The step has no outcome "${fact.outcome}"; it counts as done without one.`)
  }
}

function standingOf(
  body: ProcedureBody,
  index: FactIndex,
  items: readonly ScheduledItem[],
): Pick<Schedule, 'standing' | 'stage'> {
  const steps = items.filter((item) => item.obligation === '')
  const main = steps.filter((item) => item.kind !== 'anytime' && item.kind !== 'recurring')
  const doneStep = (key?: string) =>
    steps.some((item) => item.step === key && item.status === 'done')
  const current =
    main.find((item) => item.onLine && item.status === 'open' && item.party !== 'other') ??
    main.findLast((item) => item.status === 'done') ??
    main[0]
  const stage = current?.stage ?? ''
  if (index.withdrawn) return { standing: 'withdrawn', stage }
  if (doneStep(body.operationStep)) return { standing: 'in_operation', stage }
  return { standing: doneStep(body.filedStep) ? 'filed' : 'preparing', stage }
}
