import type { Locator, Page } from '@playwright/test'
import ical from 'node-ical'
import {
  bodyOf,
  daysBack,
  filedApplication,
  ownName,
  readApplication,
  recordHappened,
} from './applications'
import { expect, open, test } from './fixtures'
import { partsOf } from '@/lib/domain/clocks/civil-date'
import { civilDateAt } from '@/lib/domain/format-date'
import { api, routes } from '@/lib/routes'
import type { Due } from '@/lib/schemas/application'

const phone = { width: 390, height: 844 }

/** Date and project of everything that Due lists, for us and for the utilities. */
async function datesOfDue(page: Page): Promise<string[]> {
  const lists = await Promise.all(
    (['ours', 'theirs'] as const).map(async (scope) =>
      bodyOf<Due>(await page.request.get(api.obligations({ scope }))),
    ),
  )
  return lists.flatMap(({ rows }) => rows.map((row) => `${row.on} ${row.project}`)).toSorted()
}

/** Date and project of every entry, as a calendar program reads them. */
function datesOfFeed(text: string): string[] {
  const entries = Object.values(ical.sync.parseICS(text)).filter((one) => one?.type === 'VEVENT')
  return entries
    .map(({ start, summary }) => {
      const words = typeof summary === 'string' ? summary : summary.val
      return `${localDay(start)} ${words.slice(0, words.indexOf(': '))}`
    })
    .toSorted()
}

// The parser gives a whole day as midnight of the zone it runs in.
const localDay = (day: Date) => {
  const two = (figure: number) => String(figure).padStart(2, '0')
  return `${day.getFullYear()}-${two(day.getMonth() + 1)}-${two(day.getDate())}`
}

test('An executive reads the agenda on a phone; the private address holds what Due lists, until it is ended', async ({
  pageOf,
}) => {
  test.setTimeout(120_000)
  const page = await pageOf('executive')
  await page.setViewportSize(phone)
  await open(page, routes.calendar())
  await expect(page.getByRole('link', { name: 'Show as month' })).toBeVisible()
  const agenda = page.getByRole('table')
  await expect(agenda.getByRole('link').first()).toBeVisible()

  await page.getByRole('button', { name: 'Private calendar address' }).click()
  const dialog = page.getByRole('dialog', { name: 'Private calendar address' })
  await dialog.getByRole('button', { name: /^Make/ }).click()
  const address = await dialog.getByLabel('Address, shown only now').inputValue()
  const feed = await page.request.get(address)
  expect(feed.headers()['content-type']).toContain('text/calendar')
  const entries = datesOfFeed(await feed.text())
  expect(entries.length).toBeGreaterThan(10)
  expect(entries).toEqual(await datesOfDue(page))

  await dialog.getByRole('button', { name: 'End the address' }).click()
  await expect(dialog.getByText('There is no address yet.')).toBeVisible()
  expect((await page.request.get(address)).status()).toBe(404)
})

interface Box {
  x: number
  y: number
  width: number
  height: number
}

async function boxOf(part: Locator): Promise<Box> {
  const box = await part.boundingBox()
  expect(box, `${part} is laid out`).not.toBeNull()
  return box!
}

/** Whether an entry stands in the column and week of a day's number. */
async function standsOn(entry: Locator, dayNumber: Locator): Promise<boolean> {
  const [own, day] = [await boxOf(entry), await boxOf(dayNumber)]
  const week = await boxOf(dayNumber.locator('xpath=ancestor::*[contains(@class,"rbc-month-row")]'))
  const middle = own.x + own.width / 2
  const isInColumn = middle > day.x && middle < day.x + day.width
  return isInColumn && own.y >= week.y && own.y + own.height <= week.y + week.height + 1
}

// The calendar library gives days no role of their own: they are found by its class names.
const dayOf = (page: Page, on: string) =>
  page
    .locator('.rbc-date-cell:not(.rbc-off-range)')
    .filter({ has: page.getByText(String(partsOf(on).day), { exact: true }) })

const colorOf = (part: Locator) => part.evaluate((one) => getComputedStyle(one).color)

test('A month hatches its weekends and shows a missed clock red on its day, with a reminder on today', async ({
  pageOf,
}) => {
  test.setTimeout(120_000)
  const developer = await pageOf('developer')
  const project = ownName('Missed Cure')
  const id = await filedApplication(developer, project, 30)
  const receivedOn = await daysBack(developer, 16)
  await recordHappened(developer, id, { step: 'completeness', outcome: 'deficient', receivedOn })
  const { items } = await readApplication(developer, id)
  const dueOn = items.find((one) => one.step === 'cure' && one.obligation === '')?.dueOn ?? ''

  const page = await pageOf('executive')
  const todayOn = civilDateAt(new Date(), 'America/Los_Angeles')
  expect(dueOn < todayOn, `the cure was due ${dueOn}`).toBe(true)
  await open(page, routes.calendar({ on: dueOn, view: 'month' }))
  const missed = page.getByRole('link', { name: `${project}: cure the deficiency, missed` })
  await expect(missed).toBeVisible()
  expect(await standsOn(missed, dayOf(page, dueOn))).toBe(true)
  const red = await page.evaluate(() => {
    const probe = document.body.appendChild(document.createElement('i'))
    probe.style.color = 'var(--late)'
    const { color } = getComputedStyle(probe)
    probe.remove()
    return color
  })
  expect(await colorOf(missed)).toBe(red)

  await open(page, routes.calendar({ on: todayOn, view: 'month' }))
  const reminder = page.getByRole('link', { name: `still open: ${project}` })
  await expect(reminder).toBeVisible()
  expect(await standsOn(reminder, dayOf(page, todayOn))).toBe(true)
  expect(await colorOf(reminder)).toBe(red)

  const grounds = await page
    .locator('.rbc-month-row')
    .first()
    .locator('.rbc-day-bg')
    .evaluateAll((days) => days.map((day) => getComputedStyle(day).backgroundImage))
  // Weeks of this page begin on Sunday; no week is closed from end to end.
  const isHatched = grounds.map((ground) => ground.includes('repeating-linear-gradient'))
  expect(isHatched).toHaveLength(7)
  expect([isHatched[0], isHatched[6]]).toEqual([true, true])
  expect(isHatched.slice(1, 6)).toContain(false)
})
