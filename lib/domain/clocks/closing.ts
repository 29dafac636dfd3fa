import { leadBefore } from '@/lib/domain/clocks/clock-run'
import { later } from '@/lib/domain/clocks/civil-date'
import { eventDate } from '@/lib/domain/clocks/fact-index'
import type { Fact } from '@/lib/domain/clocks/facts'
import { rulesFor, type Graph, type Node } from '@/lib/domain/clocks/graph'
import type { ObligationRule, Step } from '@/lib/domain/clocks/procedure'
import { datedEvent, receivedByUtility } from '@/lib/domain/clocks/receipt'
import { sayDate } from '@/lib/domain/clocks/say'
import type { ScheduledItem } from '@/lib/domain/clocks/schedule-types'
import { localOf } from '@/lib/domain/clocks/zoned'

/** Closes a round of a step by its event, by its obligations, or as waived or taken over. */
export function closeNode(graph: Graph, step: Step, node: Node): void {
  const fact = graph.index.happened(step.key, node.instance) ?? doneBefore(graph, step, node)
  const waived = graph.index.waived(step.key, node.instance)
  if (fact) return closeBy(graph, step, node, fact)
  if (waived) {
    node.status = 'waived'
    node.onLine = true
    node.doneOn = eventDate(waived) ?? null
    node.derivation.push({
      kind: 'done',
      text: `Waived${node.doneOn ? ` ${sayDate(node.doneOn)}` : ''}.`,
    })
    return
  }
  closeByObligations(graph, step, node)
}

function doneBefore(graph: Graph, step: Step, node: Node): Fact | undefined {
  const fact = graph.index.takenOver(step.key, node.instance)
  return fact?.body.sinceOn ? undefined : fact
}

function closeBy(graph: Graph, step: Step, node: Node, fact: Fact): void {
  const event = datedEvent(
    fact,
    step,
    receivedByUtility(step) ? 'received' : 'sent',
    rulesFor(graph.parties, step),
  )
  const early = node.status === 'waiting'
  node.status = 'done'
  node.onLine = true
  node.outcome = fact.outcome ?? (step.outcomes.length === 1 ? step.outcomes[0]!.key : null)
  node.doneOn = event?.on ?? null
  node.provisional = false
  if (fact.kind === 'taken_over')
    node.derivation.push({ kind: 'done', text: 'Taken over as done.' })
  else
    node.derivation.push({
      kind: 'done',
      text: `Done${node.doneOn ? ` ${sayDate(node.doneOn)}` : ''}${outcomeWords(step, node)}.`,
    })
  if (early)
    node.derivation.push({
      kind: 'note',
      text: `Recorded before what it follows${fact.reason ? `: ${fact.reason}` : ''}.`,
    })
  if (node.doneOn && node.dueOn) judge(node, fact, event?.afterHours ?? false)
}

function outcomeWords(step: Step, node: Node): string {
  const outcome = step.outcomes.find((one) => one.key === node.outcome)
  return outcome && step.outcomes.length > 1 ? `: ${outcome.title}` : ''
}

/** In time, late, or on the day without an hour, which counts as in time. */
function judge(node: Node, fact: Fact, afterHours: boolean): void {
  const at = fact.receivedAt ?? fact.sentAt
  const dueOn = node.dueOn!
  if (node.doneOn! !== dueOn) {
    node.doneLate = node.doneOn! > dueOn
    node.hourRecorded = at !== undefined
    return
  }
  node.hourRecorded = at !== undefined
  node.doneLate = at !== undefined && (afterHours || isPast(at, node))
  if (!node.hourRecorded)
    node.derivation.push({
      kind: 'hour',
      text: 'Done on the due date, hour not recorded: counted as in time.',
    })
}

function isPast(at: string, node: Node): boolean {
  if (!node.dueAt || localOf(at, node.zone).on !== node.dueOn) return false
  return Date.parse(at) > Date.parse(node.dueAt)
}

function closeByObligations(graph: Graph, step: Step, node: Node): void {
  const rules = step.obligations ?? []
  if (rules.length === 0 || node.status === 'waiting') return
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
  const facts = graph.index.obligationFacts(step.key, node.instance, rule.key)
  const last = facts.at(-1)
  if (!last) return undefined
  if (rule.what === 'money' && rule.target && heldOf(facts) < rule.target.amountMinor)
    return undefined
  return eventDate(last) ?? null
}

function heldOf(facts: readonly Fact[]): number {
  return facts.reduce((sum, fact) => sum + (fact.amountMinor ?? 0), 0)
}

/** The obligations of a round as items of their own, with start-by dates and money. */
export function obligationItems(graph: Graph, step: Step, node: Node): ScheduledItem[] {
  if (node.status === 'not_needed') return []
  return (step.obligations ?? []).map((rule) => {
    const { presumed: _presumed, ...base } = node
    const doneOn = obligationDone(graph, step, node, rule)
    const facts = graph.index.obligationFacts(step.key, node.instance, rule.key)
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
      startBy:
        node.dueOn && lead ? leadBefore(node.dueOn, lead, rulesFor(graph.parties, step)) : null,
      moneyTargetMinor: rule.target?.amountMinor ?? null,
      moneyHeldMinor: rule.what === 'money' ? heldOf(facts) : null,
      derivation: node.derivation.filter((line) => line.kind === 'count' || line.kind === 'source'),
    }
  })
}
