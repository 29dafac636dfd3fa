import type { CivilDate } from '@/lib/domain/clocks/civil-date'
import type { Fact } from '@/lib/domain/clocks/facts'

/** A time in which clocks stand still; its first and its last day do not count. */
export interface Stop {
  fromOn: CivilDate
  /** Null while it lasts. */
  toOn: CivilDate | null
  /** The steps concerned; null: those running when it began. */
  scope: string[] | null
  /** From withdrawal to reinstatement everything stands still. */
  withdrawal: boolean
  why: string
}

const rank: Partial<Record<Fact['kind'], number>> = {
  withdrawn: 0,
  stop: 1,
  resume: 2,
  reinstated: 3,
}

/** The date a fact happened on, as far as recorded. */
export function eventDate(fact: Fact): CivilDate | undefined {
  return fact.receivedOn ?? fact.sentOn ?? fact.dueOn
}

function markDate(fact: Fact): CivilDate {
  return eventDate(fact) ?? fact.recordedAt.slice(0, 10)
}

/**
 * Stops, resumptions, withdrawals and reinstatements by the day they hold from. On one day the
 * stop comes first: the reading that leaves less time.
 */
export function marksOf(facts: readonly Fact[]): Fact[] {
  return facts
    .filter((fact) => rank[fact.kind] !== undefined)
    .sort(
      (a, b) =>
        markDate(a).localeCompare(markDate(b)) || rank[a.kind]! - rank[b.kind]! || a.seq - b.seq,
    )
}

/** The stops of a step, told by the days of the marks and not by the order they came in. */
export function stopsOf(marks: readonly Fact[], step: string): Stop[] {
  const stops: Stop[] = []
  const concerns = (scope?: string[]) => scope === undefined || scope.includes(step)
  const end = (fact: Fact, withdrawal: boolean) => {
    for (const stop of stops)
      if (stop.toOn === null && stop.withdrawal === withdrawal) stop.toOn = markDate(fact)
  }
  for (const fact of marks) {
    if (fact.kind === 'reinstated') end(fact, true)
    else if (fact.kind === 'withdrawn') stops.push(stopFrom(fact, true))
    else if (!concerns(fact.body.scope)) continue
    else if (fact.kind === 'stop') stops.push(stopFrom(fact, false))
    else end(fact, false)
  }
  return stops
}

function stopFrom(fact: Fact, withdrawal: boolean): Stop {
  return {
    fromOn: markDate(fact),
    toOn: null,
    scope: withdrawal ? null : (fact.body.scope ?? null),
    withdrawal,
    why: withdrawal ? 'withdrawn' : (fact.body.note ?? 'clock stopped'),
  }
}

/** The withdrawal in force, if the last word was one. */
export function withdrawalOf(marks: readonly Fact[]): Fact | undefined {
  const last = marks.findLast((fact) => fact.kind === 'withdrawn' || fact.kind === 'reinstated')
  return last?.kind === 'withdrawn' ? last : undefined
}
