import { dehydrate, HydrationBoundary, QueryClient } from '@tanstack/react-query'
import type { Metadata } from 'next'
import type { ReactNode } from 'react'
import { ApplicationHead } from '@/app/(inside)/applications/[id]/_components/application-head'
import { Freshness } from '@/app/(inside)/applications/[id]/_components/freshness'
import { readPageApplication } from '@/app/(inside)/applications/[id]/_read'
import { FactDeskProvider } from '@/components/applications/fact-desk'
import { applicationQuery } from '@/lib/client/applications'
import { can } from '@/lib/domain/access'

interface LayoutProps {
  children: ReactNode
  params: Promise<{ id: string }>
}

export async function generateMetadata({ params }: LayoutProps): Promise<Metadata> {
  // Where there is none, the page says so; the title must not fail with it.
  const view = await readPageApplication((await params).id).then(
    (read) => read.view,
    () => null,
  )
  if (!view) return {}
  return { title: { default: view.project.name, template: `%s · ${view.project.name}` } }
}

/** What every page of one application stands under: its title block, its tabs, its one form. */
export default async function ApplicationLayout({ children, params }: LayoutProps) {
  const { view, roles } = await readPageApplication((await params).id)
  const client = new QueryClient()
  client.setQueryData(applicationQuery(view.id).queryKey, view)
  return (
    <HydrationBoundary state={dehydrate(client)}>
      <FactDeskProvider applicationId={view.id}>
        <ApplicationHead view={view} mayRecord={can(roles, 'fact.record')} />
        <Freshness applicationId={view.id} seq={view.seq} />
        {children}
      </FactDeskProvider>
    </HydrationBoundary>
  )
}
