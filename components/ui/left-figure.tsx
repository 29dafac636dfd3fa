import { clsx } from 'clsx'
import type { ReactNode } from 'react'

export type LeftTone = 'soon' | 'missed' | 'far' | 'theirs'

const tones: Record<LeftTone, string> = {
  soon: 'text-soon',
  missed: 'text-late',
  far: 'text-ink-2',
  theirs: 'text-blue',
}

/** The time left, drawn as a figure under a small dimension line: "7 BD", "missed yesterday". */
export function LeftFigure({ tone, children }: { tone: LeftTone; children: ReactNode }) {
  return <span className={clsx('left-figure', tones[tone])}>{children}</span>
}
