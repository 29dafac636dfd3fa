import { kindInForce } from '@/components/applications/fact-words'
import type { FactKind, Terms } from '@/lib/domain/clocks/facts'
import type { ApplicationView, FactView } from '@/lib/schemas/application'

/** What a press wants to record; the form asks only for what that needs. */
export interface FactIntent {
  kind: FactKind
  step?: string
  instance?: number
  obligation?: string
  /** The fact that is corrected or retracted. */
  replaces?: string
  /** Only these terms of the request are asked for. */
  terms?: readonly (keyof Terms)[]
}

/** The fact a correction or retraction points at. */
export function replacedFact(view: ApplicationView, intent: FactIntent): FactView | undefined {
  return view.facts.find((fact) => fact.id === intent.replaces)
}

/** The kind whose fields the form shows: a correction has those of what it corrects. */
export function formKindOf(view: ApplicationView, intent: FactIntent): FactKind {
  const replaced = replacedFact(view, intent)
  if (intent.kind !== 'correction' || !replaced) return intent.kind
  return kindInForce(replaced, view.facts)
}

interface IntentWords {
  title: string
  /** The press that records it. */
  act: string
  description?: string
}

const words: Record<FactKind, IntentWords> = {
  happened: { title: 'Record an event', act: 'Record' },
  taken_over: { title: 'Take over a step', act: 'Record' },
  scheduled: {
    title: 'Book a date',
    act: 'Book the date',
    description: 'Clocks that count from it are provisional until it has happened.',
  },
  stated: {
    title: 'They state another date',
    act: 'Record the stated date',
    description: 'Both dates are shown; the earlier one is worked to until they agree.',
  },
  extension: { title: 'Extension', act: 'Record the extension' },
  stop: {
    title: 'Stop the clock',
    act: 'Stop the clock',
    description: 'The first and the last day of a stop do not count.',
  },
  resume: { title: 'Resume the clock', act: 'Resume the clock' },
  waived: { title: 'Waive a step', act: 'Record the waiver' },
  withdrawn: { title: 'Withdraw the request', act: 'Withdraw the request' },
  reinstated: {
    title: 'Reinstate the request',
    act: 'Reinstate the request',
    description: 'The days from the withdrawal to the reinstatement do not count.',
  },
  changed: { title: 'Change the terms', act: 'Record the change' },
  correction: {
    title: 'Correct',
    act: 'Record the correction',
    description: 'The old statement stays in the record, struck through, with your reason.',
  },
  retraction: {
    title: 'Retract',
    act: 'Retract it',
    description: 'It no longer counts, but stays in the record, struck through, with your reason.',
  },
}

/** Title, press and explanation of a form. */
export function intentWords(intent: FactIntent): IntentWords {
  if (intent.kind === 'changed' && intent.terms?.length === 1 && intent.terms[0] === 'requestNo')
    return { title: 'Record the request number', act: 'Record the number' }
  return words[intent.kind]
}
