import { randomUUID } from 'node:crypto'
import type { Page } from '@playwright/test'
import { ownName, send } from './applications'
import { demoDesign as design, designedApplication } from './designed'
import { expect, open, test } from './fixtures'
import { figuresOf } from '@/lib/domain/plant/design'
import { api, routes } from '@/lib/routes'
import { synthetic, tmy3Lines } from '@/tests/unit/plant/weather-texts'

interface Watch {
  /** Run number and array over export limit, each time figures were shown. */
  shown: { seq: number; ratio: number }[]
  longTasksMs: number[]
}

/** Notes every result that the page shows and every task of its main thread over 50 ms. */
async function watch(page: Page): Promise<void> {
  await page.evaluate(() => {
    const seen: Watch = { shown: [], longTasksMs: [] }
    Object.assign(window, { seen })
    new PerformanceObserver((list) => {
      seen.longTasksMs.push(...list.getEntries().map((entry) => entry.duration))
    }).observe({ type: 'longtask' })
    const cells = [...document.querySelectorAll('dt')]
    const ratio = cells.find((cell) => cell.textContent === 'Array over export limit')
    const figures = document.querySelector('[data-run]')
    if (!figures) throw new Error('No figures are shown yet.')
    new MutationObserver(() => {
      const seq = Number(figures.getAttribute('data-run'))
      seen.shown.push({ seq, ratio: Number(ratio?.nextElementSibling?.textContent) })
    }).observe(figures, { attributes: true, attributeFilter: ['data-run'] })
  })
}

const seenOn = (page: Page) => page.evaluate(() => (window as unknown as { seen: Watch }).seen)

const cell = (page: Page, caption: string) =>
  page
    .getByLabel('Clipping calculation')
    .locator('div')
    .filter({ has: page.getByText(caption, { exact: true }) })
    .locator('dd')
    .first()

/** A figure as the chain gave it, to the last digit. */
const unrounded = (page: Page, caption: string) =>
  cell(page, caption).locator('data').getAttribute('value')

/** Fifty presses of a key in a field, about two seconds; what the page showed and where it stalled. */
async function fiftyMoves(page: Page, key: 'ArrowUp' | 'ArrowDown', strings: number) {
  const field = page.getByRole('textbox', { name: 'Strings', exact: true })
  await watch(page)
  for (let move = 0; move < 50; move++) await field.press(key, { delay: 25 })
  await expect(field).toHaveValue(strings.toLocaleString('en-US'))
  const { dcPerPoi } = figuresOf({ ...design, strings })
  await expect(cell(page, 'Array over export limit')).toHaveText(dcPerPoi.toFixed(2))
  return seenOn(page)
}

test('Fifty moves of a field in two seconds show their figures in order, and the page never stalls', async ({
  pageOf,
}) => {
  const engineer = await pageOf('engineer')
  const id = await designedApplication(await pageOf('developer'), engineer, ownName('Moves'))
  await open(engineer, routes.application(id, 'design'))
  await expect(cell(engineer, 'Array over export limit')).toHaveText('1.30')
  const stalls: number[][] = []
  // A machine that is busy with something else stalls any page: one round of three must be free.
  for (const key of ['ArrowUp', 'ArrowDown', 'ArrowUp'] as const) {
    const { shown, longTasksMs } = await fiftyMoves(
      engineer,
      key,
      design.strings + (key === 'ArrowUp' ? 50 : 0),
    )
    const numbers = shown.map((one) => one.seq)
    expect(numbers.length).toBeGreaterThan(5)
    expect(numbers).toEqual([...new Set(numbers)].sort((a, b) => a - b))
    const rising = (a: number, b: number) => (key === 'ArrowUp' ? a - b : b - a)
    const ratios = shown.map((one) => one.ratio)
    expect(ratios).toEqual([...ratios].sort(rising))
    stalls.push(longTasksMs)
    if (longTasksMs.length === 0) break
  }
  expect(stalls.at(-1), `tasks over 50 ms, by round: ${JSON.stringify(stalls)}`).toEqual([])
})

test('An engineer brings a station file, is told what is wrong with another, and freezes what the page shows', async ({
  pageOf,
}) => {
  const engineer = await pageOf('engineer')
  const id = await designedApplication(await pageOf('developer'), engineer, ownName('Freeze'))
  await engineer.goto(routes.application(id, 'design'))
  await expect(engineer.getByText('synthetic from monthly means, not measured')).toBeVisible()
  await expect(cell(engineer, 'Array over export limit')).toHaveText('1.30')
  const lines = tmy3Lines(synthetic())
  const picker = engineer.locator('input[type=file]')
  const drop = (name: string, text: string) =>
    picker.setInputFiles({ name, mimeType: 'text/csv', buffer: Buffer.from(text) })

  await drop('short.csv', lines.slice(0, -1).join('\n'))
  await expect(engineer.getByText(/Refused, nothing kept: .*8,?759/).first()).toBeVisible()

  await drop('station.csv', lines.join('\n'))
  const weather = engineer.getByLabel('Weather', { exact: true })
  await expect(weather.getByText('The clock agrees with the sun', { exact: false })).toBeVisible()
  await expect(weather.getByText('8,760')).toBeVisible()
  await expect(cell(engineer, 'Weather')).toContainText('Sorrel Wells')

  const series = engineer.getByRole('textbox', { name: 'Modules in series' })
  await series.fill('26')
  await expect(engineer.getByText('1,505.9 V of 1,500 V, one too many')).toBeVisible()
  await series.fill('24')
  await expect(cell(engineer, 'Array over export limit')).toHaveText('1.25')
  await expect(engineer.locator('[data-run][aria-busy="false"]')).toBeVisible()
  const figures = async () => ({
    clipped: await unrounded(engineer, 'Clipped a year'),
    energyKwh: await unrounded(engineer, 'At the POI, a year'),
  })
  const live = await figures()

  await engineer.getByLabel(/What changed since revision 1/).fill('One module fewer in series')
  await engineer.getByRole('button', { name: 'Freeze as no. 1' }).click()
  await expect(engineer).toHaveURL(/\/design\/calculations\/1$/)
  await expect(engineer.getByText(/frozen .* by Tobin Arceneth/)).toBeVisible()
  expect(live.energyKwh).toMatch(/^\d+\.\d{3,}$/)
  expect(await figures()).toEqual(live)
  await expect(engineer.getByRole('textbox', { name: 'Modules in series' })).toHaveAttribute(
    'readonly',
    '',
  )

  await engineer.getByRole('link', { name: 'Back to the live plant' }).click()
  await expect(engineer.getByRole('button', { name: 'Freeze as no. 2' })).toBeVisible()
  await expect(engineer.getByRole('cell', { name: 'One module fewer in series' })).toBeVisible()
})

test('An executive moves a field and sees the figures follow, but has nothing to freeze with', async ({
  pageOf,
}) => {
  const developer = await pageOf('developer')
  const id = await designedApplication(developer, await pageOf('engineer'), ownName('Look'))
  const executive = await pageOf('executive')
  await executive.goto(routes.application(id, 'design'))
  await expect(cell(executive, 'Array over export limit')).toHaveText('1.30')
  await executive.getByRole('textbox', { name: 'Export limit at the POI' }).fill('40')
  await expect(cell(executive, 'Array over export limit')).toHaveText('1.56')
  await expect(executive.getByRole('button', { name: /Freeze/ })).toHaveCount(0)
  const refused = await send(executive, api.calculations(id), {
    id: randomUUID(),
    designRevisionId: randomUUID(),
  })
  expect(refused.status()).toBe(403)
})
