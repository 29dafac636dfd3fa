import type { Consequence, RuleSource, Step } from '@/lib/domain/clocks/procedure'

type Given = Pick<Step, 'key' | 'title' | 'stage' | 'party' | 'source'> & Partial<Step>

const quiet: Consequence = { effect: 'duty', say: 'Nothing follows by itself.' }

/** A late utility must say so, give the reason and a new date. Source: SGIP 4.1 (from memory). */
export const noticeDuty: Consequence = {
  effect: 'duty',
  say: 'They must give notice, the reason and a new date.',
  first: 'Ask for the notice and a new date.',
}

export const withdrawn = (first: string): Consequence => ({
  effect: 'withdrawn',
  say: 'The request is withdrawn.',
  first,
})

/** A step with what most steps have in common filled in. */
export function stepWith(given: Given): Step {
  const theirs = given.party !== 'applicant' && given.party !== 'both'
  return {
    kind: 'normal',
    clocks: [],
    outcomes: [{ key: 'done', title: 'Done' }],
    onMiss: given.clocks && theirs ? noticeDuty : quiet,
    owner: theirs ? 'liaison' : 'developer',
    ...given,
  }
}

/** Marks a source: `read`, `adapted` (read in an adapted text) or from memory with confidence. */
export function sources(document: string) {
  return {
    read: (id: string, section: string, note?: string): RuleSource => ({
      id,
      document,
      section,
      basis: 'read',
      ...(note && { note }),
    }),
    adapted: (id: string, section: string, note?: string): RuleSource => ({
      id,
      document,
      section,
      basis: 'adapted',
      ...(note && { note }),
    }),
    memory: (
      id: string,
      section: string,
      confidence: 'high' | 'medium' | 'low' = 'high',
      note?: string,
    ): RuleSource => ({
      id,
      document,
      section,
      basis: 'from_memory',
      confidence,
      ...(note && { note }),
    }),
  }
}
