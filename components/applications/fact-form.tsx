'use client'

import { useQuery } from '@tanstack/react-query'
import { useEffect, useRef, useState } from 'react'
import { intentWords, type FactIntent } from '@/components/applications/fact-intent'
import { FactFields } from '@/components/applications/fact-form-fields'
import { FactRefusal } from '@/components/applications/fact-refusal'
import { factWords } from '@/components/applications/fact-words'
import { useFactForm } from '@/components/applications/use-fact-form'
import { Button } from '@/components/ui/button'
import { CheckboxField } from '@/components/ui/choice-fields'
import { ErrorSummary } from '@/components/ui/error-summary'
import { TextAreaField } from '@/components/ui/text-fields'
import { applicationQuery } from '@/lib/client/applications'
import type { ApplicationView } from '@/lib/schemas/application'

interface FactFormProps {
  applicationId: string
  intent: FactIntent
  /** Called with the new state once the fact is recorded. */
  onRecorded: (view: ApplicationView) => void
  onCancel?: () => void
}

/** Records one fact of any kind, a correction or a retraction; asks only what that kind needs. */
export function FactForm(props: FactFormProps) {
  const { data: view, error } = useQuery(applicationQuery(props.applicationId))
  if (view) return <LoadedForm {...props} view={view} />
  return <p role="status">{error ? error.message : 'Reading the application.'}</p>
}

function LoadedForm(props: FactFormProps & { view: ApplicationView }) {
  const { intent, view, onRecorded, onCancel } = props
  const form = useFactForm(view, intent, onRecorded)
  const { call } = form
  const isWithdrawal = intent.kind === 'withdrawn'
  const element = useRef<HTMLFormElement>(null)
  useEffect(() => {
    // A frame later: the dialog first notes what opened it, to give the focus back on closing.
    const frame = requestAnimationFrame(() =>
      element.current?.querySelector<HTMLElement>('select, input, textarea')?.focus(),
    )
    return () => cancelAnimationFrame(frame)
  }, [])
  return (
    <form ref={element} noValidate onSubmit={call.onSubmit}>
      <ErrorSummary errors={call.fields} />
      <FactRefusal
        problem={call.problem}
        view={view}
        seenSeq={form.seq}
        onLoad={form.loadNewState}
      />
      <Replaced view={view} intent={intent} />
      {isWithdrawal && <WithdrawalConsequence view={view} />}
      <FactFields
        {...form}
        isStepFixed={intent.kind === 'correction'}
        terms={view.terms}
        zone={view.operator.zone}
        todayOn={view.todayOn}
        errorOf={call.errorOf}
      />
      <ReasonField intent={intent} isOutOfOrder={form.needsReason} error={call.errorOf('reason')} />
      {isWithdrawal && (
        <CheckboxField
          name="understood"
          required
          label={`Withdraw ${view.terms.requestNo ?? 'this request'}, ${view.project.name}, and give up its place`}
        />
      )}
      <div className="mt-4 flex flex-wrap justify-end gap-2.5">
        {onCancel && (
          <Button onClick={onCancel}>{isWithdrawal ? 'Keep the request' : 'Cancel'}</Button>
        )}
        <Button
          type="submit"
          look={isWithdrawal ? 'danger' : 'primary'}
          busy={call.busy}
          busyLabel="Recording"
        >
          {intentWords(intent).act}
        </Button>
      </div>
    </form>
  )
}

function Replaced({ view, intent }: { view: ApplicationView; intent: FactIntent }) {
  const fact = view.facts.find((one) => one.id === intent.replaces)
  if (!fact) return null
  const words = factWords(fact, {
    zone: view.operator.zone,
    facts: view.facts,
    items: view.items,
  })
  return (
    <div className="border-rule border-b pb-2.5">
      <p className="font-semibold">{words.title}</p>
      <p className="cap">{words.details.join(' · ')}</p>
    </div>
  )
}

interface ReasonFieldProps {
  intent: FactIntent
  isOutOfOrder: boolean
  error?: string
}

/** Asked where the step is ahead, where a fact is replaced, or once the server asks. */
function ReasonField({ intent, isOutOfOrder, error }: ReasonFieldProps) {
  const isReplacing = intent.kind === 'correction' || intent.kind === 'retraction'
  const [wasAsked, setAsked] = useState(false)
  if (error !== undefined && !wasAsked) setAsked(true)
  if (!isReplacing && !isOutOfOrder && !wasAsked) return null
  return (
    <TextAreaField
      label={isReplacing ? 'Reason' : 'Reason out of order'}
      name="reason"
      rows={2}
      maxLength={1000}
      hint={isReplacing ? undefined : 'What it follows is not recorded yet.'}
      error={error}
    />
  )
}

function WithdrawalConsequence({ view }: { view: ApplicationView }) {
  const running = view.items.filter((item) => item.obligation === '' && item.status === 'open')
  return (
    <p className="border-late mb-1 border-l-4 pl-3.5">
      {view.operator.shortName} takes the request out of its queue.{' '}
      {running.length > 0 &&
        `${running.length} open ${running.length === 1 ? 'step closes' : 'steps close'} undone and every clock ends. `}
      A place in the queue comes back only where the utility reinstates it; what was posted is
      refunded by the procedure’s rules, not by this press.
    </p>
  )
}
