import { randomUUID } from 'node:crypto'
import { cookies, headers } from 'next/headers'
import { redirect } from 'next/navigation'
import { cache } from 'react'
import { getDb } from '@/db/client'
import { actorOfSession } from '@/lib/auth/actor'
import { requestNow } from '@/lib/auth/now'
import { sessionCookieName } from '@/lib/auth/session-token'
import { routes, withQuery } from '@/lib/routes'
import type { Context, PersonActor } from '@/lib/services/context'

/** The person who is looking at this page; null where nobody is signed in. Read once a request. */
export const getPagePerson = cache(async (): Promise<PersonActor | null> => {
  const sealed = (await cookies()).get(sessionCookieName())?.value
  return sealed ? actorOfSession(getDb(), sealed, requestNow()) : null
})

const getPageMoment = cache(() => ({ now: requestNow(), requestId: randomUUID() }))

/** The context of a server page: services take it. Sends to sign-in where nobody is signed in. */
export async function pageContext(): Promise<Context & { actor: PersonActor }> {
  const actor = await getPagePerson()
  if (!actor) redirect(await signInAddress())
  return { actor, db: getDb(), ...getPageMoment() }
}

async function signInAddress(): Promise<string> {
  const hadSession = (await cookies()).has(sessionCookieName())
  const from = (await headers()).get('x-path') ?? undefined
  return withQuery(routes.signIn(), { from, expired: hadSession ? 1 : undefined })
}
