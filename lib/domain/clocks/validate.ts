import { longestCount } from '@/lib/domain/clocks/count'
import { moneyRuleFaults } from '@/lib/domain/clocks/money-rules'
import type { Loop, PartyRole, ProcedureBody, Step } from '@/lib/domain/clocks/procedure'
import { loopKeyOf, referencesOf } from '@/lib/domain/clocks/references'
import { circles, orphans } from '@/lib/domain/clocks/validate-graph'

export interface ProcedureFault {
  /** The step at fault; left out where it is the procedure or a loop. */
  step?: string
  field: string
  /** What was found and what is allowed. */
  message: string
}

interface Ground {
  /** The roles whose calendars the applications of this procedure have. */
  calendarRoles?: readonly PartyRole[]
}

/**
 * Everything that keeps a procedure from being computed or finished, all at once; empty when it
 * may be published.
 */
export function validateProcedure(body: ProcedureBody, ground: Ground = {}): ProcedureFault[] {
  const faults = [
    ...namedSteps(body),
    ...twins(body),
    ...body.steps.flatMap((step) => [
      ...references(body, step),
      ...lengths(step),
      ...clockChoices(step, ground),
      ...kinds(body, step),
      ...money(step),
    ]),
    ...body.loops.flatMap((loop) => loopFaults(body, loop)),
  ]
  const unknown = faults.some((fault) => fault.message.includes('no such step'))
  return unknown ? faults : [...faults, ...circles(body), ...orphans(body)]
}

function namedSteps(body: ProcedureBody): ProcedureFault[] {
  const has = (key: string) => body.steps.some((step) => step.key === key)
  const faults: ProcedureFault[] = []
  if (!body.filedStep)
    faults.push({ field: 'filedStep', message: 'Name the step that makes a draft a request.' })
  else if (!has(body.filedStep))
    faults.push({ field: 'filedStep', message: noStep(body.filedStep) })
  if (body.operationStep !== undefined && !has(body.operationStep))
    faults.push({ field: 'operationStep', message: noStep(body.operationStep) })
  return faults
}

function noStep(key: string): string {
  return `Found "${key}"; the procedure has no such step.`
}

function twins(body: ProcedureBody): ProcedureFault[] {
  const repeated = (keys: string[]) => [
    ...new Set(keys.filter((key, at) => keys.indexOf(key) < at)),
  ]
  return [
    ...repeated(body.steps.map((step) => step.key)).map((key) => ({
      step: key,
      field: 'key',
      message: `Found "${key}" more than once; each step needs a key of its own.`,
    })),
    ...repeated(body.loops.map((loop) => loop.key)).map((key) => ({
      field: `loops.${key}`,
      message: `Found "${key}" more than once; each loop needs a key of its own.`,
    })),
    ...body.steps.flatMap((step) =>
      (['outcomes', 'obligations'] as const).flatMap((field) =>
        repeated((step[field] ?? []).map((one) => one.key)).map((key) => ({
          step: step.key,
          field,
          message: `Found "${key}" more than once.`,
        })),
      ),
    ),
  ]
}

function references(body: ProcedureBody, step: Step): ProcedureFault[] {
  const faults = referencesOf(step).flatMap(({ field, step: key, outcomes, instance }) => {
    const at = { step: step.key, field }
    const target = body.steps.find((one) => one.key === key)
    if (!target) return [{ ...at, message: noStep(key) }]
    const loop = loopKeyOf(body, key)
    const inside = loop !== undefined && loop === loopKeyOf(body, step.key)
    return [
      ...unknownOutcomes(target, outcomes ?? []).map((message) => ({ ...at, message })),
      ...(instance === 'previous' && !inside
        ? [{ ...at, message: `Only inside a loop is there a round of "${key}" before.` }]
        : []),
      ...(instance === 'latest' && inside
        ? [{ ...at, message: `Inside its loop "${key}" is known by round, not as the latest.` }]
        : []),
    ]
  })
  const overtaking = (step.overtakenBy ?? []).filter(
    (key) => !body.steps.some((one) => one.key === key),
  )
  return [
    ...faults,
    ...overtaking.map((key) => ({ step: step.key, field: 'overtakenBy', message: noStep(key) })),
  ]
}

function unknownOutcomes(step: Step, outcomes: readonly string[]): string[] {
  const allowed = step.outcomes.map((one) => one.key)
  return outcomes
    .filter((outcome) => !allowed.includes(outcome))
    .map(
      (outcome) => `Found "${outcome}"; the outcomes of "${step.key}" are: ${allowed.join(', ')}.`,
    )
}

function lengths(step: Step): ProcedureFault[] {
  return step.clocks.flatMap(({ length, unit }, at) => {
    const fits = Number.isInteger(length) && length >= 0 && length <= longestCount[unit]
    const allowed = `allowed are whole numbers from 0 to ${longestCount[unit]} for ${unit}`
    if (fits) return []
    return [
      { step: step.key, field: `clocks.${at}.length`, message: `Found ${length}; ${allowed}.` },
    ]
  })
}

function clockChoices(step: Step, { calendarRoles }: Ground): ProcedureFault[] {
  const always = step.clocks.findIndex((clock) => clock.when === undefined)
  const faults: ProcedureFault[] = []
  step.clocks.forEach((clock, at) => {
    if (always >= 0 && at > always)
      faults.push({
        step: step.key,
        field: `clocks.${at}`,
        message: 'This alternative is never chosen: one before it holds always.',
      })
    if (clock.calendar && calendarRoles && !calendarRoles.includes(clock.calendar))
      faults.push({
        step: step.key,
        field: `clocks.${at}.calendar`,
        message: `Found "${clock.calendar}"; calendars are known of: ${calendarRoles.join(', ')}.`,
      })
  })
  return faults
}

function kinds(body: ProcedureBody, step: Step): ProcedureFault[] {
  const faults: ProcedureFault[] = []
  const fault = (field: string, message: string) => faults.push({ step: step.key, field, message })
  if (!body.stages.includes(step.stage))
    fault('stage', `Found "${step.stage}"; the stages are: ${body.stages.join(', ')}.`)
  if (step.outcomes.length === 0) fault('outcomes', 'A step needs at least one outcome to close.')
  const presumed = [step.onMiss, ...step.clocks.map((clock) => clock.onMiss)]
  for (const miss of presumed) {
    if (miss?.effect !== 'presumed') continue
    if (!miss.outcome) fault('onMiss', 'Say which outcome is presumed.')
    else for (const message of unknownOutcomes(step, [miss.outcome])) fault('onMiss', message)
  }
  const repeats = ['anytime', 'recurring']
  const follows = step.start?.of.some((ref) =>
    repeats.includes(body.steps.find((one) => one.key === ref.step)?.kind ?? ''),
  )
  if (step.kind === 'recurring' && !follows)
    fault('start', 'A recurring step is started by an anytime step, once for each of its rounds.')
  if (repeats.includes(step.kind) && loopKeyOf(body, step.key))
    fault('kind', 'A step of a loop has the rounds of the loop, none of its own.')
  return faults
}

function money(step: Step): ProcedureFault[] {
  return (step.obligations ?? []).flatMap(({ key, what, target }) => {
    const field = `obligations.${key}.target`
    if (!target) return []
    if (what !== 'money')
      return [
        { step: step.key, field, message: `Found an amount on "${what}"; only money has one.` },
      ]
    return moneyRuleFaults(target).map((message) => ({ step: step.key, field, message }))
  })
}

function loopFaults(body: ProcedureBody, loop: Loop): ProcedureFault[] {
  const faults: ProcedureFault[] = []
  const fault = (field: string, message: string) =>
    faults.push({ field: `loops.${loop.key}.${field}`, message })
  const places = loop.scope.map((key) => body.steps.findIndex((step) => step.key === key))
  const unknown = loop.scope.filter((_, at) => places[at]! < 0)
  for (const key of unknown) fault('scope', noStep(key))
  const inOrder = places.every((place, at) => at === 0 || place === places[at - 1]! + 1)
  if (loop.scope.length === 0) fault('scope', 'A loop needs at least one step.')
  else if (unknown.length === 0 && !inOrder)
    fault('scope', `The steps ${loop.scope.join(', ')} must follow one another in this order.`)
  for (const key of loop.scope)
    if (body.loops.some((other) => other !== loop && other.scope.includes(key)))
      fault('scope', `"${key}" is in two loops; a step has the rounds of one.`)
  if (!loop.scope.includes(loop.again.step))
    fault('again', `Found "${loop.again.step}"; it must be a step of the loop.`)
  const again = body.steps.find((step) => step.key === loop.again.step)
  for (const message of again ? unknownOutcomes(again, [loop.again.outcome]) : [])
    fault('again', message)
  if (loop.max !== undefined && (!Number.isInteger(loop.max) || loop.max < 1))
    fault('max', `Found ${loop.max}; allowed are whole numbers from 1.`)
  const goesOn = body.steps.some(
    (step) =>
      loop.scope.includes(step.key) && step.start?.of.some((ref) => ref.instance === 'previous'),
  )
  if (!goesOn) fault('scope', 'No step of the loop is started by the round before.')
  return faults
}
