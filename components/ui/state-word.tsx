import { clsx } from 'clsx'
import type { ReactNode } from 'react'

/** What a word says about a thing: done and ours, near, missed, theirs, right, or still ahead. */
export type Tone = 'plain' | 'done' | 'soon' | 'missed' | 'theirs' | 'ok' | 'far'

const tones: Record<Tone, string> = {
  plain: 'text-ink',
  done: 'text-copper',
  soon: 'text-soon',
  missed: 'text-late',
  theirs: 'text-blue',
  ok: 'text-ok',
  far: 'text-ink-2',
}

/** A state in words, with a tone; the words carry the meaning without the color. */
export function StateWord({ tone, children }: { tone: Tone; children: ReactNode }) {
  return <span className={clsx(tones[tone], tone !== 'plain' && 'font-medium')}>{children}</span>
}
