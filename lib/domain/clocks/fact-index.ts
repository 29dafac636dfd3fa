import { effectiveFacts, type Fact } from '@/lib/domain/clocks/facts'
import { whyUnsound } from '@/lib/domain/clocks/fact-soundness'
import type { ProcedureBody } from '@/lib/domain/clocks/procedure'
import { marksOf, stopsOf, withdrawalOf, type Stop } from '@/lib/domain/clocks/stops'
import { localOf } from '@/lib/domain/clocks/zoned'

/** The facts in force, found by what a step asks for. */
export interface FactIndex {
  facts: Fact[]
  /** What closed a step: its event, or that it was taken over as done. */
  event(step: string, instance: number): Fact | undefined
  /** That a step was running when the application was taken over. */
  running(step: string, instance: number): Fact | undefined
  obligationFacts(step: string, instance: number, obligation: string): Fact[]
  booked(step: string, instance: number): Fact | undefined
  stated(step: string, instance: number): Fact | undefined
  extensions(step: string, instance: number): Fact[]
  waived(step: string, instance: number, obligation?: string): Fact | undefined
  /** The highest round of a step with an event; 0 without one. */
  lastRound(step: string): number
  stops(step: string): Stop[]
  withdrawn: Fact | undefined
  stranded: { factId: string; reason: string }[]
}

const slotOf = (kind: string, step = '', instance = 1, obligation = '') =>
  `${kind}:${step}#${instance}#${obligation}`

/**
 * Sorts the facts in force by what they say; a fact that fits no step is stranded, not lost.
 *
 * `zoneOf` gives the zone in which an instant about a step becomes a date.
 */
export function indexFacts(
  body: ProcedureBody,
  all: readonly Fact[],
  zoneOf: (step: string | undefined) => string,
): FactIndex {
  const stranded = strandedLinks(all)
  const facts: Fact[] = []
  const slots = new Map<string, Fact[]>()
  for (const stored of effectiveFacts(all)) {
    const reason = whyUnsound(stored, body)
    if (reason !== null) {
      stranded.push({ factId: stored.id, reason })
      continue
    }
    const fact = withDates(stored, zoneOf)
    facts.push(fact)
    const slot = slotOf(fact.kind, fact.step, fact.instance, fact.obligation)
    const list = slots.get(slot)
    if (list) list.push(fact)
    else slots.set(slot, [fact])
  }
  strandRepeats(slots, stranded)
  const marks = marksOf(facts)
  const stops = new Map<string, Stop[]>()
  return {
    facts,
    ...lookups(slots, facts),
    stops(step) {
      const known = stops.get(step) ?? stopsOf(marks, step)
      stops.set(step, known)
      return known
    },
    withdrawn: withdrawalOf(marks),
    stranded,
  }
}

function lookups(
  slots: ReadonlyMap<string, Fact[]>,
  facts: readonly Fact[],
): Omit<FactIndex, 'facts' | 'stops' | 'withdrawn' | 'stranded'> {
  const kinds = new Set<string>(facts.map((fact) => fact.kind))
  const find = (kind: string, step: string, instance: number, obligation?: string) =>
    (kinds.has(kind) && slots.get(slotOf(kind, step, instance, obligation))) || []
  const takenOver = (step: string, instance: number) => find('taken_over', step, instance).at(-1)
  const doneBefore = (step: string, instance: number) => {
    const fact = takenOver(step, instance)
    return fact?.body.sinceOn ? undefined : fact
  }
  const event = (step: string, instance: number) =>
    find('happened', step, instance)[0] ?? doneBefore(step, instance)
  return {
    event,
    running(step, instance) {
      const fact = takenOver(step, instance)
      return fact?.body.sinceOn ? fact : undefined
    },
    obligationFacts: (step, instance, obligation) => [
      ...find('taken_over', step, instance, obligation),
      ...find('happened', step, instance, obligation),
    ],
    booked: (step, instance) => find('scheduled', step, instance).at(-1),
    stated: (step, instance) => find('stated', step, instance).at(-1),
    extensions: (step, instance) => find('extension', step, instance),
    waived: (step, instance, obligation) => find('waived', step, instance, obligation).at(-1),
    lastRound(step) {
      const rounds = facts.filter((fact) => fact.step === step).map((fact) => fact.instance)
      return Math.max(0, ...rounds.filter((round) => event(step, round)))
    },
  }
}

/** An instant without a date gets the date it has where the step is received. */
function withDates(fact: Fact, zoneOf: (step: string | undefined) => string): Fact {
  const dateOf = (at: string | undefined) => at && localOf(at, zoneOf(fact.step)).on
  const sentOn = fact.sentOn ?? dateOf(fact.sentAt)
  const receivedOn = fact.receivedOn ?? dateOf(fact.receivedAt)
  if (sentOn === fact.sentOn && receivedOn === fact.receivedOn) return fact
  return { ...fact, ...(sentOn && { sentOn }), ...(receivedOn && { receivedOn }) }
}

/** Corrections and retractions that point at no fact here. */
function strandedLinks(all: readonly Fact[]): FactIndex['stranded'] {
  const ids = new Set(all.map((fact) => fact.id))
  return all
    .filter((fact) => fact.kind === 'correction' || fact.kind === 'retraction')
    .filter((fact) => fact.replacesId === undefined || !ids.has(fact.replacesId))
    .sort((a, b) => a.seq - b.seq)
    .map((fact) => ({ factId: fact.id, reason: 'It corrects a fact that is not here.' }))
}

function strandRepeats(slots: ReadonlyMap<string, Fact[]>, stranded: FactIndex['stranded']): void {
  for (const [slot, list] of slots) {
    if (!slot.startsWith('happened:') || !slot.endsWith('#')) continue
    for (const fact of list.slice(1))
      stranded.push({ factId: fact.id, reason: 'The same event stands recorded already.' })
  }
}
