import type { Expr, InstanceRef, ProcedureBody, Step, StepRef } from '@/lib/domain/clocks/procedure'

/** Where one step names another, and what it asks of it. */
export interface Reference {
  field: string
  step: string
  outcomes?: string[]
  instance?: InstanceRef
  /** The reference reads what is booked, which needs no computing of the step named. */
  booked: boolean
}

/** Every place in which a step names a step. */
export function referencesOf(step: Step): Reference[] {
  return [
    ...(step.needs ? ofExpr('needs', step.needs) : []),
    ...(step.start?.of ?? []).map((ref) => ofRef('start', ref)),
    ...step.clocks.flatMap((clock, at) => [
      ...(clock.when ? ofExpr(`clocks.${at}.when`, clock.when) : []),
      ...(clock.from ? [ofRef(`clocks.${at}.from`, clock.from)] : []),
      ...(clock.neverAfter ? [ofRef(`clocks.${at}.neverAfter`, clock.neverAfter)] : []),
      ...(clock.notBefore ? [ofRef(`clocks.${at}.notBefore`, clock.notBefore)] : []),
    ]),
  ]
}

function ofRef(field: string, ref: StepRef): Reference {
  const { step, outcome: outcomes, instance, date } = ref
  return { field, step, outcomes, instance, booked: date === 'scheduled' }
}

function ofExpr(field: string, expr: Expr): Reference[] {
  if ('all' in expr) return expr.all.flatMap((part) => ofExpr(field, part))
  if ('any' in expr) return expr.any.flatMap((part) => ofExpr(field, part))
  if ('not' in expr) return ofExpr(field, expr.not)
  if ('outcome' in expr)
    return [
      { field, step: expr.outcome, outcomes: expr.in, instance: expr.instance, booked: false },
    ]
  if ('done' in expr) return [{ field, step: expr.done, instance: expr.instance, booked: false }]
  return []
}

/** The loop of a step, for a body whose loops may be at fault. */
export function loopKeyOf(body: ProcedureBody, step: string): string | undefined {
  return body.loops.find((loop) => loop.scope.includes(step))?.key
}
