import { clsx } from 'clsx'
import type { ReactNode } from 'react'
import { StateWord, type Tone } from '@/components/ui/state-word'

/** What a check says under its field: words with the figure and the limit. */
export interface FieldCheck {
  tone: Tone
  text: ReactNode
}

/** The parts every field shares; `name` is the path that a problem's `fields` speak of. */
export interface FieldFrame {
  label: ReactNode
  name: string
  unit?: ReactNode
  hint?: ReactNode
  check?: FieldCheck
  error?: string
  /** Marks the label with "optional"; fields are required otherwise. */
  optional?: boolean
  /** Keeps the label above the value at every width, for narrow columns and dialogs. */
  stacked?: boolean
}

/** Ids that tie the notes under a field to its control. */
export function fieldNotes(id: string, frame: Pick<FieldFrame, 'hint' | 'check' | 'error'>) {
  const ids = [
    frame.error && `${id}-error`,
    frame.check && `${id}-check`,
    frame.hint && `${id}-hint`,
  ].filter(Boolean)
  return ids.length ? ids.join(' ') : undefined
}

function Notes({ id, hint, check, error }: { id: string } & FieldNoteProps) {
  if (!hint && !check && !error) return null
  return (
    <div className="field-note grid gap-0.5 text-sm">
      {error && (
        <p id={`${id}-error`} className="text-late font-semibold">
          {error}
        </p>
      )}
      {check && (
        <p id={`${id}-check`}>
          <StateWord tone={check.tone}>{check.text}</StateWord>
        </p>
      )}
      {hint && (
        <p id={`${id}-hint`} className="text-ink-2">
          {hint}
        </p>
      )}
    </div>
  )
}

type FieldNoteProps = Pick<FieldFrame, 'hint' | 'check' | 'error'>

interface FieldProps extends Omit<FieldFrame, 'name'> {
  id: string
  children: ReactNode
  className?: string
}

/** One row of a form: label, value, unit in its own column, and what the check says below. */
export function Field({
  id,
  label,
  unit,
  optional,
  stacked,
  className,
  children,
  ...notes
}: FieldProps) {
  return (
    <div className={clsx('field', stacked && 'field-stacked', className)}>
      <label htmlFor={id} className="font-medium">
        {label}
        {optional && <span className="cap ml-1.5">optional</span>}
      </label>
      <div className="field-control">
        {children}
        {unit && <span className="cap field-unit">{unit}</span>}
      </div>
      <Notes id={id} hint={notes.hint} check={notes.check} error={notes.error} />
    </div>
  )
}

interface FieldGroupProps extends Omit<FieldFrame, 'unit' | 'name'> {
  id: string
  children: ReactNode
}

/** A row that holds several controls under one legend, such as radios. */
export function FieldGroup({ id, label, optional, stacked, children, ...notes }: FieldGroupProps) {
  return (
    <fieldset
      className={clsx('field', stacked && 'field-stacked')}
      aria-describedby={fieldNotes(id, notes)}
    >
      <legend className="contents">
        <span className="self-start pt-1 font-medium">
          {label}
          {optional && <span className="cap ml-1.5">optional</span>}
        </span>
      </legend>
      <div className="grid gap-1">{children}</div>
      <Notes id={id} hint={notes.hint} check={notes.check} error={notes.error} />
    </fieldset>
  )
}
