import type { Graph } from '@/lib/domain/clocks/graph'
import { loopOf, stepOf, type Loop, type Step } from '@/lib/domain/clocks/procedure'

/** Rounds of a loop without a limit of its own, so that a slip cannot run forever. */
const mostRounds = 99

/**
 * How many rounds of a step there are: in a loop one more for each closing that brings another,
 * of an anytime step as many as are recorded, of a recurring one as many as of what starts it.
 */
export function roundsOf(graph: Graph, key: string): number {
  const step = stepOf(graph.body, key)
  if (step.kind === 'anytime') return graph.index.lastRound(key)
  const head = headOf(graph, step)
  if (head) return graph.instances(head)
  const loop = loopOf(graph.body, key)
  return loop ? loopRounds(graph, loop) : 1
}

/** The step whose rounds a recurring step follows. */
function headOf(graph: Graph, step: Step): string | undefined {
  if (step.kind !== 'recurring') return undefined
  return step.start?.of.find(({ step: key }) => {
    const { kind } = stepOf(graph.body, key)
    return kind === 'anytime' || kind === 'recurring'
  })?.step
}

/** A further round exists once the loop's last step closed, as needed, with its outcome. */
function loopRounds(graph: Graph, { again, max }: Loop): number {
  const most = max ?? mostRounds
  for (let round = 1; ; round += 1) {
    if (round >= most || !graph.index.event(again.step, round)) return round
    const node = graph.node(again.step, round)
    if (node.status !== 'done' || node.outcome !== again.outcome) return round
  }
}

/** Each round of each step in the order it is drawn; a loop's rounds follow one another. */
export function roundsInOrder(graph: Graph): { step: Step; instance: number }[] {
  const rounds: { step: Step; instance: number }[] = []
  const drawn = new Set<string>()
  for (const step of graph.body.steps) {
    const loop = loopOf(graph.body, step.key)
    if (loop && drawn.has(loop.key)) continue
    if (loop) drawn.add(loop.key)
    const scope = loop ? loop.scope.map((key) => stepOf(graph.body, key)) : [step]
    for (let instance = 1; instance <= graph.instances(step.key); instance += 1)
      for (const one of scope)
        if (isThere(graph, one, instance)) rounds.push({ step: one, instance })
  }
  return rounds
}

/** A round number that an anytime step skipped is none. */
function isThere(graph: Graph, step: Step, instance: number): boolean {
  if (step.kind === 'anytime') return graph.index.event(step.key, instance) !== undefined
  const head = headOf(graph, step)
  return head === undefined || isThere(graph, stepOf(graph.body, head), instance)
}
