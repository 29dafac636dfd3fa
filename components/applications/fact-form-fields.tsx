'use client'

import { PlainField } from '@/components/applications/fact-plain-fields'
import type { FactField, StepChoice } from '@/components/applications/fact-shape'
import { zoneTimeWords } from '@/components/applications/clock-words'
import { termFields } from '@/components/applications/term-words'
import { RadioField } from '@/components/ui/choice-fields'
import {
  DateField,
  NumberField,
  SelectField,
  TextField,
  TimeField,
} from '@/components/ui/text-fields'
import type { FactBody, FactKind, Terms } from '@/lib/domain/clocks/facts'
import { localOf } from '@/lib/domain/clocks/zoned'
import { formatDate } from '@/lib/domain/format-date'
import type { FactView } from '@/lib/schemas/application'

export interface FactFieldsProps {
  kind: FactKind
  fields: readonly FactField[]
  /** Chosen so far; these decide what else is asked. */
  chosen: { step: string; obligation: string; decision: string }
  choose: (change: Partial<FactFieldsProps['chosen']>) => void
  choices: readonly StepChoice[]
  /** A correction stays with the step it corrects. */
  isStepFixed: boolean
  /** What the fields begin with: the fact that is corrected. */
  from?: FactView
  terms: Terms
  onlyTerms?: readonly (keyof Terms)[]
  zone: string
  todayOn: string
  errorOf: (path: string) => string | undefined
}

/** The fields that this kind of fact needs, in the order they are read off a letter. */
export function FactFields(props: FactFieldsProps) {
  return props.fields.map((field) => <OneField key={field} field={field} {...props} />)
}

function OneField(props: FactFieldsProps & { field: FactField }) {
  switch (props.field) {
    case 'step':
      return <StepField {...props} />
    case 'obligation':
      return <PartField {...props} />
    case 'outcome':
      return <OutcomeField {...props} />
    case 'decision':
      return <DecisionField {...props} />
    case 'terms':
      return <TermFields {...props} />
    case 'scope':
      return <ScopeField {...props} />
    case 'hour':
      return <HourField {...props} />
    case 'length':
      return <LengthField {...props} />
    default:
      return <PlainField {...props} choice={choiceIn(props)} />
  }
}

const roundWords = (choice: StepChoice) =>
  choice.instance > 1 ? `${choice.title}, round ${choice.instance}` : choice.title

function StepField({ choices, chosen, choose, isStepFixed, errorOf }: FactFieldsProps) {
  const ahead = (choice: StepChoice) =>
    choice.status === 'waiting' ? `${roundWords(choice)} (ahead)` : roundWords(choice)
  const shown = isStepFixed
    ? choices.filter((one) => `${one.step}~${one.instance}` === chosen.step)
    : choices
  return (
    <SelectField
      label="Step"
      name="step"
      emptyLabel={isStepFixed ? undefined : 'Choose the step'}
      options={shown.map((one) => ({ value: `${one.step}~${one.instance}`, label: ahead(one) }))}
      value={chosen.step}
      onChange={(event) => choose({ step: event.target.value, obligation: '' })}
      error={errorOf('step') ?? errorOf('instance')}
    />
  )
}

function choiceIn({ choices, chosen }: FactFieldsProps): StepChoice | undefined {
  return choices.find((one) => `${one.step}~${one.instance}` === chosen.step)
}

function PartField(props: FactFieldsProps) {
  const parts = choiceIn(props)?.parts ?? []
  return (
    <RadioField
      label="What of it"
      name="obligation"
      options={[
        { value: '', label: parts.length > 1 ? 'All of it' : 'The step itself' },
        ...parts.map((part) => ({ value: part.key, label: part.title })),
      ]}
      value={props.chosen.obligation}
      onChange={(event) => props.choose({ obligation: event.target.value })}
      error={props.errorOf('obligation')}
    />
  )
}

function OutcomeField(props: FactFieldsProps) {
  const choice = choiceIn(props)
  return (
    <RadioField
      key={props.chosen.step}
      label="How it ended"
      name="outcome"
      options={(choice?.outcomes ?? []).map((one) => ({ value: one.key, label: one.title }))}
      defaultValue={props.from?.outcome ?? undefined}
      hint={choice?.evidence ? `Closing it needs: ${choice.evidence}` : undefined}
      error={props.errorOf('outcome')}
    />
  )
}

function DecisionField(props: FactFieldsProps) {
  const { kind, chosen, choose, errorOf } = props
  const options = [
    ...(kind === 'changed' ? [{ value: '', label: 'In force as it is' }] : []),
    { value: 'asked', label: 'Asked for, no answer yet' },
    { value: 'granted', label: 'Granted' },
    { value: 'refused', label: 'Refused' },
  ]
  return (
    <RadioField
      label={kind === 'changed' ? 'How it stands' : 'Extension'}
      name="decision"
      options={options}
      value={chosen.decision}
      onChange={(event) => choose({ decision: event.target.value })}
      error={errorOf('decision')}
    />
  )
}

function TermFields({ onlyTerms, from, terms, errorOf }: FactFieldsProps) {
  const before = (from?.body as FactBody | undefined)?.terms ?? {}
  return termFields
    .filter((field) => onlyTerms === undefined || onlyTerms.includes(field.key))
    .map(({ key, label, unit, kind }) => {
      const now = terms[key]
      const common = {
        label,
        unit,
        name: `terms.${key}`,
        optional: onlyTerms === undefined,
        defaultValue: before[key] === undefined ? '' : String(before[key]),
        error: errorOf(`terms.${key}`) ?? (onlyTerms ? errorOf('terms') : undefined),
        hint: now === undefined || now === '' ? undefined : `Now ${nowWords(kind, now, unit)}`,
      }
      if (kind === 'number') return <NumberField key={key} {...common} />
      if (kind === 'date') return <DateField key={key} {...common} />
      return <TextField key={key} maxLength={120} autoComplete="off" {...common} />
    })
}

function nowWords(kind: string, value: unknown, unit?: string): string {
  if (kind === 'date') return formatDate(String(value))
  return unit ? `${String(value)} ${unit}` : String(value)
}

function ScopeField({ choices, from, errorOf }: FactFieldsProps) {
  const running = choices.filter((one) => one.status === 'open' || one.status === 'stopped')
  const scope = (from?.body as FactBody | undefined)?.scope ?? []
  return (
    <SelectField
      label="Which clock"
      name="scope"
      emptyLabel="All running clocks"
      options={running.map((one) => ({ value: one.step, label: roundWords(one) }))}
      defaultValue={scope[0] ?? ''}
      error={errorOf('scope')}
    />
  )
}

function HourField({ kind, from, zone, errorOf }: FactFieldsProps) {
  const isBooking = kind === 'scheduled'
  const at = from?.receivedAt ?? from?.sentAt
  return (
    <TimeField
      label="Hour"
      name={isBooking ? 'dueAt' : 'receivedAt'}
      unit={zoneTimeWords(zone)}
      optional
      defaultValue={at ? localOf(at, zone).time.slice(0, 5) : ''}
      hint={isBooking ? undefined : 'Counts where a closing hour decides.'}
      error={isBooking ? errorOf('dueAt') : (errorOf('receivedAt') ?? errorOf('sentAt'))}
    />
  )
}

function LengthField({ from, errorOf }: FactFieldsProps) {
  const body = from?.body as FactBody | undefined
  return (
    <>
      <NumberField
        label="or a length"
        name="lengthDays"
        optional
        unit="days"
        defaultValue={body?.lengthDays ?? ''}
        error={errorOf('lengthDays')}
      />
      <SelectField
        label="Counted in"
        name="unit"
        options={[
          { value: 'business_day', label: 'Business days' },
          { value: 'calendar_day', label: 'Calendar days' },
        ]}
        defaultValue={body?.unit ?? 'business_day'}
        error={errorOf('unit')}
      />
    </>
  )
}
