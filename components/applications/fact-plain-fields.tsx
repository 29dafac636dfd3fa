'use client'

import { channelWords } from '@/components/applications/fact-words'
import type { FactField, StepChoice } from '@/components/applications/fact-shape'
import { formatDollars } from '@/components/applications/money-words'
import {
  DateField,
  NumberField,
  SelectField,
  TextAreaField,
  TextField,
} from '@/components/ui/text-fields'
import { channels, type FactBody, type FactKind } from '@/lib/domain/clocks/facts'
import { formatDate } from '@/lib/domain/format-date'
import type { FactView } from '@/lib/schemas/application'

interface PlainFieldProps {
  field: FactField
  kind: FactKind
  choice: StepChoice | undefined
  from?: FactView
  todayOn: string
  errorOf: (path: string) => string | undefined
}

const dueLabels: Partial<Record<FactKind, string>> = {
  scheduled: 'Booked for',
  stated: 'They state',
  extension: 'New date',
  taken_over: 'Due on',
}

/** A field whose shape does not depend on what is chosen elsewhere in the form. */
export function PlainField(props: PlainFieldProps) {
  const { field, kind, choice, from, todayOn, errorOf } = props
  const body = from?.body as FactBody | undefined
  switch (field) {
    case 'sinceOn':
      return (
        <DateField
          label="Running since"
          name="sinceOn"
          optional
          defaultValue={body?.sinceOn ?? ''}
          hint="Left empty, the step is taken over as done."
          error={errorOf('sinceOn')}
        />
      )
    case 'dueOn':
      return (
        <DateField
          label={dueLabels[kind] ?? 'Due on'}
          name="dueOn"
          optional={kind === 'extension' || kind === 'taken_over'}
          defaultValue={from?.dueOn ?? ''}
          error={errorOf('dueOn')}
        />
      )
    case 'sentOn':
      return (
        <DateField
          label="Sent on"
          name="sentOn"
          optional
          max={todayOn}
          defaultValue={from?.sentOn ?? ''}
          hint="The date on the letter or message, where it differs."
          error={errorOf('sentOn')}
        />
      )
    case 'receivedOn':
      return (
        <DateField
          label={receiptLabel(kind, choice)}
          name="receivedOn"
          max={todayOn}
          defaultValue={from ? (from.receivedOn ?? '') : todayOn}
          hint={`Today is ${formatDate(todayOn)} at the utility.`}
          error={errorOf('receivedOn')}
        />
      )
    case 'channel':
      return (
        <SelectField
          label="Channel"
          optional
          name="channel"
          emptyLabel="Not said"
          options={channels.map((one) => ({ value: one, label: capitalized(channelWords[one]) }))}
          defaultValue={from?.channel ?? ''}
          error={errorOf('channel')}
        />
      )
    case 'amount':
      return (
        <NumberField
          label="Amount"
          name="amountMinor"
          unit="US dollars"
          defaultValue={from?.amountMinor == null ? '' : formatDollars(from.amountMinor)}
          error={errorOf('amountMinor')}
        />
      )
    case 'effect':
      return (
        <TextField
          label="Effect on standing"
          name="effect"
          optional
          maxLength={500}
          defaultValue={body?.effect ?? ''}
          error={errorOf('effect')}
        />
      )
    default:
      return (
        <TextAreaField
          label={kind === 'stop' || kind === 'withdrawn' ? 'Why' : 'Note'}
          name="note"
          optional
          rows={2}
          maxLength={2000}
          defaultValue={body?.note ?? ''}
          error={errorOf('note')}
        />
      )
  }
}

function receiptLabel(kind: FactKind, choice: StepChoice | undefined): string {
  if (kind === 'happened' && choice) return choice.isOurs ? 'Received by them on' : 'Received on'
  if (kind === 'happened' || kind === 'stated' || kind === 'extension') return 'Received on'
  return 'As of'
}

function capitalized(text: string): string {
  return `${text.slice(0, 1).toUpperCase()}${text.slice(1)}`
}
