import type { Metadata } from 'next'
import { EventForm } from '@/app/(inside)/applications/[id]/record-event/_components/event-form'
import { readPageApplication } from '@/app/(inside)/applications/[id]/_read'
import { intentWords, type FactIntent } from '@/components/applications/fact-intent'
import { ErrorState } from '@/components/ui/error-state'
import { LinkButton } from '@/components/ui/link-button'
import { can } from '@/lib/domain/access'
import { factKinds } from '@/lib/domain/clocks/facts'
import { routes } from '@/lib/routes'

export const metadata: Metadata = { title: 'Record an event' }

interface PageProps {
  params: Promise<{ id: string }>
  searchParams: Promise<Record<string, string | undefined>>
}

/** The form for one fact at an address of its own, for links from lists and notices. */
export default async function RecordEventPage({ params, searchParams }: PageProps) {
  const { view, roles } = await readPageApplication((await params).id)
  const intent = intentOf(await searchParams)
  const action =
    intent.kind === 'correction' || intent.kind === 'retraction' ? 'fact.correct' : 'fact.record'
  if (!can(roles, action))
    return (
      <ErrorState
        title="Your roles do not allow this"
        next="A developer, an engineer or a liaison records events. You can read everything here."
        actions={<LinkButton href={routes.application(view.id)}>Back to the sequence</LinkButton>}
      />
    )
  const words = intentWords(intent)
  return (
    <section className="max-w-3xl">
      <h2 className="border-ink border-b-[1.5px] pb-2">{words.title}</h2>
      {words.description && <p className="text-ink-2 mt-2">{words.description}</p>}
      <EventForm applicationId={view.id} intent={intent} />
    </section>
  )
}

function intentOf(query: Record<string, string | undefined>): FactIntent {
  const kind = factKinds.find((one) => one === query.kind) ?? 'happened'
  const instance = Number(query.instance)
  return {
    kind,
    ...(query.step && { step: query.step }),
    ...(Number.isInteger(instance) && instance > 0 && { instance }),
    ...(query.obligation && { obligation: query.obligation }),
    ...(query.replaces && { replaces: query.replaces }),
  }
}
