import { useQueryClient } from '@tanstack/react-query'
import { useRouter } from 'next/navigation'
import { useState } from 'react'
import { movedWords } from '@/components/applications/clock-words'
import { formKindOf, replacedFact, type FactIntent } from '@/components/applications/fact-intent'
import { asksWhy, fieldsOf, stepChoices } from '@/components/applications/fact-shape'
import { factValuesOf } from '@/components/applications/fact-values'
import { factWords } from '@/components/applications/fact-words'
import { useToast } from '@/components/ui/toast'
import { applicationQuery, useRecordFact } from '@/lib/client/applications'
import { ProblemError } from '@/lib/client/fetcher'
import { newId } from '@/lib/client/new-id'
import { textOf, useFormCall } from '@/lib/client/use-form-call'
import type { FactBody, Terms } from '@/lib/domain/clocks/facts'
import type { ApplicationView, FactView } from '@/lib/schemas/application'

/**
 * The state of one form about a fact. Its id and the sequence it was opened at are kept for its
 * life, so that a second submit is the same fact and a fact recorded in between is noticed.
 */
export function useFactForm(
  view: ApplicationView,
  intent: FactIntent,
  onRecorded: (view: ApplicationView) => void,
) {
  const [id] = useState(newId)
  const [seq, setSeq] = useState(view.seq)
  const router = useRouter()
  const toast = useToast()
  const client = useQueryClient()
  const record = useRecordFact(view.id)
  const kind = formKindOf(view, intent)
  const replaced = replacedFact(view, intent)
  const from = intent.kind === 'correction' ? replaced : undefined
  const [chosen, setChosen] = useState(() => firstChosen(intent, from))
  const choices = stepChoices(view, wantedStep(intent, from))
  const choice = choices.find((one) => `${one.step}~${one.instance}` === chosen.step)

  async function send(values: FormData) {
    const ground = { id, kind, intent, atSeq: seq, zone: view.operator.zone }
    const { input, faults } = factValuesOf((name) => textOf(values, name), ground)
    if (faults.length > 0)
      throw new ProblemError(422, 'invalid', 'Some fields need another look', faults)
    const after = await record.mutateAsync(input).catch(async (error: unknown) => {
      if (error instanceof ProblemError && error.status === 409) await readNewState()
      throw error
    })
    toast({
      title: `Recorded: ${newestTitle(after)}`,
      detail: movedWords(view.items, after.items, after.todayOn),
    })
    onRecorded(after)
    router.refresh()
  }

  /** Undefined where it cannot be read: the form stays as it is then. */
  const readNewState = () =>
    client.fetchQuery({ ...applicationQuery(view.id), staleTime: 0 }).catch(() => undefined)

  async function loadNewState() {
    const fresh = await readNewState()
    if (fresh) setSeq(fresh.seq)
    router.refresh()
  }

  return {
    kind,
    from,
    replaced,
    chosen,
    choose: (change: Partial<typeof chosen>) => setChosen((before) => ({ ...before, ...change })),
    choices,
    choice,
    onlyTerms: intent.terms ?? termsIn(from),
    fields: fieldsOf(kind, { choice, ...chosen }).filter(
      (field) => !intent.terms || (field !== 'decision' && field !== 'effect'),
    ),
    needsReason: asksWhy(kind, choice),
    call: useFormCall(send),
    seq,
    loadNewState,
  }
}

function wantedStep(intent: FactIntent, from?: FactView) {
  return from?.step ? { step: from.step, instance: from.instance } : intent
}

function firstChosen(intent: FactIntent, from?: FactView) {
  const { step, instance } = wantedStep(intent, from)
  const decided = (from?.body as FactBody | undefined)?.decision
  return {
    step: step ? `${step}~${instance ?? 1}` : '',
    obligation: from?.obligation ?? intent.obligation ?? '',
    decision: decided ?? (intent.kind === 'extension' ? 'granted' : ''),
  }
}

/** The terms a corrected fact states: its correction asks for the same ones. */
function termsIn(from?: FactView): (keyof Terms)[] | undefined {
  const keys = Object.keys((from?.body as FactBody | undefined)?.terms ?? {})
  return keys.length === 0 ? undefined : (keys as (keyof Terms)[])
}

function newestTitle(view: ApplicationView): string {
  const newest = view.facts.at(-1)
  if (!newest) return 'the fact'
  return factWords(newest, { zone: view.operator.zone, facts: view.facts, items: view.items }).title
}
