import { type ComponentProps, type ReactNode, useId } from 'react'
import { FieldGroup, type FieldFrame, fieldNotes } from '@/components/ui/field'

type BoxProps = Omit<ComponentProps<'input'>, 'name' | 'className' | 'type'>

export interface CheckboxFieldProps extends BoxProps {
  name: string
  /** The sentence beside the box. */
  label: ReactNode
  hint?: ReactNode
  error?: string
}

/** One yes or no, its sentence beside the box. */
export function CheckboxField({ label, hint, error, id, ...box }: CheckboxFieldProps) {
  const fallbackId = useId()
  const boxId = id ?? fallbackId
  return (
    <div className="py-2">
      <label className="inline-flex items-start gap-2.5 pointer-coarse:min-h-11">
        <input
          {...box}
          id={boxId}
          type="checkbox"
          className="accent-copper mt-0.5 size-4"
          aria-invalid={error ? true : undefined}
          aria-describedby={fieldNotes(boxId, { hint, error })}
        />
        <span>{label}</span>
      </label>
      {error && (
        <p id={`${boxId}-error`} className="text-late pl-6.5 text-sm font-semibold">
          {error}
        </p>
      )}
      {hint && (
        <p id={`${boxId}-hint`} className="text-ink-2 pl-6.5 text-sm">
          {hint}
        </p>
      )}
    </div>
  )
}

export interface Choice {
  value: string
  label: ReactNode
  detail?: ReactNode
}

export interface RadioFieldProps extends BoxProps, Omit<FieldFrame, 'unit'> {
  options: readonly Choice[]
}

/** One of a few, all in sight. */
export function RadioField({
  options,
  label,
  hint,
  check,
  error,
  optional,
  stacked,
  defaultValue,
  value,
  ...box
}: RadioFieldProps) {
  const id = useId()
  return (
    <FieldGroup {...{ id, label, hint, check, error, optional, stacked }}>
      {options.map((option) => (
        <label key={option.value} className="flex items-start gap-2.5 py-1 pointer-coarse:min-h-11">
          <input
            {...box}
            type="radio"
            value={option.value}
            checked={value === undefined ? undefined : value === option.value}
            defaultChecked={value === undefined ? defaultValue === option.value : undefined}
            className="accent-copper mt-0.5 size-4 shrink-0"
          />
          <span>
            {option.label}
            {option.detail && <span className="text-ink-2 block text-sm">{option.detail}</span>}
          </span>
        </label>
      ))}
    </FieldGroup>
  )
}
