import { readdirSync } from 'node:fs'
import path from 'node:path'
import AxeBuilder from '@axe-core/playwright'
import type { Page } from '@playwright/test'
import { bodyOf } from './applications'
import { expect, open, origin, test, type Seat } from './fixtures'
import { api, routes } from '@/lib/routes'
import type { Pipeline } from '@/lib/schemas/application'

/** One address or several for each page of the product, by its folder under app. */
type Addresses = (ids: { cold: string; juniper: string }) => string[]

const outside: Record<string, Addresses> = {
  'sign-in': () => [routes.signIn(), routes.signIn(routes.pipeline())],
  reset: () => [routes.forgotPassword()],
  'reset/[token]': () => [routes.resetPassword('no-such-link')],
  'welcome/[token]': () => [routes.invitation('no-such-link')],
  'acknowledge/[secret]': () => [routes.acknowledge('no-such-link')],
}

const inside: Record<string, Addresses> = {
  '(inside)': () => [routes.home()],
  '(inside)/due': () => [
    routes.due(),
    routes.due({ scope: 'ours' }),
    routes.due({ scope: 'theirs' }),
  ],
  '(inside)/pipeline': () => [
    routes.pipeline(),
    routes.pipeline({ find: 'no project is called so' }),
  ],
  '(inside)/pipeline/new': () => [routes.newApplication()],
  '(inside)/calendar': () => [routes.calendar(), routes.calendar({ view: 'agenda' })],
  '(inside)/count-days': () => [
    routes.countDays(),
    routes.countDays({ start: '2026-05-23', length: 3, unit: 'business_day' }),
  ],
  '(inside)/notices': () => [routes.notices()],
  '(inside)/people': () => [routes.people()],
  '(inside)/me': () => [routes.settings()],
  '(inside)/applications/[id]': ({ cold, juniper }) => [
    routes.application(cold),
    routes.application(juniper),
  ],
  '(inside)/applications/[id]/clocks': ({ cold }) => [
    routes.application(cold, 'clocks', { open: 'cure~2', all: 1 }),
  ],
  '(inside)/applications/[id]/correspondence': ({ cold }) => [
    routes.application(cold, 'correspondence'),
    routes.application(cold, 'correspondence', { record: 1 }),
  ],
  '(inside)/applications/[id]/record': ({ cold }) => [routes.application(cold, 'record')],
  '(inside)/applications/[id]/record-event': ({ cold }) => [routes.newFact(cold)],
  '(inside)/applications/[id]/exhibits': ({ cold, juniper }) => [
    routes.application(cold, 'exhibits'),
    routes.application(juniper, 'exhibits'),
  ],
  '(inside)/applications/[id]/design': ({ juniper }) => [routes.application(juniper, 'design')],
  '(inside)/applications/[id]/design/calculations/[no]': ({ juniper }) => [
    routes.calculation(juniper, 1),
  ],
}

function pageFolders(): string[] {
  const app = path.resolve('app')
  return readdirSync(app, { recursive: true, encoding: 'utf8' })
    .filter((file) => path.basename(file) === 'page.tsx')
    .map((file) => path.dirname(file).split(path.sep).join('/'))
}

test('Every page of the product is walked here', () => {
  expect(pageFolders().toSorted()).toEqual(Object.keys({ ...outside, ...inside }).toSorted())
})

const wide = { width: 1440, height: 900 }
const phone = { width: 390, height: 844 }
type Scheme = 'light' | 'dark'

const accessible = ['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa']

/** What axe finds, one line an element. */
async function axeFindings(page: Page): Promise<string[]> {
  // A drawing is one image with its words; its inner parts are hundreds and say nothing more.
  const { violations } = await new AxeBuilder({ page })
    .options({ resultTypes: ['violations'] })
    .withTags(accessible)
    .exclude('svg > *')
    .analyze()
  return violations.flatMap(({ id, nodes }) =>
    nodes.map((node) => `${id}: ${node.target.join(' ')} ${node.failureSummary ?? ''}`),
  )
}

/** Looks at the page that is open in one size and scheme: its size only, or all of it. */
async function look(
  page: Page,
  size: typeof wide,
  scheme: Scheme,
  depth: 'size' | 'all' = 'all',
): Promise<void> {
  await page.setViewportSize(size)
  await page.emulateMedia({ colorScheme: scheme, reducedMotion: 'reduce' })
  const where = `${new URL(page.url()).pathname}, ${size.width} px, ${scheme}`
  await expect
    .soft(page.getByRole('heading').first(), `${where}: a heading is in sight`)
    .toBeVisible()
  const overflow = await page.evaluate(() => {
    const { scrollWidth, clientWidth } = document.documentElement
    return scrollWidth - clientWidth
  })
  expect.soft(overflow, `${where}: px of horizontal overflow`).toBe(0)
  if (depth === 'size') return
  expect.soft(await axeFindings(page), `${where}: accessibility`).toEqual([])
}

/** Opens an address and waits until its script is at rest. */
async function visit(page: Page, address: string): Promise<void> {
  await open(page, address)
  await page.waitForLoadState('networkidle')
  await expect.soft(page.getByRole('main').first(), `${address} has a main part`).toBeVisible()
}

// Who may record sees the same pages; who only reads and who keeps the house see their own.
const walkers: Seat[] = ['developer', 'executive', 'administrator']

async function demoIds(page: Page) {
  const { items } = await bodyOf<Pipeline>(
    await page.request.get(api.applications({ standing: 'all' })),
  )
  const idOf = (project: string) => {
    const row = items.find((one) => one.project === project)
    expect(row, `the demo holds ${project}`).toBeDefined()
    return row!.id
  }
  return { cold: idOf('Cold Spring Road'), juniper: idOf('Juniper Flat') }
}

for (const who of walkers) {
  test(`Every page that the ${who} opens is sound, wide and on a phone, light and dark`, async ({
    pageOf,
  }) => {
    test.setTimeout(480_000)
    const page = await pageOf(who)
    const ids = await demoIds(page)
    // What a page shows at its other addresses is walked once, by the developer.
    const most = who === 'developer' ? undefined : 1
    for (const address of Object.values(inside).flatMap((of) => of(ids).slice(0, most))) {
      await test.step(address, async () => {
        await page.setViewportSize(wide)
        await visit(page, address)
        // The markup is the same for every role but for its presses: axe reads it once.
        const depth = who === 'developer' || address === routes.people() ? 'all' : 'size'
        await look(page, wide, 'light', depth)
        await look(page, phone, 'dark', depth)
      })
    }
  })
}

test('The pages before the sign-in are sound, wide and on a phone, light and dark', async ({
  page,
}) => {
  test.setTimeout(120_000)
  for (const address of Object.values(outside).flatMap((of) => of({ cold: '', juniper: '' }))) {
    await visit(page, address)
    for (const scheme of ['light', 'dark'] as const) {
      await look(page, wide, scheme)
      await look(page, phone, scheme)
    }
  }
})

test('An address that leads nowhere says so inside the house and keeps its way out', async ({
  pageOf,
}) => {
  const page = await pageOf('liaison')
  const gone = routes.application('00000000-0000-4000-8000-000000000000')
  for (const address of ['/no-such-page', gone]) {
    const answer = await page.goto(address)
    expect(answer?.status()).toBe(404)
    await expect(page).toHaveTitle(/Lineside$/)
    await expect(page.getByRole('main').getByRole('link').first()).toBeVisible()
    await look(page, phone, 'light')
  }
})

/** Sends random bytes from the page to the door for files; what the server says, or nothing. */
function upload(page: Page, megabytes: number) {
  return page.evaluate(
    async ({ size, address }) => {
      const bytes = new Uint8Array(size)
      for (let at = 0; at < size; at += 65_536)
        crypto.getRandomValues(bytes.subarray(at, Math.min(at + 65_536, size)))
      const digest = new Uint8Array(await crypto.subtle.digest('SHA-256', bytes))
      const sha256 = [...digest].map((byte) => byte.toString(16).padStart(2, '0')).join('')
      const headers = { 'x-file-name': 'drawing-set.bin' }
      const answer = await fetch(address, { method: 'POST', headers, body: bytes })
      return { sha256, status: answer.status, said: (await answer.json()) as unknown }
    },
    { size: megabytes * 1_000_000, address: `${origin}${api.files()}` },
  )
}

test('A file of 30 MB arrives byte for byte; one of 60 MB is refused with 413', async ({
  pageOf,
}) => {
  test.setTimeout(120_000)
  const page = await pageOf('liaison')
  await open(page, routes.due())
  const { sha256, status, said } = await upload(page, 30)
  expect(status).toBe(201)
  expect(said).toMatchObject({ sha256, size: 30_000_000 })
  const refused = await upload(page, 60)
  expect(refused.status).toBe(413)
  expect(refused.said).toMatchObject({ status: 413 })
})
