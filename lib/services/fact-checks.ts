import type { Fact, FactKind } from '@/lib/domain/clocks/facts'
import type { ProcedureBody, Step } from '@/lib/domain/clocks/procedure'
import { sayDate } from '@/lib/domain/clocks/say'
import type { Schedule } from '@/lib/domain/clocks/schedule-types'
import { localOf } from '@/lib/domain/clocks/zoned'
import { show } from '@/lib/schemas/common'
import type { FactInput } from '@/lib/schemas/fact'
import type { FieldError } from '@/lib/services/errors'

export interface CheckGround {
  body: ProcedureBody
  schedule: Schedule
  facts: readonly Fact[]
  zone: string
  nowAt: string
}

const stepKinds: readonly FactKind[] = [
  'happened',
  'taken_over',
  'scheduled',
  'stated',
  'extension',
  'waived',
]

/**
 * What a fact may not say, each fault with its field. Out of order is allowed with a reason;
 * only the impossible is refused.
 */
export function checkFact(input: FactInput, kind: FactKind, ground: CheckGround): FieldError[] {
  const errors: FieldError[] = []
  const step = input.step ? ground.body.steps.find((one) => one.key === input.step) : undefined
  if (stepKinds.includes(kind)) errors.push(...checkStep(input, step, ground))
  errors.push(...checkDates(input, ground))
  if (kind === 'happened' && step) errors.push(...checkHappened(input, step, ground))
  errors.push(...checkKind(input, kind))
  if (input.kind === 'correction' || input.kind === 'retraction') {
    if (!input.replaces)
      errors.push({ path: 'replaces', message: 'Say which fact this one replaces.' })
    if (!input.reason)
      errors.push({ path: 'reason', message: 'Say why: a correction keeps its reason.' })
  }
  return errors
}

function checkStep(input: FactInput, step: Step | undefined, ground: CheckGround): FieldError[] {
  if (!input.step) return [{ path: 'step', message: 'Choose the step this is about.' }]
  if (!step)
    return [{ path: 'step', message: `Found ${show(input.step)}; the procedure has no such step.` }]
  const errors: FieldError[] = []
  const rounds = roundsOf(ground.schedule, step)
  if (input.instance !== undefined && input.instance > rounds)
    errors.push({
      path: 'instance',
      message: `Found round ${input.instance}; ${step.title} has ${rounds} so far.`,
    })
  const obligation = step.obligations?.find((one) => one.key === input.obligation)
  if (input.obligation && !obligation)
    errors.push({
      path: 'obligation',
      message: `Found ${show(input.obligation)}; allowed are: ${(step.obligations ?? []).map((one) => one.key).join(', ') || 'none'}.`,
    })
  return errors
}

/** How many rounds of a step there are; one that may come any time has one more to record. */
export function roundsOf(schedule: Schedule, step: Step): number {
  const rounds = schedule.items.filter((item) => item.step === step.key && item.obligation === '')
  return Math.max(1, rounds.length + (step.kind === 'anytime' ? 1 : 0))
}

function checkDates(input: FactInput, ground: CheckGround): FieldError[] {
  const today = localOf(ground.nowAt, ground.zone).on
  const errors: FieldError[] = []
  for (const name of ['sent', 'received'] as const) {
    const at = input[`${name}At`]
    const on = input[`${name}On`] ?? (at && localOf(at, ground.zone).on)
    const future = (on && on > today) || (at && Date.parse(at) > Date.parse(ground.nowAt))
    if (future)
      errors.push({
        path: at ? `${name}At` : `${name}On`,
        message: `Found ${sayDate(on!)}; today is ${sayDate(today)} there. What was ${name} cannot lie in the future; book it as scheduled instead.`,
      })
    if (at && input[`${name}On`] && localOf(at, ground.zone).on !== input[`${name}On`])
      errors.push({
        path: `${name}At`,
        message: `The hour lies on ${sayDate(localOf(at, ground.zone).on)} in ${ground.zone}, the date says ${sayDate(input[`${name}On`]!)}.`,
      })
  }
  if (input.sentOn && input.receivedOn && input.receivedOn < input.sentOn)
    errors.push({
      path: 'receivedOn',
      message: `Found ${sayDate(input.receivedOn)}; it was sent ${sayDate(input.sentOn)} and cannot be received before.`,
    })
  return errors
}

function checkHappened(input: FactInput, step: Step, ground: CheckGround): FieldError[] {
  const errors: FieldError[] = []
  if (!input.sentOn && !input.receivedOn && !input.sentAt && !input.receivedAt)
    errors.push({ path: 'receivedOn', message: 'Give the day it was sent or received.' })
  if (!input.obligation) errors.push(...checkOutcome(input, step))
  const on = input.receivedOn ?? input.sentOn
  const filedOn = filedDate(ground)
  if (on && filedOn && step.key !== ground.body.filedStep && on < filedOn)
    errors.push({
      path: input.receivedOn ? 'receivedOn' : 'sentOn',
      message: `Found ${sayDate(on)}; the request was filed ${sayDate(filedOn)} and nothing about it can be older.`,
    })
  if (needsReason(input, step, ground) && !input.reason)
    errors.push({
      path: 'reason',
      message: `${step.title} comes before what it follows is recorded. It can be recorded with a reason.`,
    })
  return errors
}

function checkOutcome(input: FactInput, step: Step): FieldError[] {
  const allowed = step.outcomes.map((one) => one.key)
  if (input.outcome === undefined)
    return allowed.length > 1
      ? [
          {
            path: 'outcome',
            message: `Choose how it ended: ${step.outcomes.map((one) => one.title).join(', ')}.`,
          },
        ]
      : []
  if (allowed.includes(input.outcome)) return []
  return [
    {
      path: 'outcome',
      message: `Found ${show(input.outcome)}; allowed are: ${allowed.join(', ')}.`,
    },
  ]
}

function filedDate(ground: CheckGround): string | null {
  const filed = ground.schedule.items.find(
    (item) => item.step === ground.body.filedStep && item.obligation === '',
  )
  return filed?.doneOn ?? null
}

function needsReason(input: FactInput, step: Step, ground: CheckGround): boolean {
  if (input.kind === 'correction' || step.kind === 'anytime') return false
  const instance = input.instance ?? roundsOf(ground.schedule, step)
  const item = ground.schedule.items.find(
    (one) => one.step === step.key && one.instance === instance && one.obligation === '',
  )
  return item?.status === 'waiting' || item?.status === 'not_needed'
}

function checkKind(input: FactInput, kind: FactKind): FieldError[] {
  const date = input.receivedOn ?? input.sentOn
  const wants = (path: string, message: string, missing: boolean) =>
    missing ? [{ path, message }] : []
  switch (kind) {
    case 'scheduled':
      return wants('dueOn', 'Give the day it is booked for.', !input.dueOn)
    case 'stated':
      return wants('dueOn', 'Give the date the utility states.', !input.dueOn)
    case 'extension':
      return [
        ...wants('decision', 'Say whether it was asked, granted or refused.', !input.decision),
        ...wants(
          'dueOn',
          'Give the new date or a length in days.',
          input.decision === 'granted' && !input.dueOn && !input.lengthDays,
        ),
      ]
    case 'stop':
    case 'resume':
    case 'withdrawn':
    case 'reinstated':
    case 'waived':
      return wants('receivedOn', 'Give the day.', !date)
    case 'taken_over':
      return wants(
        'dueOn',
        'A running step needs the day it is due.',
        Boolean(input.sinceOn) && !input.dueOn,
      )
    case 'changed':
      return wants(
        'terms',
        'Say what changes.',
        !input.procedureRevisionId && Object.keys(input.terms ?? {}).length === 0,
      )
    default:
      return []
  }
}
