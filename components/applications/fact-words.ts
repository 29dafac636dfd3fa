import { formatDollars } from '@/components/applications/money-words'
import { termWords } from '@/components/applications/term-words'
import type { Channel, FactBody, FactKind } from '@/lib/domain/clocks/facts'
import { formatDate, formatInstant } from '@/lib/domain/format-date'
import type { FactView } from '@/lib/schemas/application'

export const channelWords: Record<Channel, string> = {
  portal: 'portal',
  email: 'e-mail',
  letter: 'letter',
  call: 'call',
  meeting: 'meeting',
  hand: 'by hand',
}

export interface FactWords {
  /** What happened, in one line. */
  title: string
  /** Dates, channel, amounts and what was noted. */
  details: string[]
}

/**
 * A fact in words, dates and hours as the utility reads them.
 * @param facts all facts of the application, to name what a correction replaces
 */
export function factWords(fact: FactView, { zone, facts, items = [] }: WordsGround): FactWords {
  const body = fact.body as FactBody
  const kind = kindInForce(fact, facts)
  return {
    title: titleOf(fact, kind, body, items),
    details: [
      ...dateWords(fact, zone),
      ...(fact.channel ? [`Channel: ${channelWords[fact.channel]}`] : []),
      ...(fact.amountMinor === null ? [] : [formatDollars(fact.amountMinor)]),
      ...termWords(body.terms ?? {}),
      ...(body.procedureRevisionId ? ['Pins the revision of the procedure'] : []),
      ...(body.effect ? [`Effect on standing: ${body.effect}`] : []),
      ...(body.note ? [body.note] : []),
    ],
  }
}

export interface WordsGround {
  zone: string
  facts: readonly FactView[]
  /** Titles of steps' parts. */
  items?: readonly { step: string; obligation: string; title: string }[]
}

/** The kind that counts: a correction has that of the fact it replaces, however long the chain. */
export function kindInForce(fact: FactView, facts: readonly FactView[]): FactKind {
  let origin: FactView | undefined = fact
  while (origin?.kind === 'correction' && origin.replacesId) {
    const replaces: string = origin.replacesId
    origin = facts.find((one) => one.id === replaces)
  }
  return origin?.kind ?? fact.kind
}

function titleOf(
  fact: FactView,
  kind: FactKind,
  body: FactBody,
  items: NonNullable<WordsGround['items']>,
): string {
  const part = items.find((one) => one.step === fact.step && one.obligation === fact.obligation)
  const round = fact.instance > 1 ? `, round ${fact.instance}` : ''
  const name = fact.obligation && part ? part.title : (fact.stepTitle ?? fact.step ?? '')
  const step = `${name}${round}`
  const on = fact.dueOn ? formatDate(fact.dueOn) : 'no date'
  switch (kind) {
    case 'happened':
      return fact.outcomeTitle ? `${step}: ${fact.outcomeTitle}` : `${step}: done`
    case 'taken_over':
      return body.sinceOn
        ? `${step}: taken over as running since ${formatDate(body.sinceOn)}, due ${on}`
        : `${step}: taken over as done`
    case 'scheduled':
      return `${step}: booked for ${on}`
    case 'stated':
      return `${step}: the utility states ${on}`
    case 'extension':
      return `${step}: ${extensionWords(fact, body)}`
    case 'waived':
      return `${step}: waived`
    case 'stop':
      return `Clock stopped${scopeWords(body)}`
    case 'resume':
      return `Clock resumed${scopeWords(body)}`
    case 'withdrawn':
      return 'Request withdrawn'
    case 'reinstated':
      return 'Request reinstated'
    case 'changed':
      return changeWords(body)
    case 'retraction':
      return 'Retracted'
    default:
      return 'Correction'
  }
}

function extensionWords(fact: FactView, body: FactBody): string {
  const decision = body.decision ?? 'granted'
  if (fact.dueOn) return `extension to ${formatDate(fact.dueOn)} ${decision}`
  if (!body.lengthDays) return `extension ${decision}`
  const unit = body.unit === 'calendar_day' ? 'calendar' : 'business'
  return `extension of ${body.lengthDays} ${unit} days ${decision}`
}

function scopeWords(body: FactBody): string {
  return body.scope?.length ? ` for ${body.scope.length === 1 ? 'one step' : 'some steps'}` : ''
}

function changeWords(body: FactBody): string {
  if (body.decision === 'asked') return 'Change asked for'
  if (body.decision === 'refused') return 'Change refused'
  const keys = Object.keys(body.terms ?? {})
  if (keys.length === 1 && keys[0] === 'requestNo') return 'Request number assigned'
  if (body.decision === 'granted') return 'Change granted'
  return body.procedureRevisionId ? 'Terms of the request' : 'Terms changed'
}

function dateWords(fact: FactView, zone: string): string[] {
  const moment = (on: string | null, at: string | null) =>
    at ? formatInstant(at, zone) : on ? formatDate(on) : null
  const sent = moment(fact.sentOn, fact.sentAt)
  const received = moment(fact.receivedOn, fact.receivedAt)
  return [
    ...(sent ? [`Sent ${sent}`] : []),
    ...(received ? [`${receiptVerb(fact)} ${received}`] : []),
  ]
}

/** What concerns no step was not received: it counts from a day. */
function receiptVerb(fact: FactView): string {
  return fact.step === null ? 'As of' : 'Received'
}
