/** Facts as the pure rules see them: dated statements, append-only, corrected by later ones. */

export const factKinds = [
  'happened',
  'taken_over',
  'scheduled',
  'stated',
  'extension',
  'stop',
  'resume',
  'waived',
  'withdrawn',
  'reinstated',
  'changed',
  'correction',
  'retraction',
] as const
export type FactKind = (typeof factKinds)[number]

export const channels = ['portal', 'email', 'letter', 'call', 'meeting', 'hand'] as const
export type Channel = (typeof channels)[number]

/** The study or agreement that last assigned network upgrade cost to the request. */
export const assigningStudies = [
  'cluster_study',
  'cluster_restudy',
  'facilities_study',
  'facilities_restudy',
  'agreement',
] as const
export type AssigningStudy = (typeof assigningStudies)[number]

export interface Terms {
  requestNo?: string
  poi?: string
  poiVoltageKv?: number
  /** MWac at the POI, by standing. */
  requestedMw?: number
  studiedMw?: number
  grantedMw?: number
  installedMw?: number
  dcMw?: number
  technology?: string
  storageMw?: number
  storageMwh?: number
  serviceType?: string
  onMainline?: boolean
  codOn?: string
  /** Network upgrade cost assigned to the request, and by which study; minor units. */
  assignedCostMinor?: number
  assignedBy?: AssigningStudy
  /** The share of the study cost allocated to the request so far; minor units. */
  allocatedStudyCostMinor?: number
}

export interface FactBody {
  terms?: Terms
  /** Pins this procedure revision from here on. */
  procedureRevisionId?: string
  /** For an extension. */
  decision?: 'asked' | 'granted' | 'refused'
  lengthDays?: number
  unit?: 'business_day' | 'calendar_day'
  /** For a stop or resume: the steps concerned, all running ones if left out. */
  scope?: string[]
  /** For a taken-over running step. */
  sinceOn?: string
  note?: string
  effect?: string
}

export interface Fact {
  id: string
  seq: number
  kind: FactKind
  step?: string
  instance: number
  obligation?: string
  sentOn?: string
  sentAt?: string
  receivedOn?: string
  receivedAt?: string
  /** A date the fact itself sets: extended to, stated due, scheduled for, running due. */
  dueOn?: string
  dueAt?: string
  channel?: Channel
  outcome?: string
  amountMinor?: number
  body: FactBody
  replacesId?: string
  reason?: string
  recordedAt: string
}

/**
 * The facts in force: corrections take the place (kind and order) of what they correct, and
 * retracted facts are gone. A chain of corrections resolves to its last link, so retracting a
 * correction takes the whole statement away, and correcting a retraction brings it back.
 *
 * A correction carries the full corrected content in its own fields; its kind is that of the
 * fact it replaces. The order in which the facts are passed does not matter.
 */
export function effectiveFacts(facts: readonly Fact[]): Fact[] {
  const replacedBy = new Map<string, Fact>()
  const ordered = [...facts].sort((a, b) => a.seq - b.seq || a.id.localeCompare(b.id))
  for (const fact of ordered) if (fact.replacesId) replacedBy.set(fact.replacesId, fact)
  const result: Fact[] = []
  for (const fact of ordered) {
    if (fact.kind === 'correction' || fact.kind === 'retraction') continue
    const last = lastLink(fact, replacedBy)
    if (last.kind === 'retraction') continue
    result.push(last === fact ? fact : { ...last, kind: fact.kind, seq: fact.seq })
  }
  return result
}

function lastLink(fact: Fact, replacedBy: ReadonlyMap<string, Fact>): Fact {
  let current = fact
  const seen = new Set<string>()
  for (;;) {
    const next = replacedBy.get(current.id)
    if (!next || seen.has(next.id)) return current
    seen.add(next.id)
    current = next
  }
}

/** The terms of the request in force: later statements win, field by field. */
export function termsOf(facts: readonly Fact[]): Terms {
  const terms: Terms = {}
  for (const fact of effectiveFacts(facts)) {
    if (
      fact.kind === 'changed' &&
      fact.body.decision !== 'asked' &&
      fact.body.decision !== 'refused'
    )
      Object.assign(terms, fact.body.terms)
  }
  return terms
}
