import type { FactIntent } from '@/components/applications/fact-intent'
import { centsOf } from '@/components/applications/money-words'
import { termFields } from '@/components/applications/term-words'
import type { FactKind, Terms } from '@/lib/domain/clocks/facts'
import { instantOf } from '@/lib/domain/clocks/zoned'
import type { FactInput } from '@/lib/schemas/fact'

/** The text of a form's field, '' where it is not shown. */
export type ReadField = (name: string) => string

interface ValuesGround {
  id: string
  /** The kind whose fields are shown; a correction has those of what it corrects. */
  kind: FactKind
  intent: FactIntent
  atSeq: number
  /** IANA zone of the utility, in which hours are typed. */
  zone: string
}

export interface FactValues {
  input: FactInput
  /** What could not be read, by field. */
  faults: { path: string; message: string }[]
}

/** A form's fields as the fact to send; empty fields are left out, unreadable ones are named. */
export function factValuesOf(read: ReadField, ground: ValuesGround): FactValues {
  const { id, kind, intent, atSeq, zone } = ground
  const text = (name: string) => read(name).trim() || undefined
  const faults: FactValues['faults'] = []
  const [step, instance] = read('step').split('~')
  const input: FactInput = {
    id,
    kind: intent.kind,
    atSeq,
    replaces: intent.replaces,
    step: step || intent.step,
    instance: instance ? Number(instance) : intent.instance,
    obligation: text('obligation'),
    outcome: text('outcome'),
    decision: decisionOf(read('decision')),
    sinceOn: text('sinceOn'),
    sentOn: text('sentOn'),
    receivedOn: text('receivedOn'),
    dueOn: text('dueOn'),
    channel: text('channel') as FactInput['channel'],
    effect: text('effect'),
    note: text('note'),
    reason: text('reason'),
    scope: text('scope')?.split(' '),
    ...hoursOf(read, kind, zone),
    ...lengthOf(read, faults),
    ...amountOf(read, faults),
    ...termsOf(read, kind, faults),
  }
  return { input: withoutGaps(input), faults }
}

function decisionOf(text: string): FactInput['decision'] {
  return text === 'asked' || text === 'granted' || text === 'refused' ? text : undefined
}

/** The hour stands on the booked day, on the day of receipt, or else on the day it was sent. */
function hoursOf(read: ReadField, kind: FactKind, zone: string): Partial<FactInput> {
  if (kind === 'scheduled') {
    const [on, hour] = [read('dueOn'), read('dueAt')]
    return on && hour ? { dueAt: instantOf(on, hour, zone) } : {}
  }
  const hour = read('receivedAt')
  const [received, sent] = [read('receivedOn'), read('sentOn')]
  if (!hour || !(received || sent)) return {}
  return received
    ? { receivedAt: instantOf(received, hour, zone) }
    : { sentAt: instantOf(sent, hour, zone) }
}

function lengthOf(read: ReadField, faults: FactValues['faults']): Partial<FactInput> {
  const text = read('lengthDays').trim()
  if (text === '') return {}
  const unit = read('unit') === 'calendar_day' ? 'calendar_day' : 'business_day'
  if (/^\d{1,4}$/.test(text)) return { lengthDays: Number(text), unit }
  faults.push({
    path: 'lengthDays',
    message: `Found "${text}"; a whole number of days is needed.`,
  })
  return {}
}

function amountOf(read: ReadField, faults: FactValues['faults']): Partial<FactInput> {
  const text = read('amountMinor').trim()
  if (text === '') return {}
  const amountMinor = centsOf(text)
  if (amountMinor !== null) return { amountMinor }
  faults.push({
    path: 'amountMinor',
    message: `Found "${text}"; an amount in dollars such as 206,000 is needed.`,
  })
  return {}
}

function termsOf(
  read: ReadField,
  kind: FactKind,
  faults: FactValues['faults'],
): Partial<FactInput> {
  if (kind !== 'changed') return {}
  const terms: Record<string, unknown> = {}
  for (const { key, label, unit, kind: type } of termFields) {
    const text = read(`terms.${key}`).trim()
    if (text === '') continue
    const value = type === 'number' ? Number(text.replaceAll(',', '')) : text
    if (typeof value === 'string' || Number.isFinite(value)) terms[key] = value
    else
      faults.push({
        path: `terms.${key}`,
        message: `${label}: found "${text}"; a number in ${unit ?? 'digits'} is needed.`,
      })
  }
  return Object.keys(terms).length === 0 ? {} : { terms: terms as Terms }
}

function withoutGaps(input: FactInput): FactInput {
  const kept = Object.entries(input).filter(([, value]) => value !== undefined)
  return Object.fromEntries(kept) as FactInput
}
