'use client'

import { clsx } from 'clsx'
import { type ComponentProps, type MouseEvent, useRef, useState, useSyncExternalStore } from 'react'
import { useFormStatus } from 'react-dom'
import { type ButtonLook, buttonClass } from '@/components/ui/button-class'

export interface ButtonProps extends Omit<ComponentProps<'button'>, 'onClick'> {
  look?: ButtonLook
  /** Work is running: the button keeps its focus and takes no press. */
  busy?: boolean
  /** Words shown while busy, such as "Recording". */
  busyLabel?: string
  /** A returned promise keeps the button busy until it settles. */
  onClick?: (event: MouseEvent<HTMLButtonElement>) => void | Promise<unknown>
}

const never = () => () => undefined

/** False until the page's script has come: a form sent before that is sent by nobody's code. */
function useAwake(): boolean {
  return useSyncExternalStore(
    never,
    () => true,
    () => false,
  )
}

/** A press that cannot be doubled: while its work runs a second press is ignored. */
export function Button({
  look = 'plain',
  busy = false,
  busyLabel,
  className,
  children,
  type = 'button',
  onClick,
  disabled,
  ...rest
}: ButtonProps) {
  const isAsleep = !useAwake() && type === 'submit'
  const running = useRef(false)
  const [isRunning, setRunning] = useState(false)
  const { pending } = useFormStatus()
  const isBusy = busy || isRunning || (type === 'submit' && pending)

  async function press(event: MouseEvent<HTMLButtonElement>) {
    if (isBusy || running.current) {
      event.preventDefault()
      return
    }
    const work = onClick?.(event)
    if (!(work instanceof Promise)) return
    running.current = true
    setRunning(true)
    try {
      await work
    } finally {
      running.current = false
      setRunning(false)
    }
  }

  return (
    <button
      {...rest}
      type={type}
      disabled={disabled || isAsleep}
      className={buttonClass(look, clsx(className, isAsleep && 'disabled:opacity-100!'))}
      aria-disabled={isBusy || undefined}
      aria-busy={isBusy || undefined}
      onClick={press}
    >
      {isBusy && busyLabel ? busyLabel : children}
    </button>
  )
}
