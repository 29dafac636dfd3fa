import { LinkButton } from '@/components/ui/link-button'
import { routes } from '@/lib/routes'

/** Says that an address leads nowhere, or nowhere for this person, and where to go instead. */
export function NotFoundText() {
  return (
    <section className="max-w-xl py-4">
      <h1>There is no such page</h1>
      <p className="text-ink-2 mt-2">
        The address is mistyped, the thing was withdrawn from view, or it is not open to you.
        Nothing was changed.
      </p>
      <div className="mt-5 flex flex-wrap gap-2.5">
        <LinkButton href={routes.home()} look="primary">
          Go to what is due
        </LinkButton>
        <LinkButton href={routes.pipeline()}>Open the pipeline</LinkButton>
      </div>
    </section>
  )
}
