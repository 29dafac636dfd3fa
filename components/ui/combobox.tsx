'use client'

import { clsx } from 'clsx'
import { type KeyboardEvent, useEffect, useId, useRef, useState } from 'react'
import { Field, type FieldFrame, fieldNotes } from '@/components/ui/field'
import { type ComboOption, filterOptions } from '@/components/ui/option-filter'

export interface ComboboxProps extends FieldFrame {
  options: readonly ComboOption[]
  /** The chosen value, '' for none. */
  value: string
  onChange: (value: string) => void
  placeholder?: string
  /** Said when nothing matches. */
  noneLabel?: string
}

/** Choose one of many by typing part of it: arrows move, Enter takes, Escape leaves it as it was. */
export function Combobox(props: ComboboxProps) {
  const {
    options,
    value,
    onChange,
    placeholder,
    noneLabel = 'Nothing matches',
    name,
    ...frame
  } = props
  const id = useId()
  const chosen = options.find((option) => option.value === value)
  const [typed, setTyped] = useState<string>()
  const [active, setActive] = useState(0)
  const list = useRef<HTMLUListElement>(null)
  const isOpen = typed !== undefined
  const shown = isOpen ? filterOptions(options, typed) : []
  const activeIndex = Math.min(active, shown.length - 1)

  useEffect(() => {
    if (isOpen) list.current?.children[activeIndex]?.scrollIntoView({ block: 'nearest' })
  }, [isOpen, activeIndex])

  function type(text: string) {
    setTyped(text)
    setActive(0)
    if (text === '') onChange('')
  }

  function take(option: ComboOption | undefined) {
    if (option) onChange(option.value)
    setTyped(undefined)
  }

  function press(event: KeyboardEvent<HTMLInputElement>) {
    const moves: Record<string, number> = { ArrowDown: 1, ArrowUp: -1 }
    const move = moves[event.key]
    if (move !== undefined) {
      event.preventDefault()
      if (!isOpen) return setTyped('')
      setActive((activeIndex + move + shown.length) % Math.max(1, shown.length))
    } else if (event.key === 'Enter' && isOpen) {
      event.preventDefault()
      take(shown[activeIndex])
    } else if (event.key === 'Escape' && isOpen) {
      event.stopPropagation()
      setTyped(undefined)
    }
  }

  return (
    <Field {...frame} id={id}>
      <div className="relative w-full">
        <input
          id={id}
          name={name}
          role="combobox"
          className="control"
          autoComplete="off"
          placeholder={placeholder}
          value={typed ?? chosen?.label ?? ''}
          aria-expanded={isOpen}
          aria-controls={`${id}-list`}
          aria-autocomplete="list"
          aria-activedescendant={isOpen && shown.length > 0 ? `${id}-${activeIndex}` : undefined}
          aria-invalid={frame.error ? true : undefined}
          aria-describedby={fieldNotes(id, frame)}
          onChange={(event) => type(event.target.value)}
          onKeyDown={press}
          onClick={() => !isOpen && setTyped('')}
          onBlur={() => setTyped(undefined)}
        />
        {isOpen && (
          <ul
            ref={list}
            id={`${id}-list`}
            role="listbox"
            aria-label={typeof frame.label === 'string' ? frame.label : name}
            className="border-ink bg-sheet absolute inset-x-0 top-full z-30 -mt-px max-h-72 overflow-y-auto border-[1.5px] py-1"
          >
            {shown.map((option, index) => (
              <li
                key={option.value}
                id={`${id}-${index}`}
                role="option"
                aria-selected={option.value === value}
                onMouseDown={(event) => event.preventDefault()}
                onClick={() => take(option)}
                onMouseMove={() => setActive(index)}
                className={clsx(
                  'cursor-pointer px-2.5 py-1.5',
                  index === activeIndex && 'bg-ink text-film',
                )}
              >
                {option.label}
                {option.detail && <span className="block text-sm opacity-85">{option.detail}</span>}
              </li>
            ))}
            {shown.length === 0 && <li className="text-ink-2 px-2.5 py-1.5">{noneLabel}</li>}
          </ul>
        )}
      </div>
    </Field>
  )
}
