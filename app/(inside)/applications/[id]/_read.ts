import { notFound } from 'next/navigation'
import { cache } from 'react'
import { pageContext } from '@/lib/auth/page-person'
import { getApplication } from '@/lib/services/applications'
import { ServiceError } from '@/lib/services/errors'

/** The application of this address, read once a request; the page "not found" where there is none. */
export const readPageApplication = cache(async (id: string) => {
  const ctx = await pageContext()
  const view = await getApplication(ctx, id).catch((error: unknown) => {
    if (error instanceof ServiceError && error.code === 'not_found') notFound()
    throw error
  })
  return { ctx, view, roles: ctx.actor.roles }
})
