'use client'

import type { ReactNode } from 'react'
import { Button } from '@/components/ui/button'
import { Dialog } from '@/components/ui/dialog'

interface ConfirmProps {
  open: boolean
  onOpenChange: (open: boolean) => void
  title: string
  /** What will be changed and what cannot be taken back. */
  children: ReactNode
  /** The act itself, in the trade's verb: "Withdraw the request". */
  act: string
  actBusy?: string
  /** Words that leave everything as it is. */
  keep?: string
  danger?: boolean
  /** Closes when the promise fulfills; stays open when it rejects. */
  onConfirm: () => Promise<unknown>
  /** Shown inside after a refusal. */
  error?: ReactNode
}

/** Asks before an act that is hard to take back. */
export function Confirm({
  open,
  onOpenChange,
  title,
  children,
  act,
  actBusy,
  keep = 'Keep as it is',
  danger,
  onConfirm,
  error,
}: ConfirmProps) {
  const confirm = () =>
    onConfirm().then(
      () => onOpenChange(false),
      () => undefined,
    )
  return (
    <Dialog
      open={open}
      onOpenChange={onOpenChange}
      title={title}
      role="alertdialog"
      footer={
        <>
          <Button onClick={() => onOpenChange(false)}>{keep}</Button>
          <Button look={danger ? 'danger' : 'primary'} busyLabel={actBusy} onClick={confirm}>
            {act}
          </Button>
        </>
      }
    >
      {children}
      {error && (
        <p role="alert" className="text-late mt-3 font-semibold">
          {error}
        </p>
      )}
    </Dialog>
  )
}
