import type { Metadata } from 'next'
import { notFound } from 'next/navigation'
import { pageContext } from '@/lib/auth/page-person'
import { can } from '@/lib/domain/access'
import { listEntries } from '@/lib/services/entries'
import { getEntryChoices } from '@/lib/services/entry-choices'
import { ServiceError } from '@/lib/services/errors'
import { Correspondence } from './_components/correspondence'

export const metadata: Metadata = { title: 'Correspondence' }

interface PageProps {
  params: Promise<{ id: string }>
  searchParams: Promise<{ record?: string }>
}

/** Letters, calls and e-mails about one application; `?record=1` opens the form at once. */
export default async function CorrespondencePage({ params, searchParams }: PageProps) {
  const ctx = await pageContext()
  const { id } = await params
  const choices = await getEntryChoices(ctx, id).catch((error: unknown) => {
    if (error instanceof ServiceError && error.code === 'not_found') notFound()
    throw error
  })
  const first = await listEntries(ctx, { applicationId: id })
  return (
    <Correspondence
      applicationId={id}
      first={first}
      choices={choices}
      mayRecord={can(ctx.actor.roles, 'entry.record')}
      nowAt={ctx.now.toISOString()}
      startsOpen={(await searchParams).record === '1'}
    />
  )
}
