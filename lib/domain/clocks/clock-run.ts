import {
  addDays,
  dayNumber,
  earlier,
  fromDayNumber,
  later,
  type CivilDate,
} from '@/lib/domain/clocks/civil-date'
import { businessDayFrom } from '@/lib/domain/clocks/calendar'
import { count, skippedDays, type CountedDay } from '@/lib/domain/clocks/count'
import type { DerivationLine } from '@/lib/domain/clocks/derivation'
import { stopHolding } from '@/lib/domain/clocks/fact-index'
import type { Fact } from '@/lib/domain/clocks/facts'
import {
  evaluate,
  resolveRef,
  rulesFor,
  type Graph,
  type Resolved,
} from '@/lib/domain/clocks/graph'
import type { ClockRule, Consequence, Step } from '@/lib/domain/clocks/procedure'
import { sayDate, sayLength } from '@/lib/domain/clocks/say'
import type { OrganizationRules } from '@/lib/domain/clocks/schedule-types'

export interface RunClock {
  dueOn: CivilDate | null
  provisional: boolean
  onMiss: Consequence | null
  lines: DerivationLine[]
}

type Met = Extract<Resolved, { state: 'met' }>

/** The due date of this round of an open step: count, cap, extension. */
export function runClock(graph: Graph, step: Step, instance: number, start: Met | null): RunClock {
  const clock = step.clocks.find(
    (rule) => !rule.when || evaluate(graph, rule.when, step, instance).value === true,
  )
  if (!clock) return { dueOn: null, provisional: false, onMiss: null, lines: [] }
  const from = clock.from ? resolveRef(graph, clock.from, step, instance) : start
  if (from?.state !== 'met') {
    const text = 'No date yet: the clock counts from a date that is not known.'
    return {
      dueOn: null,
      provisional: false,
      onMiss: clock.onMiss ?? null,
      lines: [{ kind: 'note', text }],
    }
  }
  const rules = countingRules(graph, step, clock)
  const counted = countFrom(graph, step, clock, from, rules)
  const capped = capIt(graph, step, instance, clock, counted.dueOn)
  const extended = extendIt(graph, step, instance, capped.dueOn, rules)
  return {
    dueOn: extended.dueOn,
    provisional: from.provisional || capped.provisional,
    onMiss: clock.onMiss ?? null,
    lines: [
      ...(clock.from ? from.lines : []),
      ...counted.lines,
      ...capped.lines,
      ...extended.lines,
    ],
  }
}

function countingRules(graph: Graph, step: Step, clock: ClockRule): OrganizationRules {
  return (clock.calendar && graph.parties[clock.calendar]) || rulesFor(graph.parties, step)
}

function countFrom(
  graph: Graph,
  step: Step,
  clock: ClockRule,
  from: Met,
  rules: OrganizationRules,
): { dueOn: CivilDate; lines: DerivationLine[] } {
  const { stops } = graph.index
  const concerned = stops.filter((stop) => stop.scope === null || stop.scope.includes(step.key))
  const held = (day: number) => stopHolding(concerned, step.key, fromDayNumber(day))?.why ?? null
  const openStop = concerned.find((stop) => stop.toOn === null)
  const start = from.afterHours ? businessDayFrom(rules.calendar, addDays(from.on, 1), 1) : from.on
  const result = count(
    {
      start,
      length: clock.length,
      unit: clock.unit,
      direction: clock.direction,
      roll: clock.roll,
      receipt: rules.receiptRule,
      includeStart: clock.includeStart,
      stopped:
        concerned.length === 0 || openStop
          ? undefined
          : (day) => (held(day) === null ? null : `clock stopped (${held(day)})`),
    },
    rules.calendar,
  )
  return { dueOn: result.dueOn, lines: countLines(clock, result.dueOn, rules, result.derivation) }
}

function countLines(
  clock: ClockRule,
  dueOn: CivilDate,
  rules: OrganizationRules,
  days: CountedDay[],
): DerivationLine[] {
  const { weekendDays, named } = skippedDays(days)
  const way = clock.direction === 'before' ? 'at least' : ''
  const lines: DerivationLine[] = named.map((day) => ({
    kind: day.reason.startsWith('clock stopped')
      ? 'stop'
      : day.reason.includes('rolls')
        ? 'roll'
        : 'skip',
    on: day.on,
    text: `${sayDate(day.on)} does not count: ${day.reason}.`,
  }))
  if (weekendDays > 0)
    lines.push({
      kind: 'skip',
      text: `${weekendDays} weekend day${weekendDays === 1 ? '' : 's'} not counted.`,
    })
  const words = `${way} ${sayLength(clock.length, clock.unit)} ${clock.direction === 'before' ? 'before' : ''}`
  return [
    {
      kind: 'count',
      on: dueOn,
      text: `${words.trim().replace(/\s+/g, ' ')}, calendar of ${rules.name}: ${sayDate(dueOn)}.`,
    },
    ...lines,
  ]
}

function capIt(
  graph: Graph,
  step: Step,
  instance: number,
  clock: ClockRule,
  dueOn: CivilDate,
): { dueOn: CivilDate; provisional: boolean; lines: DerivationLine[] } {
  const result = { dueOn, provisional: false, lines: [] as DerivationLine[] }
  if (clock.neverAfter) {
    const cap = resolveRef(graph, clock.neverAfter, step, instance)
    if (cap.state === 'met' && cap.on < dueOn) {
      result.dueOn = earlier(dueOn, cap.on)
      result.provisional = cap.provisional
      result.lines.push({
        kind: 'cap',
        on: cap.on,
        text: `Earlier of ${sayDate(dueOn)} and ${sayDate(cap.on)}, after which it cannot be done.`,
      })
    }
  }
  if (clock.notBefore) {
    const floor = resolveRef(graph, clock.notBefore, step, instance)
    if (floor.state === 'met' && floor.on > result.dueOn) {
      result.dueOn = later(result.dueOn, floor.on)
      result.provisional ||= floor.provisional
      result.lines.push({
        kind: 'cap',
        on: floor.on,
        text: `Later of the count and ${sayDate(floor.on)}.`,
      })
    }
  }
  return result
}

function extendIt(
  graph: Graph,
  step: Step,
  instance: number,
  baseOn: CivilDate,
  rules: OrganizationRules,
): { dueOn: CivilDate; lines: DerivationLine[] } {
  let dueOn = baseOn
  const lines: DerivationLine[] = []
  for (const fact of graph.index.extensions(step.key, instance)) {
    const decision = fact.body.decision ?? 'granted'
    const toOn = extensionEnd(fact, dueOn, rules)
    const what = toOn ? ` to ${sayDate(toOn)}` : ''
    lines.push({
      kind: 'extension',
      text: `Extension${what} ${decision}.`,
      ...(toOn && { on: toOn }),
    })
    if (decision === 'granted' && toOn) dueOn = later(dueOn, toOn)
  }
  return { dueOn, lines }
}

function extensionEnd(fact: Fact, baseOn: CivilDate, rules: OrganizationRules): CivilDate | null {
  if (fact.dueOn) return fact.dueOn
  if (!fact.body.lengthDays) return null
  const unit = fact.body.unit ?? 'business_day'
  return count({ start: baseOn, length: fact.body.lengthDays, unit }, rules.calendar).dueOn
}

/** Business days of lead before a due date. */
export function leadBefore(
  dueOn: CivilDate,
  businessDays: number,
  rules: OrganizationRules,
): CivilDate {
  let day = dayNumber(dueOn)
  for (let left = businessDays; left > 0;) {
    day -= 1
    if (rules.calendar.closedOnDay(day) === null) left -= 1
  }
  return fromDayNumber(day)
}
