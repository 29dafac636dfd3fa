import type { DueScope } from '@/components/due/due-text'
import { EmptyState } from '@/components/ui/empty-state'
import { LinkButton } from '@/components/ui/link-button'
import { routes } from '@/lib/routes'
import type { Due } from '@/lib/schemas/application'

/** Stands where the list would: says that nothing is owed and where to look instead. */
export function NothingDue({ scope, counts }: { scope: DueScope; counts: Due['counts'] }) {
  if (scope === 'theirs') {
    return (
      <EmptyState
        title="Utilities owe nothing with a date"
        actions={<LinkButton href={routes.pipeline()}>Open the pipeline</LinkButton>}
      >
        No clock of a utility is running. The pipeline shows what each application waits for.
      </EmptyState>
    )
  }
  if (scope === 'mine' && counts.ours > 0) {
    return (
      <EmptyState
        title="Nothing is owed by you"
        actions={<LinkButton href={routes.due({ scope: 'ours' })}>Our projects</LinkButton>}
      >
        {counts.ours === 1 ? 'One clock runs' : `${counts.ours} clocks run`} for others on our
        projects.
      </EmptyState>
    )
  }
  return (
    <EmptyState
      title={scope === 'mine' ? 'Nothing is owed by you' : 'Nothing is owed by us'}
      actions={
        <>
          <LinkButton href={routes.due({ scope: 'theirs' })}>What utilities owe</LinkButton>
          <LinkButton href={routes.pipeline()}>Open the pipeline</LinkButton>
        </>
      }
    >
      {counts.theirs > 0
        ? `Utilities owe ${counts.theirs}: look whether one of them needs a reminder.`
        : 'No clock is running. The pipeline shows which application waits for its next event.'}
    </EmptyState>
  )
}
