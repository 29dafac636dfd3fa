import type { Metadata } from 'next'
import { NewApplicationForm } from '@/components/pipeline/new-application-form'
import { EmptyState } from '@/components/ui/empty-state'
import { LinkButton } from '@/components/ui/link-button'
import { pageContext } from '@/lib/auth/page-person'
import { can } from '@/lib/domain/access'
import { routes } from '@/lib/routes'
import { listApplicationChoices } from '@/lib/services/applications'

export const metadata: Metadata = { title: 'New application' }

export default async function NewApplicationPage() {
  const ctx = await pageContext()
  return (
    <>
      <h1>New application</h1>
      {can(ctx.actor.roles, 'application.create') ? (
        <NewApplicationForm choices={await listApplicationChoices(ctx)} />
      ) : (
        <div className="mt-4">
          <EmptyState
            title="Developers start applications"
            actions={<LinkButton href={routes.pipeline()}>Open the pipeline</LinkButton>}
          >
            Your roles do not include it. Ask a developer, or an administrator for the role.
          </EmptyState>
        </div>
      )}
    </>
  )
}
