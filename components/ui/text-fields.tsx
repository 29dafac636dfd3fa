import { clsx } from 'clsx'
import { type ComponentProps, useId } from 'react'
import { Field, type FieldFrame, fieldNotes } from '@/components/ui/field'

export interface InputFieldProps
  extends FieldFrame, Omit<ComponentProps<'input'>, 'name' | 'className'> {
  /** Classes of the control, such as a narrower width. */
  controlClass?: string
}

function splitFrame<P extends FieldFrame & { id?: string }>(props: P, fallbackId: string) {
  const { label, unit, hint, check, error, optional, stacked, ...control } = props
  const id = props.id ?? fallbackId
  const frame = { id, label, unit, hint, check, error, optional, stacked }
  const aria = {
    id,
    'aria-invalid': error ? (true as const) : undefined,
    'aria-describedby': fieldNotes(id, props),
  }
  return { frame, control, aria }
}

function InputField({ controlClass, ...props }: InputFieldProps) {
  const { frame, control, aria } = splitFrame(props, useId())
  return (
    <Field {...frame}>
      <input {...control} {...aria} className={clsx('control', controlClass)} />
    </Field>
  )
}

/** A line of text; also e-mail and password through `type`. Spread a form's `register()` on it. */
export function TextField(props: InputFieldProps) {
  return <InputField type="text" {...props} />
}

/**
 * A quantity: typed as text so that a wheel turn changes nothing, read as decimal by the schema.
 * Quantities of one form are equally wide, so that their units stand in one column.
 */
export function NumberField({ controlClass = 'sm:max-w-36', ...props }: InputFieldProps) {
  return (
    <InputField
      type="text"
      inputMode="decimal"
      autoComplete="off"
      {...props}
      controlClass={clsx('mono text-right', controlClass)}
    />
  )
}

/** A civil date, `YYYY-MM-DD` as value. */
export function DateField({ controlClass, ...props }: InputFieldProps) {
  return <InputField type="date" {...props} controlClass={clsx('mono sm:max-w-48', controlClass)} />
}

/** An hour of the day, `HH:MM` as value; name the zone in `unit`. */
export function TimeField({ controlClass, ...props }: InputFieldProps) {
  return <InputField type="time" {...props} controlClass={clsx('mono sm:max-w-36', controlClass)} />
}

export interface TextAreaFieldProps
  extends FieldFrame, Omit<ComponentProps<'textarea'>, 'name' | 'className'> {
  controlClass?: string
}

/** Several lines of text. */
export function TextAreaField({ controlClass, rows = 4, ...props }: TextAreaFieldProps) {
  const { frame, control, aria } = splitFrame(props, useId())
  return (
    <Field {...frame}>
      <textarea
        {...control}
        {...aria}

        rows={rows}
        className={clsx('control', controlClass)}
      />
    </Field>
  )
}

export interface SelectOption {
  value: string
  label: string
  disabled?: boolean
}

export interface SelectFieldProps
  extends FieldFrame, Omit<ComponentProps<'select'>, 'name' | 'className'> {
  options: readonly SelectOption[]
  /** First, empty choice in words, such as "Choose a step". */
  emptyLabel?: string
  controlClass?: string
}

/** One of a short list; the browser's own control, so that phones show their own picker. */
export function SelectField({ options, emptyLabel, controlClass, ...props }: SelectFieldProps) {
  const { frame, control, aria } = splitFrame(props, useId())
  return (
    <Field {...frame}>
      <select
        {...control}
        {...aria}

        className={clsx('control', controlClass)}
      >
        {emptyLabel !== undefined && <option value="">{emptyLabel}</option>}
        {options.map((option) => (
          <option key={option.value} value={option.value} disabled={option.disabled}>
            {option.label}
          </option>
        ))}
      </select>
    </Field>
  )
}
