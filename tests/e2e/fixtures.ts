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

/** Where the server of the run answers. */
export const origin = new URL(process.env.BASE_URL ?? 'http://127.0.0.1:3100').origin

/** The password of the demo people, made by the start command. */
export function demoPassword(): string {
  const password = process.env.DEMO_PASSWORD
  if (!password) throw new Error('DEMO_PASSWORD is not set: the browser tests sign in with it.')
  return password
}

type Cookies = Awaited<ReturnType<ReturnType<Page['context']>['cookies']>>
const sessions = new Map<string, Cookies>()

/** Signs a page's context in through the product's own door; one session a person and run. */
export async function signInAs(page: Page, who: Seat): Promise<void> {
  const known = sessions.get(who)
  if (known) return page.context().addCookies(known)
  await signInWith(page, `${who}@demo.test`, demoPassword())
  sessions.set(who, await page.context().cookies())
}

/** Signs a page's context in with a pair of its own. */
export async function signInWith(page: Page, email: string, password: string): Promise<void> {
  const csrf = await page.request.get('/api/auth/csrf')
  const { csrfToken } = (await csrf.json()) as { csrfToken: string }
  const answer = await page.request.post('/api/auth/callback/credentials', {
    headers: { origin },
    form: { csrfToken, email, password, json: 'true' },
  })
  expect(answer.ok(), `sign-in of ${email}: ${answer.status()}`).toBe(true)
}

/**
 * Opens an address and waits until every control on it answers: what is pressed or typed before the
 * page's script has come is lost.
 */
export async function open(page: Page, address: string): Promise<void> {
  await page.goto(address)
  await isAwake(page)
}

/** Waits until every control of the page that is open answers. */
export async function isAwake(page: Page): Promise<void> {
  await page.waitForFunction(() => {
    const controls = [...document.querySelectorAll('a, button, input, select, textarea')]
    const answers = (one: Element) => Object.keys(one).some((key) => key.startsWith('__reactProps'))
    return controls.length > 0 && controls.every(answers)
  })
}

interface Extras {
  /** Policy violations and script errors that the browser reported. */
  complaints: string[]
  /** A page in a context of its own, signed in as a person of the demo; nobody where left out. */
  pageOf: (who?: Seat) => Promise<Page>
}

// A refused request is told by the page itself; the browser's own line about it is no fault.
const refusedRequest = /^Failed to load resource/

/** Collects what a page complains about, from its first document on. */
function listen(page: Page, heard: string[]): void {
  page.on('console', (message) => {
    if (message.type() === 'error' && !refusedRequest.test(message.text()))
      heard.push(message.text())
  })
  page.on('pageerror', (error) => heard.push(error.message))
}

/** A test whose pages listen for policy violations and script errors; both fail it. */
export const test = base.extend<Extras>({
  complaints: [
    async ({ page }, use) => {
      const heard: string[] = []
      listen(page, heard)
      await use(heard)
      expect(heard, 'policy violations and script errors').toEqual([])
    },
    { auto: true },
  ],
  pageOf: async ({ browser, complaints }, use) => {
    const opened: Page[] = []
    await use(async (who) => {
      const context = await browser.newContext()
      const page = await context.newPage()
      listen(page, complaints)
      opened.push(page)
      if (who) await signInAs(page, who)
      return page
    })
    for (const page of opened) await page.context().close()
  },
})

export { expect }
