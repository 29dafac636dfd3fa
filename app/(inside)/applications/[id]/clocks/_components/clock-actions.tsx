'use client'

import { isOurs } from '@/components/applications/clock-words'
import { useFactDesk } from '@/components/applications/fact-desk'
import type { FactIntent } from '@/components/applications/fact-intent'
import { Button } from '@/components/ui/button'
import type { FactKind } from '@/lib/domain/clocks/facts'
import type { FactView, ItemView } from '@/lib/schemas/application'

/** What the reader's roles allow here. */
export interface ClockMay {
  record: boolean
  correct: boolean
  assign: boolean
  acknowledge: boolean
}

interface ClockActionsProps {
  item: ItemView
  view: { facts: readonly FactView[] }
  may: ClockMay
}

const labels: Partial<Record<FactKind, string>> = {
  scheduled: 'Book a date',
  extension: 'Extension',
  stated: 'They state another date',
  waived: 'Waive',
}

/** What can be recorded about one step as it stands. */
export function ClockActions({ item, view, may }: ClockActionsProps) {
  const open = useFactDesk()
  const isSettled = item.status === 'done' || item.status === 'waived'
  const closing = isSettled ? closingFact(item, view.facts) : undefined
  if (closing && may.correct)
    return (
      <div className="flex flex-wrap gap-2.5">
        <Button onClick={() => open({ kind: 'correction', replaces: closing.id })}>Correct</Button>
        <Button onClick={() => open({ kind: 'retraction', replaces: closing.id })}>Retract</Button>
      </div>
    )
  if (!may.record || isSettled || item.status === 'closed') return null
  const about = { step: item.step, instance: item.instance }
  return (
    <div className="flex flex-wrap gap-2.5">
      <Button look="primary" onClick={() => open({ kind: 'happened', ...about })}>
        Record
      </Button>
      {furtherKinds(item).map((kind) => (
        <Button key={kind} onClick={() => open({ kind, ...about } satisfies FactIntent)}>
          {labels[kind]}
        </Button>
      ))}
    </div>
  )
}

function furtherKinds(item: ItemView): FactKind[] {
  if (item.status === 'waiting' || item.status === 'not_needed') return ['scheduled', 'waived']
  const dated = item.dueOn !== null || item.statedDueOn !== null
  return [
    'scheduled',
    ...(dated ? (['extension'] as const) : []),
    ...(isOurs(item) || dated ? (['stated'] as const) : []),
    'waived',
  ]
}

/** The fact in force that closed the step. */
function closingFact(item: ItemView, facts: readonly FactView[]): FactView | undefined {
  return facts.findLast(
    (fact) =>
      fact.step === item.step &&
      fact.instance === item.instance &&
      fact.replacedById === null &&
      ['happened', 'taken_over', 'waived', 'correction'].includes(fact.kind),
  )
}
