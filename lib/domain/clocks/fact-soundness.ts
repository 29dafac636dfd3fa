import { isCivilDate } from '@/lib/domain/clocks/civil-date'
import { longestCount } from '@/lib/domain/clocks/count'
import type { Fact } from '@/lib/domain/clocks/facts'
import type { ProcedureBody } from '@/lib/domain/clocks/procedure'

const dates = ['sentOn', 'receivedOn', 'dueOn'] as const
const instants = ['sentAt', 'receivedAt', 'dueAt'] as const
const ofAStep = new Set(['happened', 'taken_over', 'scheduled', 'stated', 'extension', 'waived'])
const ofADay = new Set(['stop', 'resume'])

/** Years in which a clock can run; beyond them a date is a slip of the keyboard. */
const firstYear = '1900'
const lastYear = '2200'

function isSoundDate(on: string): boolean {
  return isCivilDate(on) && on >= firstYear && on < lastYear
}

/** Why a fact cannot be counted with, in words; null when it can. */
export function whyUnsound(fact: Fact, body: ProcedureBody): string | null {
  const given = [...dates.map((name) => fact[name]), fact.body.sinceOn].filter(
    (on) => on !== undefined,
  )
  const bad = given.find((on) => !isSoundDate(on))
  if (bad !== undefined) return `"${bad}" is no date from 1900 to 2199.`
  const badAt = instants.map((name) => fact[name]).find((at) => at && !isSoundInstant(at))
  if (badAt) return `"${badAt}" is no instant.`
  if (!Number.isInteger(fact.instance) || fact.instance < 1)
    return `Round ${fact.instance} is none.`
  if (ofADay.has(fact.kind) && given.length === 0 && !fact.sentAt && !fact.receivedAt)
    return 'A clock stops or goes on from a day, and none is given.'
  return whyNoStep(fact, body) ?? whyNoExtension(fact)
}

function isSoundInstant(at: string): boolean {
  return !Number.isNaN(Date.parse(at)) && isSoundDate(new Date(at).toISOString().slice(0, 10))
}

function whyNoStep(fact: Fact, body: ProcedureBody): string | null {
  if (fact.step === undefined)
    return ofAStep.has(fact.kind) ? 'It names no step of the procedure.' : null
  const step = body.steps.find((one) => one.key === fact.step)
  if (!step) return `The procedure has no step "${fact.step}".`
  if (fact.obligation && !step.obligations?.some((one) => one.key === fact.obligation))
    return `${step.title} has no part "${fact.obligation}".`
  return null
}

function whyNoExtension(fact: Fact): string | null {
  if (fact.kind !== 'extension') return null
  if (fact.obligation) return 'An extension is of the whole step, not of one part.'
  const { lengthDays, unit = 'business_day' } = fact.body
  if (lengthDays === undefined) return null
  const fits = Number.isInteger(lengthDays) && lengthDays > 0 && lengthDays <= longestCount[unit]
  return fits ? null : `An extension of ${lengthDays} days is none.`
}
