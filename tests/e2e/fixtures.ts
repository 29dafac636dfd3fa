import { expect, test as base, type Page } from '@playwright/test'

export const roles = [
  'developer',
  'engineer',
  'engineer2',
  'liaison',
  'executive',
  'administrator',
] as const
export type Seat = (typeof roles)[number]

/** The password of the demo people, made by the start command. */
export function demoPassword(): string {
  const password = process.env.DEMO_PASSWORD
  if (!password) throw new Error('DEMO_PASSWORD is not set: the browser tests sign in with it.')
  return password
}

const sessions = new Map<string, Awaited<ReturnType<ReturnType<Page['context']>['cookies']>>>()

/** Signs a page's context in through the product's own door; one session a person and run. */
export async function signInAs(page: Page, who: Seat): Promise<void> {
  const known = sessions.get(who)
  if (known) return page.context().addCookies(known)
  const csrf = await page.request.get('/api/auth/csrf')
  const { csrfToken } = (await csrf.json()) as { csrfToken: string }
  const answer = await page.request.post('/api/auth/callback/credentials', {
    headers: { origin: new URL(csrf.url()).origin },
    form: { csrfToken, email: `${who}@demo.test`, password: demoPassword(), json: 'true' },
  })
  expect(answer.ok(), `sign-in of ${who}: ${answer.status()}`).toBe(true)
  sessions.set(who, await page.context().cookies())
}

interface Extras {
  /** What the browser's console said against the content security policy, or as an error. */
  complaints: string[]
}

/** A test whose page listens for policy violations and script errors; both fail it. */
export const test = base.extend<Extras>({
  complaints: [
    async ({ page }, use) => {
      const heard: string[] = []
      page.on('console', (message) => {
        const text = message.text()
        if (message.type() === 'error' && /Content Security Policy|violates/i.test(text))
          heard.push(text)
      })
      page.on('pageerror', (error) => heard.push(error.message))
      await use(heard)
      expect(heard, 'policy violations and script errors').toEqual([])
    },
    { auto: true },
  ],
})

export { expect }
