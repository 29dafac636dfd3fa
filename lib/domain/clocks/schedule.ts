import { indexFacts, eventDate, type FactIndex } from '@/lib/domain/clocks/fact-index'
import { termsOf, type Fact } from '@/lib/domain/clocks/facts'
import {
  evaluate,
  resolveStart,
  rulesFor,
  type Graph,
  type Node,
  type Resolved,
} from '@/lib/domain/clocks/graph'
import { runClock } from '@/lib/domain/clocks/clock-run'
import { closeNode, obligationItems } from '@/lib/domain/clocks/closing'
import { loopOf, stepOf, type ProcedureBody, type Step } from '@/lib/domain/clocks/procedure'
import { receivedByUtility } from '@/lib/domain/clocks/receipt'
import { sayDate } from '@/lib/domain/clocks/say'
import type { Parties, Schedule, ScheduledItem } from '@/lib/domain/clocks/schedule-types'
import { closingInstant } from '@/lib/domain/clocks/zoned'

/**
 * Every dated obligation that follows from a procedure, the calendars of those on the
 * application, and the facts. Pure: no clock, no storage; the same facts give the same answer.
 *
 * It never throws on facts: what fits no step as things stand comes back under `stranded`.
 *
 * @throws RangeError when the procedure itself is not sound (a cycle outside declared loops, a
 * reference to a step it does not have).
 */
export function schedule(body: ProcedureBody, parties: Parties, facts: readonly Fact[]): Schedule {
  const index = indexFacts(body, facts)
  const terms = termsOf(facts)
  const nodes = new Map<string, Node>()
  const running = new Set<string>()
  const graph: Graph = {
    body,
    index,
    parties,
    terms,
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
    instances: (step) => roundsOf(graph, step),
  }
  const order = roundsInOrder(graph)
  const settled = order.map(({ step, instance }, position) => {
    const node = overtaken(graph, graph.node(step.key, instance), step)
    return { step, node: withdrawnNode(index, { ...node, position }) }
  })
  const items = settled.flatMap(({ step, node }) => [
    itemOf(node),
    ...obligationItems(graph, step, node),
  ])
  strandBeyond(graph)
  strandUnneeded(items, index)
  return { items, terms, stranded: index.stranded, ...standingOf(body, index, items) }
}

/** A further round exists once the loop's last step closed, as needed, with its outcome. */
function roundsOf(graph: Graph, step: string): number {
  const loop = loopOf(graph.body, step)
  if (!loop) return 1
  for (let n = 1; ; n += 1) {
    if (n >= (loop.max ?? 99) || !graph.index.happened(loop.again.step, n)) return n
    const node = graph.node(loop.again.step, n)
    if (node.status !== 'done' || node.outcome !== loop.again.outcome) return n
  }
}

function strandBeyond(graph: Graph): void {
  const { body, index } = graph
  for (const fact of index.facts) {
    if (!fact.step || !body.steps.some((step) => step.key === fact.step)) continue
    if (fact.instance <= graph.instances(fact.step)) continue
    index.stranded.push({
      factId: fact.id,
      reason: `As the facts stand, there is no round ${fact.instance} of this step.`,
    })
  }
}

/** Each round of each step in the order it is drawn; a loop's rounds follow one another. */
function roundsInOrder(graph: Graph): { step: Step; instance: number }[] {
  const { body, index } = graph
  const rounds: { step: Step; instance: number }[] = []
  const done = new Set<string>()
  for (const step of body.steps) {
    const loop = loopOf(body, step.key)
    if (step.kind === 'anytime' && !index.happened(step.key, 1)) continue
    if (!loop) rounds.push({ step, instance: 1 })
    if (!loop || done.has(loop.key)) continue
    done.add(loop.key)
    for (let instance = 1; instance <= graph.instances(step.key); instance += 1)
      for (const key of loop.scope) rounds.push({ step: stepOf(body, key), instance })
  }
  return rounds
}

function blankNode(graph: Graph, step: Step, instance: number): Node {
  const rules = rulesFor(graph.parties, step)
  return {
    step: step.key,
    instance,
    obligation: '',
    title: step.title,
    short: step.short ?? null,
    stage: step.stage,
    party: step.party,
    kind: step.kind,
    onLine: false,
    ownerRole: step.owner ?? null,
    consequence: step.onMiss,
    status: 'waiting',
    provisional: false,
    outcome: null,
    startOn: null,
    dueOn: null,
    dueAt: null,
    zone: rules.zone,
    statedDueOn: null,
    startBy: null,
    doneOn: null,
    doneLate: null,
    hourRecorded: null,
    moneyTargetMinor: null,
    moneyHeldMinor: null,
    source: step.source,
    derivation: [],
    position: 0,
    presumed: false,
  }
}

function makeNode(graph: Graph, step: Step, instance: number): Node {
  const node = blankNode(graph, step, instance)
  const needs = step.needs ? evaluate(graph, step.needs, step, instance) : null
  if (needs?.value === false)
    return { ...node, status: 'not_needed', provisional: needs.provisional }
  const start: Resolved = step.start
    ? resolveStart(graph, step.start, step, instance)
    : { state: 'open' }
  const begun = !step.start || start.state === 'met'
  if (start.state === 'never' && !hasEvent(graph.index, step, instance))
    return { ...node, status: 'not_needed' }
  node.onLine = needs?.value !== null || step.expected === true
  node.provisional = needs?.provisional ?? false
  if (needs?.value !== null && begun) openNode(graph, step, node, start)
  takeOver(graph, step, node)
  dueInstant(graph, step, node)
  closeNode(graph, step, node)
  presume(node)
  node.derivation.push(sourceLine(step))
  return node
}

function hasEvent(index: FactIndex, step: Step, instance: number): boolean {
  return Boolean(index.happened(step.key, instance) ?? index.takenOver(step.key, instance))
}

function openNode(graph: Graph, step: Step, node: Node, start: Resolved): void {
  const met = start.state === 'met' ? start : null
  node.status = 'open'
  node.startOn = met?.on ?? null
  node.derivation.push(...(met?.lines ?? []))
  const clock = runClock(graph, step, node.instance, met)
  node.dueOn = clock.dueOn
  node.provisional ||= Boolean(met?.provisional) || clock.provisional
  node.consequence = clock.onMiss ?? node.consequence
  node.derivation.push(...clock.lines)
  const holding = graph.index.stops.find(
    (stop) =>
      stop.toOn === null &&
      stop.why !== 'withdrawn' &&
      (stop.scope === null || stop.scope.includes(step.key)),
  )
  if (holding) {
    node.status = 'stopped'
    node.derivation.push({
      kind: 'stop',
      on: holding.fromOn,
      text: `Clock stopped since ${sayDate(holding.fromOn)}: ${holding.why}.`,
    })
  }
  const stated = graph.index.stated(step.key, node.instance)
  node.statedDueOn = stated?.dueOn ?? null
  if (node.statedDueOn)
    node.derivation.push({
      kind: 'stated',
      on: node.statedDueOn,
      text: `The utility states ${sayDate(node.statedDueOn)}.`,
    })
}

/** The running step of a request taken over carries its own since and due dates. */
function takeOver(graph: Graph, step: Step, node: Node): void {
  const fact = graph.index.takenOver(step.key, node.instance)
  if (!fact?.body.sinceOn) return
  node.status = 'open'
  node.onLine = true
  node.startOn = fact.body.sinceOn
  node.dueOn = fact.dueOn ?? node.dueOn
  node.derivation.push({
    kind: 'start',
    on: fact.body.sinceOn,
    text: `Taken over as running since ${sayDate(fact.body.sinceOn)}${fact.dueOn ? `, due ${sayDate(fact.dueOn)} as entered` : ''}.`,
  })
}

function dueInstant(graph: Graph, step: Step, node: Node): void {
  const rules = rulesFor(graph.parties, step)
  const workOn = workingDue(node)
  if (!workOn) return
  const closesAt = receivedByUtility(step) ? rules.closesAt : null
  node.dueAt = closingInstant(workOn, closesAt, rules.zone)
  if (closesAt)
    node.derivation.push({
      kind: 'hour',
      on: workOn,
      text: `Closes ${closesAt}, ${rules.zone.replace('_', ' ')}, the hour of ${rules.name}.`,
    })
  if (node.provisional)
    node.derivation.push({
      kind: 'provisional',
      text: 'Provisional: counted from a booked or presumed date.',
    })
}

/** People work to the earlier of our count and the date the utility states. */
export function workingDue(item: {
  dueOn: string | null
  statedDueOn: string | null
}): string | null {
  if (!item.dueOn || !item.statedDueOn) return item.dueOn ?? item.statedDueOn
  return item.dueOn < item.statedDueOn ? item.dueOn : item.statedDueOn
}

function presume(node: Node): void {
  if (node.status !== 'open' || node.consequence.effect !== 'presumed' || !node.dueOn) return
  node.presumed = true
  node.outcome = node.consequence.outcome ?? null
  node.derivation.push({
    kind: 'presumed',
    on: node.dueOn,
    text: `Presumed after ${sayDate(node.dueOn)} until a person confirms it.`,
  })
}

function sourceLine(step: Step) {
  const marks = {
    read: 'read',
    adapted: 'read in an adapted text',
    from_memory: 'from memory, to be verified',
  }
  const { document, section, basis } = step.source
  return { kind: 'source' as const, text: `${document}, section ${section} (${marks[basis]}).` }
}

function overtaken(graph: Graph, node: Node, step: Step): Node {
  if (!step.overtakenBy || (node.status !== 'open' && node.status !== 'waiting')) return node
  const by = step.overtakenBy
    .map((key) => graph.node(key, graph.instances(key)))
    .find((later) => later.status === 'done')
  if (!by) return node
  return {
    ...node,
    status: 'closed',
    derivation: [...node.derivation, { kind: 'note', text: `Overtaken by: ${by.title}.` }],
  }
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

function strandUnneeded(items: readonly ScheduledItem[], index: FactIndex): void {
  const unneeded = new Set(
    items
      .filter((item) => item.status === 'not_needed')
      .map((item) => `${item.step}#${item.instance}`),
  )
  for (const fact of index.facts)
    if (fact.kind === 'happened' && fact.step && unneeded.has(`${fact.step}#${fact.instance}`))
      index.stranded.push({
        factId: fact.id,
        reason: 'As the facts stand, this step is not needed.',
      })
}

function standingOf(
  body: ProcedureBody,
  index: FactIndex,
  items: readonly ScheduledItem[],
): Pick<Schedule, 'standing' | 'stage'> {
  const steps = items.filter((item) => item.obligation === '')
  const doneStep = (key?: string) =>
    steps.some((item) => item.step === key && item.status === 'done')
  const current =
    steps.find((item) => item.onLine && item.status === 'open' && item.party !== 'other') ??
    steps.findLast((item) => item.status === 'done') ??
    steps[0]
  const stage = current?.stage ?? ''
  if (index.withdrawn) return { standing: 'withdrawn', stage }
  if (doneStep(body.operationStep)) return { standing: 'in_operation', stage }
  return { standing: doneStep(body.filedStep) ? 'filed' : 'preparing', stage }
}
