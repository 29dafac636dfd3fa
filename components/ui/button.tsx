'use client'

import { type ComponentProps, type MouseEvent, useRef, useState } from 'react'
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

/** A press that cannot be doubled: while its work runs a second press is ignored. */
export function Button({
  look = 'plain',
  busy = false,
  busyLabel,
  className,
  children,
  type = 'button',
  onClick,
  ...rest
}: ButtonProps) {
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
      className={buttonClass(look, className)}
      aria-disabled={isBusy || undefined}
      aria-busy={isBusy || undefined}
      onClick={press}
    >
      {isBusy && busyLabel ? busyLabel : children}
    </button>
  )
}
