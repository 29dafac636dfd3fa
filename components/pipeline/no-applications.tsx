import { isNarrowed } from '@/components/pipeline/pipeline-address'
import { EmptyState } from '@/components/ui/empty-state'
import { LinkButton } from '@/components/ui/link-button'
import { routes } from '@/lib/routes'
import type { PipelineFilter } from '@/lib/schemas/application'

interface NoApplicationsProps {
  /** No application was ever started. */
  isFirst: boolean
  filter: PipelineFilter
  mayCreate: boolean
}

/** Stands where the rows would: the first application, a search without a match, or all settled. */
export function NoApplications({ isFirst, filter, mayCreate }: NoApplicationsProps) {
  if (isFirst) return <FirstOne mayCreate={mayCreate} />
  if (isNarrowed(filter)) {
    return (
      <EmptyState
        title="No application matches"
        actions={<LinkButton href={routes.pipeline()}>Show the open ones</LinkButton>}
      >
        {filter.find
          ? `"${filter.find}" stands in no project, request number, POI, town or organization shown here.`
          : 'No application has this standing with this organization.'}
      </EmptyState>
    )
  }
  return (
    <EmptyState
      title="No application is open"
      actions={<LinkButton href={routes.pipeline({ standing: 'all' })}>Show all</LinkButton>}
    >
      Every application is in operation or withdrawn.
    </EmptyState>
  )
}

function FirstOne({ mayCreate }: { mayCreate: boolean }) {
  if (!mayCreate) {
    return (
      <EmptyState title="No application yet">
        A developer starts the first one: a project, the organization, and the procedure it follows.
      </EmptyState>
    )
  }
  return (
    <EmptyState
      title="No application yet"
      actions={
        <LinkButton look="primary" href={routes.newApplication()}>
          New application
        </LinkButton>
      }
    >
      Start one from a project, the organization, and the procedure it follows. Its clocks then
      count from every event you record.
    </EmptyState>
  )
}
