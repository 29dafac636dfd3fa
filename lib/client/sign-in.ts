import { z } from 'zod'
import { call, problemOf, unreachable } from '@/lib/client/fetcher'
import { api } from '@/lib/routes'

const csrfSchema = z.object({ csrfToken: z.string() })

/**
 * Signs in with an address and a password; the answer's cookie is the session.
 * Throws `ProblemError`: 401 for a pair that does not fit, 429 for too many tries.
 */
export async function signIn(pair: { email: string; password: string }): Promise<void> {
  const { csrfToken } = await call(api.csrf(), csrfSchema)
  const response = await fetch(api.signIn(), {
    method: 'POST',
    credentials: 'same-origin',
    headers: { 'content-type': 'application/x-www-form-urlencoded' },
    body: new URLSearchParams({ ...pair, csrfToken, json: 'true' }),
  }).catch(() => {
    throw unreachable()
  })
  if (!response.ok) throw problemOf(response.status, await response.text())
}
