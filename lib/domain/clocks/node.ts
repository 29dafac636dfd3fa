import { formatClosingHour, zoneName } from '@/lib/domain/format-date'
import { closeNode } from '@/lib/domain/clocks/closing'
import { runClock } from '@/lib/domain/clocks/clock-run'
import type { Fact } from '@/lib/domain/clocks/facts'
import {
  evaluate,
  resolveStart,
  rulesFor,
  type Graph,
  type Node,
  type Resolved,
} from '@/lib/domain/clocks/graph'
import type { Step } from '@/lib/domain/clocks/procedure'
import { receivedByUtility } from '@/lib/domain/clocks/receipt'
import { sayDate } from '@/lib/domain/clocks/say'
import { workingDue } from '@/lib/domain/clocks/working-due'
import { closingInstant } from '@/lib/domain/clocks/zoned'

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

/** A round of a step as the facts have it: whether needed, started, due, done. */
export function makeNode(graph: Graph, step: Step, instance: number): Node {
  const node = blankNode(graph, step, instance)
  const needs = step.needs ? evaluate(graph, step.needs, step, instance) : null
  if (needs?.value === false)
    return { ...node, status: 'not_needed', provisional: needs.provisional }
  const start: Resolved = step.start
    ? resolveStart(graph, step.start, step, instance)
    : { state: 'undated' }
  const running = graph.index.running(step.key, instance)
  const known = running ?? graph.index.event(step.key, instance)
  if (start.state === 'never' && !known) return { ...node, status: 'not_needed' }
  node.onLine = needs?.value !== null || step.expected === true
  node.provisional = needs?.provisional ?? false
  const begun = start.state === 'met' || start.state === 'undated'
  if ((needs?.value !== null && begun) || running) openNode(graph, step, node, start, running)
  stateDue(graph, step, node)
  dueInstant(graph, step, node)
  closeNode(graph, step, node)
  presume(node)
  node.derivation.push(sourceLine(step))
  return node
}

function openNode(
  graph: Graph,
  step: Step,
  node: Node,
  start: Resolved,
  running: Fact | undefined,
): void {
  const met = start.state === 'met' ? start : null
  node.status = 'open'
  node.startOn = met?.on ?? null
  node.provisional ||= Boolean(met?.provisional) && !running
  if (running) takeOver(node, running)
  else node.derivation.push(...(met?.lines ?? []))
  const clock = runClock(graph, step, node.instance, met, running)
  node.dueOn = clock.dueOn
  node.provisional ||= clock.provisional
  node.consequence = clock.onMiss ?? node.consequence
  node.derivation.push(...clock.lines)
  if (!clock.heldBy) return
  node.status = 'stopped'
  node.derivation.push({
    kind: 'stop',
    on: clock.heldBy.fromOn,
    text: `Clock stopped since ${sayDate(clock.heldBy.fromOn)}: ${clock.heldBy.why}. The due date moves by the days of the stop.`,
  })
}

/** The running step of a request taken over carries its own since and due dates. */
function takeOver(node: Node, running: Fact): void {
  const sinceOn = running.body.sinceOn!
  node.onLine = true
  node.startOn = sinceOn
  node.derivation.push({
    kind: 'start',
    on: sinceOn,
    text: `Taken over as running since ${sayDate(sinceOn)}${running.dueOn ? `, due ${sayDate(running.dueOn)} as entered` : ''}.`,
  })
}

function stateDue(graph: Graph, step: Step, node: Node): void {
  node.statedDueOn = graph.index.stated(step.key, node.instance)?.dueOn ?? null
  if (node.statedDueOn)
    node.derivation.push({
      kind: 'stated',
      on: node.statedDueOn,
      text: `The utility states ${sayDate(node.statedDueOn)}.`,
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
      text: `Closes ${formatClosingHour(closesAt)} ${zoneName(rules.zone, node.dueAt)}, the hour of ${rules.name}.`,
    })
  if (node.provisional)
    node.derivation.push({
      kind: 'provisional',
      text: 'Provisional: it hangs on a date or a choice that is not settled.',
    })
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
