import type { FactKind } from '@/lib/domain/clocks/facts'
import type { ApplicationView, ItemView, RecordableStep } from '@/lib/schemas/application'

/** Everything a form about facts may ask for. */
export type FactField =
  | 'step'
  | 'obligation'
  | 'outcome'
  | 'decision'
  | 'sinceOn'
  | 'dueOn'
  | 'length'
  | 'sentOn'
  | 'receivedOn'
  | 'hour'
  | 'channel'
  | 'amount'
  | 'terms'
  | 'effect'
  | 'scope'
  | 'note'

const shapes: Record<FactKind, readonly FactField[]> = {
  happened: [
    ...(['step', 'obligation', 'outcome', 'sentOn', 'receivedOn'] as const),
    ...(['hour', 'channel', 'amount', 'note'] as const),
  ],
  taken_over: ['step', 'sinceOn', 'dueOn', 'receivedOn', 'note'],
  scheduled: ['step', 'dueOn', 'hour', 'channel', 'note'],
  stated: ['step', 'dueOn', 'receivedOn', 'channel', 'note'],
  extension: ['step', 'decision', 'dueOn', 'length', 'receivedOn', 'channel', 'note'],
  stop: ['receivedOn', 'scope', 'channel', 'note'],
  resume: ['receivedOn', 'scope', 'channel', 'note'],
  waived: ['step', 'obligation', 'receivedOn', 'channel', 'note'],
  withdrawn: ['receivedOn', 'channel', 'note'],
  reinstated: ['receivedOn', 'channel', 'note'],
  changed: ['terms', 'decision', 'receivedOn', 'channel', 'effect', 'note'],
  correction: ['receivedOn', 'note'],
  retraction: [],
}

/** A step the form can be about, open, ahead or done. */
export interface StepChoice {
  step: string
  instance: number
  title: string
  status: ItemView['status']
  isOurs: boolean
  outcomes: readonly { key: string; title: string }[]
  parts: readonly { key: string; title: string; isMoney: boolean }[]
  evidence: string | null
}

/**
 * The steps a form offers: those that can be recorded now, and the one it was opened for even where
 * that is done already.
 */
export function stepChoices(
  view: ApplicationView,
  wanted?: { step?: string; instance?: number },
): StepChoice[] {
  const choices = view.recordable.map(choiceOf)
  const instance = wanted?.instance ?? 1
  const isWanted = (one: { step: string; instance: number }) =>
    one.step === wanted?.step && one.instance === instance
  const settled = choices.some(isWanted) ? undefined : view.settled.find(isWanted)
  return settled ? [choiceOf(settled), ...choices] : choices
}

function choiceOf(one: RecordableStep): StepChoice {
  return {
    step: one.step,
    instance: one.instance,
    title: one.title,
    status: one.status,
    isOurs: one.party === 'applicant' || one.party === 'both',
    outcomes: one.outcomes,
    parts: one.obligations.map((part) => ({ ...part, isMoney: part.what === 'money' })),
    evidence: one.evidence,
  }
}

interface ShapeGround {
  choice?: StepChoice
  /** The part chosen, '' for the whole step. */
  obligation: string
  decision: string
}

/** The fields a form shows, given what is chosen in it so far. */
export function fieldsOf(kind: FactKind, ground: ShapeGround): FactField[] {
  const { choice, obligation, decision } = ground
  const part = choice?.parts.find((one) => one.key === obligation)
  return shapes[kind].filter((field) => {
    switch (field) {
      case 'obligation':
        return (choice?.parts.length ?? 0) > 0
      case 'outcome':
        return obligation === '' && (choice?.outcomes.length ?? 0) > 1
      case 'amount':
        return part?.isMoney === true
      case 'dueOn':
      case 'length':
        return kind !== 'extension' || decision !== 'refused'
      default:
        return true
    }
  })
}

/** Whether the step comes before what it follows is recorded, so that the form asks why. */
export function asksWhy(kind: FactKind, choice: StepChoice | undefined): boolean {
  return kind === 'happened' && (choice?.status === 'waiting' || choice?.status === 'not_needed')
}
