import {
  addDays,
  dayNumber,
  fromDayNumber,
  later,
  type CivilDate,
} from '@/lib/domain/clocks/civil-date'
import { businessDayFrom } from '@/lib/domain/clocks/calendar'
import { countedDays, skippedDays, type CountedDay } from '@/lib/domain/clocks/count'
import type { DerivationLine } from '@/lib/domain/clocks/derivation'
import type { Fact } from '@/lib/domain/clocks/facts'
import {
  evaluate,
  resolveRef,
  rulesFor,
  type Graph,
  type Resolved,
} from '@/lib/domain/clocks/graph'
import type { ClockRule, Consequence, Step, StepRef } from '@/lib/domain/clocks/procedure'
import { sayDate, sayLength } from '@/lib/domain/clocks/say'
import type { OrganizationRules } from '@/lib/domain/clocks/schedule-types'
import type { Stop } from '@/lib/domain/clocks/stops'

export interface RunClock {
  dueOn: CivilDate | null
  provisional: boolean
  onMiss: Consequence | null
  /** The stop that lasts and holds this clock before it ran out. */
  heldBy: Stop | null
  lines: DerivationLine[]
}

type Met = Extract<Resolved, { state: 'met' }>
type Due = Pick<RunClock, 'dueOn' | 'provisional' | 'lines'>

const undated: Due = { dueOn: null, provisional: false, lines: [] }

/**
 * The due date of this round of an open step: count or date taken over, not before, extension,
 * never after. `running` is the fact that took the step over as running.
 */
export function runClock(
  graph: Graph,
  step: Step,
  instance: number,
  start: Met | null,
  running?: Fact,
): RunClock {
  const { clock, undecided } = chooseClock(graph, step, instance)
  const rules = (clock?.calendar && graph.parties[clock.calendar]) || rulesFor(graph.parties, step)
  const startOn = running?.body.sinceOn ?? start?.on ?? null
  const stops = stopsHolding(graph, step, clock, startOn)
  const base = running?.dueOn
    ? enteredDue(running.dueOn, running.body.sinceOn!, clock, rules, stops)
    : clock
      ? countedDue(graph, step, instance, clock, start, rules, stops)
      : undated
  const floored = clock ? notBefore(graph, step, instance, clock, base) : base
  const extended = extendIt(graph, step, instance, floored, rules)
  const capped = clock ? neverAfter(graph, step, instance, clock, extended) : extended
  const heldBy =
    stops.find((stop) => stop.toOn === null && (!capped.dueOn || capped.dueOn >= stop.fromOn)) ??
    null
  return {
    ...capped,
    provisional: capped.provisional || undecided || heldBy !== null,
    onMiss: clock?.onMiss ?? null,
    heldBy,
  }
}

/** The first alternative that holds; one before it that is not decided leaves it provisional. */
function chooseClock(graph: Graph, step: Step, instance: number) {
  let undecided = false
  for (const clock of step.clocks) {
    if (!clock.when) return { clock, undecided }
    const truth = evaluate(graph, clock.when, step, instance)
    if (truth.value === true) return { clock, undecided: undecided || truth.provisional }
    undecided ||= truth.value === null
  }
  return { clock: undefined, undecided: false }
}

/**
 * The stops that hold a clock begun on a day. One without a scope holds what was running when it
 * began; a backward count is bound to the date it counts from and never stands still.
 */
function stopsHolding(
  graph: Graph,
  step: Step,
  clock: ClockRule | undefined,
  startOn: CivilDate | null,
): Stop[] {
  if (!clock || clock.direction === 'before') return []
  return graph.index
    .stops(step.key)
    .filter((stop) => !stop.withdrawal || stop.toOn !== null)
    .filter(
      (stop) => stop.withdrawal || stop.scope !== null || startOn === null || startOn < stop.fromOn,
    )
}

function stoppedDay(stops: readonly Stop[]): ((day: number) => string | null) | undefined {
  const ended = stops.flatMap((stop) =>
    stop.toOn === null
      ? []
      : [{ from: dayNumber(stop.fromOn), to: dayNumber(stop.toOn), why: stop.why }],
  )
  if (ended.length === 0) return undefined
  return (day) => {
    const stop = ended.find(({ from, to }) => day >= from && day <= to)
    return stop ? `clock stopped (${stop.why})` : null
  }
}

function countedDue(
  graph: Graph,
  step: Step,
  instance: number,
  clock: ClockRule,
  start: Met | null,
  rules: OrganizationRules,
  stops: readonly Stop[],
): Due {
  const from = clock.from ? resolveRef(graph, clock.from, step, instance) : start
  if (from?.state !== 'met') {
    const text = 'No date yet: the clock counts from a date that is not known.'
    return { ...undated, lines: [{ kind: 'note', text }] }
  }
  const result = countedDays(
    {
      start:
        from.afterHours && !clock.fromDayItself
          ? businessDayFrom(rules.calendar, addDays(from.on, 1), 1)
          : from.on,
      length: clock.length,
      unit: clock.unit,
      direction: clock.direction,
      roll: clock.roll,
      receipt: from.received && !clock.fromDayItself ? rules.receiptRule : 'as_is',
      includeStart: clock.includeStart,
      stopped: stoppedDay(stops),
    },
    rules.calendar,
  )
  return {
    dueOn: result.dueOn,
    provisional: from.provisional,
    lines: [
      ...(clock.from ? from.lines : []),
      ...countLines(clock, result.dueOn, rules, result.derivation),
    ],
  }
}

/** The due date entered when a running step was taken over, moved by later stops. */
function enteredDue(
  dueOn: CivilDate,
  sinceOn: CivilDate,
  clock: ClockRule | undefined,
  rules: OrganizationRules,
  stops: readonly Stop[],
): Due {
  const stopped = stoppedDay(stops)
  if (!stopped) return { ...undated, dueOn }
  const unit = clock?.unit === 'business_day' ? 'business_day' : 'calendar_day'
  const days = [...Array(Math.max(0, dayNumber(dueOn) - dayNumber(sinceOn))).keys()]
    .map((offset) => dayNumber(sinceOn) + 1 + offset)
    .filter((day) => stopped(day) !== null)
    .filter((day) => unit === 'calendar_day' || rules.calendar.closedOnDay(day) === null)
  if (days.length === 0) return { ...undated, dueOn }
  const moved = countedDays(
    { start: dueOn, length: days.length, unit, stopped },
    rules.calendar,
  ).dueOn
  const text = `${sayLength(days.length, unit)} of a stopped clock added: ${sayDate(moved)}.`
  return { ...undated, dueOn: moved, lines: [{ kind: 'stop', on: moved, text }] }
}

function countLines(
  clock: ClockRule,
  dueOn: CivilDate,
  rules: OrganizationRules,
  days: CountedDay[],
): DerivationLine[] {
  const { weekendDays, named } = skippedDays(days)
  const before = clock.direction === 'before'
  const length = sayLength(clock.length, clock.unit)
  const words = before ? `At least ${length} before` : length
  const text = `${words}, calendar of ${rules.name}: ${sayDate(dueOn)}.`
  const isStop = (day: CountedDay) => day.reason.startsWith('clock stopped')
  const lines: DerivationLine[] = named
    .filter((day) => !isStop(day))
    .map((day) => ({
      kind: day.reason.includes('rolls') ? 'roll' : 'skip',
      on: day.on,
      text: `${sayDate(day.on)} does not count: ${day.reason}.`,
    }))
  lines.push(...stopLines(named.filter(isStop)))
  if (weekendDays > 0)
    lines.push({
      kind: 'skip',
      text: `${weekendDays} weekend day${weekendDays === 1 ? '' : 's'} not counted.`,
    })
  return [{ kind: 'count', on: dueOn, text }, ...lines]
}

/** One line for each run of stopped days. */
function stopLines(days: readonly CountedDay[]): DerivationLine[] {
  const runs: CountedDay[][] = []
  for (const day of days) {
    const run = runs.at(-1)
    const follows = run && dayNumber(day.on) - dayNumber(run.at(-1)!.on) === 1
    if (follows && run[0]!.reason === day.reason) run.push(day)
    else runs.push([day])
  }
  return runs.map((run) => ({
    kind: 'stop',
    on: run[0]!.on,
    text: `${sayDate(run[0]!.on)} to ${sayDate(run.at(-1)!.on)} not counted: ${run[0]!.reason}.`,
  }))
}

/** The event of a step, or the date it is due by as long as it has not come. */
function boundary(graph: Graph, ref: StepRef, step: Step, instance: number): Met | null {
  const event = resolveRef(graph, ref, step, instance)
  if (event.state === 'met') return event
  if (event.state === 'never' || ref.date) return null
  const due = resolveRef(graph, { ...ref, date: 'due' }, step, instance)
  return due.state === 'met' ? { ...due, provisional: true } : null
}

function notBefore(graph: Graph, step: Step, instance: number, clock: ClockRule, base: Due): Due {
  const floor = clock.notBefore && boundary(graph, clock.notBefore, step, instance)
  if (!floor || !base.dueOn || floor.on <= base.dueOn) return base
  const text = `Later of ${sayDate(base.dueOn)} and ${sayDate(floor.on)}.`
  return {
    dueOn: floor.on,
    provisional: base.provisional || floor.provisional,
    lines: [...base.lines, { kind: 'cap', on: floor.on, text }],
  }
}

function neverAfter(graph: Graph, step: Step, instance: number, clock: ClockRule, base: Due): Due {
  const cap = clock.neverAfter && boundary(graph, clock.neverAfter, step, instance)
  if (!cap || !base.dueOn || cap.on >= base.dueOn) return base
  const text = `Earlier of ${sayDate(base.dueOn)} and ${sayDate(cap.on)}, after which it cannot be done.`
  return {
    dueOn: cap.on,
    provisional: base.provisional || cap.provisional,
    lines: [...base.lines, { kind: 'cap', on: cap.on, text }],
  }
}

/** Each extension granted, in order: the later of it and what stood before. */
function extendIt(
  graph: Graph,
  step: Step,
  instance: number,
  base: Due,
  rules: OrganizationRules,
): Due {
  let dueOn = base.dueOn
  const lines = [...base.lines]
  for (const fact of graph.index.extensions(step.key, instance)) {
    const decision = fact.body.decision ?? 'granted'
    const toOn = extensionEnd(fact, dueOn, rules)
    lines.push({
      kind: 'extension',
      text: `Extension${toOn ? ` to ${sayDate(toOn)}` : ''} ${decision}.`,
      ...(toOn && { on: toOn }),
    })
    if (decision === 'granted' && toOn) dueOn = dueOn ? later(dueOn, toOn) : toOn
  }
  return { ...base, dueOn, lines }
}

function extensionEnd(
  fact: Fact,
  baseOn: CivilDate | null,
  rules: OrganizationRules,
): CivilDate | null {
  if (fact.dueOn) return fact.dueOn
  if (!fact.body.lengthDays || !baseOn) return null
  const unit = fact.body.unit ?? 'business_day'
  return countedDays({ start: baseOn, length: fact.body.lengthDays, unit }, rules.calendar).dueOn
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
