'use client'

import { clsx } from 'clsx'
import { type ReactNode, useRef } from 'react'
import * as RadixDialog from 'radix-ui/dialog'

export interface DialogProps {
  open: boolean
  onOpenChange: (open: boolean) => void
  title: ReactNode
  /** One or two sentences under the title. */
  description?: ReactNode
  children?: ReactNode
  /** Buttons at the foot; the one to press last in the order. */
  footer?: ReactNode
  /** Tailwind width of the box on wide screens. */
  width?: 'narrow' | 'wide'
  /** A dialog that asks before something is lost. */
  role?: 'dialog' | 'alertdialog'
  /** It holds typed input: a stray press beside it does not close it. */
  holdsInput?: boolean
}

/** A ruled box over the page, a sheet from below on phones. Keeps the focus, closes on Escape. */
export function Dialog({
  open,
  onOpenChange,
  title,
  description,
  children,
  footer,
  width = 'narrow',
  role = 'dialog',
  holdsInput = false,
}: DialogProps) {
  const opener = useRef<Element | null>(null)
  return (
    <RadixDialog.Root open={open} onOpenChange={onOpenChange}>
      <RadixDialog.Portal>
        <RadixDialog.Overlay className="fixed inset-0 z-40 bg-(--scrim)" />
        <RadixDialog.Content
          role={role}
          onPointerDownOutside={(event) => holdsInput && event.preventDefault()}
          onOpenAutoFocus={() => {
            opener.current = document.activeElement
          }}
          onCloseAutoFocus={(event) => {
            event.preventDefault()
            if (opener.current instanceof HTMLElement) opener.current.focus()
          }}
          {...(!description && { 'aria-describedby': undefined })}
          className={clsx(
            'border-ink bg-film text-ink fixed z-50 flex max-h-[88dvh] flex-col border-[1.5px]',
            'max-sm:inset-x-0 max-sm:bottom-0 max-sm:border-x-0 max-sm:border-b-0',
            'sm:top-1/2 sm:left-1/2 sm:w-full sm:-translate-x-1/2 sm:-translate-y-1/2',
            width === 'wide' ? 'sm:max-w-3xl' : 'sm:max-w-lg',
          )}
        >
          <div className="border-ink flex items-start justify-between gap-6 border-b px-5 py-3.5">
            <div>
              <RadixDialog.Title className="text-lg">{title}</RadixDialog.Title>
              {description && (
                <RadixDialog.Description className="text-ink-2 mt-0.5 text-sm">
                  {description}
                </RadixDialog.Description>
              )}
            </div>
            <RadixDialog.Close className="decoration-ink-3 hover:decoration-ink text-sm font-medium underline underline-offset-3 pointer-coarse:min-h-11">
              Close
            </RadixDialog.Close>
          </div>
          {children && <div className="overflow-y-auto px-5 py-4">{children}</div>}
          {footer && (
            <div className="border-rule flex flex-wrap justify-end gap-2.5 border-t px-5 py-3.5 pb-[max(0.875rem,env(safe-area-inset-bottom))]">
              {footer}
            </div>
          )}
        </RadixDialog.Content>
      </RadixDialog.Portal>
    </RadixDialog.Root>
  )
}
