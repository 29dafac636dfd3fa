import type { CivilDate } from '@/lib/domain/clocks/civil-date'
import { effectiveFacts, type Fact } from '@/lib/domain/clocks/facts'
import type { ProcedureBody } from '@/lib/domain/clocks/procedure'

export interface Stop {
  fromOn: CivilDate
  /** Null while it lasts. */
  toOn: CivilDate | null
  /** The steps concerned; null: all. */
  scope: string[] | null
  why: string
}

/** The facts in force, found by what a step asks for. */
export interface FactIndex {
  facts: Fact[]
  /** The event that closed a step. */
  happened(step: string, instance: number): Fact | undefined
  takenOver(step: string, instance: number): Fact | undefined
  obligationFacts(step: string, instance: number, obligation: string): Fact[]
  /** The last day booked for a step, for one round of it or for any. */
  booked(step: string, instance?: number): Fact | undefined
  stated(step: string, instance: number): Fact | undefined
  extensions(step: string, instance: number): Fact[]
  waived(step: string, instance: number, obligation?: string): Fact | undefined
  stops: Stop[]
  withdrawn: Fact | undefined
  stranded: { factId: string; reason: string }[]
}

const key = (step: string | undefined, instance: number, obligation = '') =>
  `${step ?? ''}#${instance}#${obligation}`

/** Sorts the facts in force by what they say; a fact that fits no step is stranded, not lost. */
export function indexFacts(body: ProcedureBody, all: readonly Fact[]): FactIndex {
  const facts = effectiveFacts(all)
  const byKind = new Map<string, Fact[]>()
  const stranded: FactIndex['stranded'] = []
  const known = new Set(body.steps.map((step) => step.key))
  for (const fact of facts) {
    if (fact.step !== undefined && !known.has(fact.step)) {
      stranded.push({ factId: fact.id, reason: `The procedure has no step "${fact.step}".` })
      continue
    }
    const slot = `${fact.kind}:${key(fact.step, fact.instance, fact.obligation)}`
    byKind.set(slot, [...(byKind.get(slot) ?? []), fact])
  }
  const find = (kind: string, step: string, instance: number, obligation?: string) =>
    byKind.get(`${kind}:${key(step, instance, obligation)}`) ?? []
  strandRepeats(byKind, stranded)
  return {
    facts,
    happened: (step, instance) => find('happened', step, instance)[0],
    takenOver: (step, instance) => find('taken_over', step, instance).at(-1),
    obligationFacts: (step, instance, obligation) => find('happened', step, instance, obligation),
    booked: (step, instance) =>
      facts.findLast(
        (fact) =>
          fact.kind === 'scheduled' &&
          fact.step === step &&
          (instance === undefined || fact.instance === instance),
      ),
    stated: (step, instance) => find('stated', step, instance).at(-1),
    extensions: (step, instance) => find('extension', step, instance),
    waived: (step, instance, obligation) => find('waived', step, instance, obligation).at(-1),
    stops: stopsOf(facts),
    withdrawn: withdrawalOf(facts),
    stranded,
  }
}

function strandRepeats(byKind: Map<string, Fact[]>, stranded: FactIndex['stranded']): void {
  for (const [slot, list] of byKind) {
    if (!slot.startsWith('happened:') || !slot.endsWith('#')) continue
    for (const fact of list.slice(1))
      stranded.push({ factId: fact.id, reason: 'The same event stands recorded already.' })
  }
}

/** The date a fact happened on, as far as recorded. */
export function eventDate(fact: Fact): CivilDate | undefined {
  return fact.receivedOn ?? fact.sentOn ?? fact.dueOn
}

function stopsOf(facts: readonly Fact[]): Stop[] {
  const stops: Stop[] = []
  for (const fact of facts) {
    const on = eventDate(fact)
    if (!on) continue
    if (fact.kind === 'stop')
      stops.push({
        fromOn: on,
        toOn: null,
        scope: fact.body.scope ?? null,
        why: fact.body.note ?? 'clock stopped',
      })
    if (fact.kind === 'withdrawn')
      stops.push({ fromOn: on, toOn: null, scope: null, why: 'withdrawn' })
    const ends = fact.kind === 'resume' ? 'clock' : fact.kind === 'reinstated' ? 'withdrawn' : null
    if (!ends) continue
    const open = stops.findLast(
      (stop) => stop.toOn === null && (stop.why === 'withdrawn') === (ends === 'withdrawn'),
    )
    if (open) open.toOn = on
  }
  return stops
}

function withdrawalOf(facts: readonly Fact[]): Fact | undefined {
  const last = facts.findLast((fact) => fact.kind === 'withdrawn' || fact.kind === 'reinstated')
  return last?.kind === 'withdrawn' ? last : undefined
}

/** Whether a stop holds the step on that day; the first and the last day of a stop do not count. */
export function stopHolding(stops: readonly Stop[], step: string, on: CivilDate): Stop | undefined {
  return stops.find(
    (stop) =>
      (stop.scope === null || stop.scope.includes(step)) &&
      on >= stop.fromOn &&
      (stop.toOn === null || on <= stop.toOn),
  )
}
