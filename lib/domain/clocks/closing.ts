import { leadBefore } from '@/lib/domain/clocks/clock-run'
import { later } from '@/lib/domain/clocks/civil-date'
import type { Fact } from '@/lib/domain/clocks/facts'
import { rulesFor, type Graph, type Node } from '@/lib/domain/clocks/graph'
import { moneyState } from '@/lib/domain/clocks/money-state'
import type { ObligationRule, Step } from '@/lib/domain/clocks/procedure'
import { datedEvent, receivedByUtility } from '@/lib/domain/clocks/receipt'
import { sayDate } from '@/lib/domain/clocks/say'
import type { OrganizationRules, ScheduledItem } from '@/lib/domain/clocks/schedule-types'
import { eventDate } from '@/lib/domain/clocks/stops'
import { workingDue } from '@/lib/domain/clocks/working-due'
import { closingInstant, localOf } from '@/lib/domain/clocks/zoned'

/** Closes a round of a step by its event, by its obligations, or as waived or taken over. */
export function closeNode(graph: Graph, step: Step, node: Node): void {
  const fact = graph.index.event(step.key, node.instance)
  const waived = graph.index.waived(step.key, node.instance)
  if (fact) closeBy(graph, step, node, fact)
  else if (waived) waive(step, node, waived)
  else if (step.kind === 'gate') closeByObligations(graph, step, node)
}

/** A waived step counts as its usual, first outcome unless the fact names another. */
function waive(step: Step, node: Node, waived: Fact): void {
  node.status = 'waived'
  node.onLine = true
  node.outcome = waived.outcome ?? step.outcomes[0]?.key ?? null
  node.doneOn = eventDate(waived) ?? null
  const on = node.doneOn ? ` ${sayDate(node.doneOn)}` : ''
  node.derivation.push({ kind: 'done', text: `Waived${on}.` })
}

function closeBy(graph: Graph, step: Step, node: Node, fact: Fact): void {
  const rules = rulesFor(graph.parties, step)
  const basis = receivedByUtility(step) ? 'received' : 'sent'
  const event = datedEvent(fact, step, basis, rules)
  const early = node.status === 'waiting'
  node.status = 'done'
  node.onLine = true
  node.outcome = outcomeOf(step, fact)
  node.doneOn = event?.on ?? null
  node.provisional = false
  node.derivation = node.derivation.filter((line) => line.kind !== 'provisional')
  const on = node.doneOn ? ` ${sayDate(node.doneOn)}` : ''
  const text =
    fact.kind === 'taken_over'
      ? `Taken over as done${on}.`
      : `Done${on}${outcomeWords(step, node)}.`
  node.derivation.push({ kind: 'done', text })
  if (early)
    node.derivation.push({
      kind: 'note',
      text: `Recorded before what it follows${fact.reason ? `: ${fact.reason}` : ''}.`,
    })
  if (node.doneOn && node.dueOn) judge(step, node, fact, rules)
}

/** What was taken over without an outcome went the usual way, which is the first. */
function outcomeOf(step: Step, fact: Fact): string | null {
  const known = step.outcomes.find((one) => one.key === fact.outcome)
  if (known) return known.key
  const usual = fact.kind === 'taken_over' || step.outcomes.length === 1
  return usual && !fact.outcome ? (step.outcomes[0]?.key ?? null) : null
}

function outcomeWords(step: Step, node: Node): string {
  const outcome = step.outcomes.find((one) => one.key === node.outcome)
  return outcome && step.outcomes.length > 1 ? `: ${outcome.title}` : ''
}

/** In time, late, or on the day without an hour, which counts as in time. */
function judge(step: Step, node: Node, fact: Fact, rules: OrganizationRules): void {
  const { doneOn, dueOn } = node
  if (!doneOn || !dueOn) return
  const at = fact.receivedAt ?? fact.sentAt
  node.hourRecorded = at !== undefined
  node.doneLate = doneOn > dueOn
  if (doneOn !== dueOn || !receivedByUtility(step) || !rules.closesAt) return
  if (at !== undefined && localOf(at, rules.zone).on === dueOn) {
    const closes = closingInstant(dueOn, rules.closesAt, rules.zone)
    node.doneLate = Date.parse(at) > Date.parse(closes)
  }
  if (!node.hourRecorded)
    node.derivation.push({
      kind: 'hour',
      text: 'Done on the due date, hour not recorded: counted as in time.',
    })
}

function closeByObligations(graph: Graph, step: Step, node: Node): void {
  const rules = step.obligations ?? []
  if (rules.length === 0 || node.status === 'waiting' || node.status === 'not_needed') return
  const doneOn = rules.map((rule) => obligationDone(graph, step, node, rule))
  if (doneOn.some((on) => on === undefined)) return
  const last = doneOn.filter((on): on is string => on !== null && on !== undefined)
  node.status = 'done'
  node.onLine = true
  node.outcome = step.outcomes[0]?.key ?? null
  node.doneOn = last.length > 0 ? last.reduce(later) : null
  node.doneLate = node.doneOn && node.dueOn ? node.doneOn > node.dueOn : null
  node.derivation.push({ kind: 'done', text: `Done with the last of its ${rules.length} parts.` })
}

/** When an obligation was met; null: met, date unknown; undefined: open. */
function obligationDone(
  graph: Graph,
  step: Step,
  node: Node,
  rule: ObligationRule,
): string | null | undefined {
  if (graph.index.waived(step.key, node.instance, rule.key)) return null
  if (rule.what === 'money' && rule.target)
    return moneyState(graph, step, node, rule, rule.target).metOn
  const last = graph.index.obligationFacts(step.key, node.instance, rule.key).at(-1)
  return last && (eventDate(last) ?? null)
}

/** The obligations of a round as items of their own, with start-by dates and money. */
export function obligationItems(graph: Graph, step: Step, node: Node): ScheduledItem[] {
  if (node.status === 'not_needed') return []
  const workOn = workingDue(node)
  return (step.obligations ?? []).map((rule) => {
    const { presumed: _presumed, ...base } = node
    const doneOn = obligationDone(graph, step, node, rule)
    const money =
      rule.what === 'money' ? moneyState(graph, step, node, rule, rule.target ?? null) : null
    const open = node.status === 'open' || node.status === 'stopped' || node.status === 'waiting'
    const lead = rule.leadBusinessDays
    return {
      ...base,
      obligation: rule.key,
      title: rule.title,
      onLine: false,
      ownerRole: rule.owner ?? node.ownerRole,
      status: open && doneOn !== undefined ? ('done' as const) : node.status,
      outcome: null,
      doneOn: doneOn ?? (open ? null : node.doneOn),
      doneLate: null,
      startBy: workOn && lead ? leadBefore(workOn, lead, rulesFor(graph.parties, step)) : null,
      moneyTargetMinor: money?.targetMinor ?? null,
      moneyHeldMinor: money?.heldMinor ?? null,
      derivation: [
        ...node.derivation.filter((line) => line.kind === 'count' || line.kind === 'source'),
        ...(money?.lines ?? []),
      ],
    }
  })
}
