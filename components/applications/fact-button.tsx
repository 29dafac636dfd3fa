'use client'

import type { ReactNode } from 'react'
import { useFactDesk } from '@/components/applications/fact-desk'
import type { FactIntent } from '@/components/applications/fact-intent'
import { Button } from '@/components/ui/button'
import type { ButtonLook } from '@/components/ui/button-class'

interface FactButtonProps {
  intent: FactIntent
  look?: ButtonLook
  /** What it is about, where the word on it is not enough alone. */
  label?: string
  children: ReactNode
}

/** A press that opens the form for one fact. */
export function FactButton({ intent, look, label, children }: FactButtonProps) {
  const open = useFactDesk()
  return (
    <Button look={look} aria-label={label} onClick={() => open(intent)}>
      {children}
    </Button>
  )
}
