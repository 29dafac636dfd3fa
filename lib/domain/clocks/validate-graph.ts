import type { ProcedureBody, Step } from '@/lib/domain/clocks/procedure'
import { loopKeyOf, referencesOf } from '@/lib/domain/clocks/references'
import type { ProcedureFault } from '@/lib/domain/clocks/validate'

type Edges = ReadonlyMap<string, string[]>

/** Circles outside declared loops: the step on each from which it can be told. */
export function circles(body: ProcedureBody): ProcedureFault[] {
  const edges = edgesOf(body)
  const faults: ProcedureFault[] = []
  const settled = new Set<string>()
  for (const { key } of body.steps) {
    const circle = circleFrom(edges, key, [], settled)
    if (!circle) continue
    faults.push({
      step: circle[0],
      field: 'start',
      message: `These steps wait for one another without a declared loop: ${circle.join(', ')}.`,
    })
    for (const one of circle) settled.add(one)
  }
  return faults
}

/** What has to be known before a step can be computed. */
function edgesOf(body: ProcedureBody): Edges {
  return new Map(
    body.steps.map((step) => [
      step.key,
      referencesOf(step).flatMap((reference) => {
        const loop = body.loops.find((one) => one.scope.includes(reference.step))
        const outside = loop !== undefined && loop.key !== loopKeyOf(body, step.key)
        const rounds = outside ? [loop.again.step] : []
        if (reference.booked || reference.instance === 'previous') return rounds
        return [reference.step, ...rounds]
      }),
    ]),
  )
}

function circleFrom(
  edges: Edges,
  key: string,
  path: string[],
  settled: Set<string>,
): string[] | null {
  const at = path.indexOf(key)
  if (at >= 0) return path.slice(at)
  if (settled.has(key)) return null
  for (const next of edges.get(key) ?? []) {
    const circle = circleFrom(edges, next, [...path, key], settled)
    if (circle) return circle
  }
  settled.add(key)
  return null
}

/** Steps that no course of events can start, and joins that wait for such a step. */
export function orphans(body: ProcedureBody): ProcedureFault[] {
  const startable = startableSteps(body)
  const title = (key: string) => body.steps.find((step) => step.key === key)?.title ?? key
  return body.steps
    .filter((step) => !startable.has(step.key))
    .map((step) => {
      const missing = firstRound(step).filter((ref) => !startable.has(ref.step))
      const joins = step.start?.mode === 'all' && missing.length < firstRound(step).length
      const names = missing.map((ref) => title(ref.step)).join(', ')
      const message = joins
        ? `The join never closes: ${names} can never start.`
        : `Nothing can start this step${names ? `; it waits for ${names}` : ''}.`
      return { step: step.key, field: 'start', message }
    })
}

/** What starts the first round: further rounds are started by the one before. */
function firstRound(step: Step) {
  return (step.start?.of ?? []).filter((ref) => ref.instance !== 'previous')
}

function startableSteps(body: ProcedureBody): Set<string> {
  const startable = new Set<string>()
  const canStart = (step: Step) => {
    if (!step.start || step.kind === 'anytime') return true
    const refs = firstRound(step)
    if (refs.length === 0) return false
    const met = refs.filter((ref) => startable.has(ref.step))
    return step.start.mode === 'all' ? met.length === refs.length : met.length > 0
  }
  for (let grew = true; grew;) {
    const before = startable.size
    for (const step of body.steps) if (canStart(step)) startable.add(step.key)
    grew = startable.size > before
  }
  return startable
}
