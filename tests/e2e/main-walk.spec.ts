import { randomUUID } from 'node:crypto'
import type { Page } from '@playwright/test'
import { countDays, daysBack, ownName, readApplication, send, todayAtUtility } from './applications'
import { demoPassword, expect, open, test } from './fixtures'
import { linkIn, mailTo } from './mail'
import { formatDate, formatShortDate } from '@/lib/domain/format-date'
import { api, routes } from '@/lib/routes'

test('A wrong pair is refused in words with the address kept, the right one opens what is due', async ({
  page,
}) => {
  await open(page, routes.signIn())
  await page.getByLabel('E-mail').fill('liaison@demo.test')
  await page.getByLabel('Password').fill('not the password of Dov')
  await page.getByRole('button', { name: 'Sign in' }).click()
  await expect(page.getByText('do not fit together')).toBeVisible()
  await expect(page.getByLabel('E-mail')).toHaveValue('liaison@demo.test')
  await page.getByLabel('Password').fill(demoPassword())
  await page.getByRole('button', { name: 'Sign in' }).click()
  await expect(page).toHaveURL(/\/due$/)
  await expect(page.getByRole('heading', { name: 'Owed by us', level: 1 })).toBeVisible()
})

const stepLine = (page: Page, project: string) =>
  page.getByRole('img', { name: `Sequence of ${project}` })

/** Fills the page for a new application and starts it; gives its id. */
async function startThroughThePage(page: Page, project: string): Promise<string> {
  await open(page, routes.pipeline())
  await page.getByRole('link', { name: 'New application' }).click()
  await page.getByRole('textbox', { name: 'Name', exact: true }).fill(project)
  await expect(page.getByLabel('Project company')).toHaveValue(`${project} Solar, LLC`)
  await page
    .getByRole('combobox', { name: 'Organization' })
    .selectOption({ label: 'Ambrel Valley Electric Company' })
  await page.getByRole('radio', { name: /fast track/ }).check()
  await page.getByRole('textbox', { name: 'Point of interconnection' }).fill('12.47 kV feeder SW-9')
  await page.getByRole('textbox', { name: /^At the POI/ }).fill('2.4')
  await page.getByRole('button', { name: 'Start the application' }).click()
  await expect(page).toHaveURL(/\/applications\/[0-9a-f-]{36}$/)
  await expect(page.getByRole('heading', { name: project, level: 1 })).toBeVisible()
  return new URL(page.url()).pathname.split('/').at(-1)!
}

async function recordFiling(page: Page, receivedOn: string): Promise<void> {
  await page.getByRole('button', { name: 'Record its filing' }).click()
  const dialog = page.getByRole('dialog', { name: 'Record an event' })
  await dialog.getByLabel('Received by them on').fill(receivedOn)
  await dialog.getByRole('button', { name: 'Record', exact: true }).click()
  await expect(dialog).toBeHidden()
  await expect(page.getByRole('button', { name: 'Record its filing' })).toBeHidden()
}

interface Letter {
  subject: string
  sentOn: string
  receivedOn: string
}

/** A letter with its scan and the event it proves, with one press. */
async function recordLetter(page: Page, { subject, sentOn, receivedOn }: Letter): Promise<void> {
  await page.getByRole('link', { name: 'Correspondence', exact: true }).click()
  await page.getByRole('button', { name: 'Record correspondence' }).click()
  const form = page.getByRole('form', { name: 'Record correspondence' })
  await form.getByRole('combobox', { name: 'How' }).selectOption({ label: 'Letter' })
  await form.getByRole('radio', { name: 'In, from them' }).check()
  await form.getByLabel('Subject').fill(subject)
  await form.getByLabel('Attachments').setInputFiles({
    name: 'determination.pdf',
    mimeType: 'application/pdf',
    buffer: Buffer.from('%PDF-1.4\n% a letter of one page\n%%EOF\n'),
  })
  await expect(form.getByText(/^kept, \d+ B$/)).toBeVisible()
  await form.getByLabel('Date', { exact: true }).fill(receivedOn)
  await form.getByRole('combobox', { name: /^Event/ }).selectOption({
    label: 'Completeness determination (theirs)',
  })
  await form.getByRole('combobox', { name: 'Outcome' }).selectOption({ label: 'Complete' })
  await form.getByLabel('Sent on').fill(sentOn)
  await expect(form.getByLabel('Received on')).toHaveValue(receivedOn)
  await form.getByRole('button', { name: 'Record entry and event' }).click()
  await expect(form).toBeHidden()
}

test('A request goes from its start to an acknowledged notice, each step by whose work it is', async ({
  pageOf,
}) => {
  test.setTimeout(240_000)
  const project = ownName('Walked Meadow')
  const subject = `${project}: the request is complete`
  const [maren, dov, priya] = [
    await pageOf('developer'),
    await pageOf('liaison'),
    await pageOf('executive'),
  ]
  const filedOn = await daysBack(maren, 27)
  const sentOn = await daysBack(maren, 20)
  const receivedOn = await daysBack(maren, 19)
  const dueOn = await countDays(maren, { start: sentOn, length: 15, unit: 'business_day' })
  const clocks = () => dov.getByRole('row', { name: /^Initial review with the screens/ })
  let id = ''
  let before = ''

  await test.step('The developer starts it and records its filing', async () => {
    id = await startThroughThePage(maren, project)
    await recordFiling(maren, filedOn)
    await expect(stepLine(maren, project)).toHaveAccessibleName(/File the request: ours, done/)
  })

  await test.step('The liaison logs the letter; its event is recorded with it', async () => {
    await open(dov, routes.application(id))
    before = (await stepLine(dov, project).getAttribute('aria-label')) ?? ''
    expect(before).toMatch(/Completeness determination: theirs, (running|open|missed)/)
    await recordLetter(dov, { subject, sentOn, receivedOn })
    const entry = dov.getByRole('listitem').filter({ hasText: subject })
    await expect(entry.getByRole('link', { name: 'determination.pdf' })).toBeVisible()
    await expect(entry.getByText('Proves: Completeness determination')).toBeVisible()
    const { facts } = await readApplication(dov, id)
    const proven = facts.find((fact) => fact.step === 'completeness')
    expect(proven).toMatchObject({ outcome: 'complete', sentOn, receivedOn, channel: 'letter' })
    expect(proven?.evidence.map((one) => one.entrySubject)).toContain(subject)
    expect(
      proven?.evidence.some((one) => one.fileSha256 !== null),
      'the scan proves it',
    ).toBe(true)
  })

  await test.step('The clock stands on the day that a count of its own gives', async () => {
    await dov.getByRole('link', { name: 'Clocks', exact: true }).click()
    await expect(clocks()).toContainText(formatShortDate(dueOn, todayAtUtility()))
    const { items } = await readApplication(dov, id)
    const review = items.find((one) => one.step === 'initial_review' && one.obligation === '')
    expect(review?.dueOn).toBe(dueOn)
  })

  await test.step('The step line says so in words', async () => {
    await dov.getByRole('link', { name: 'Sequence', exact: true }).click()
    await expect(stepLine(dov, project)).toHaveAccessibleName(
      /Completeness determination: theirs, done/,
    )
    expect(await stepLine(dov, project).getAttribute('aria-label')).not.toBe(before)
  })

  await test.step('Due shows it under what utilities owe', async () => {
    await open(dov, routes.due())
    await dov.getByRole('link', { name: /^Utilities owe/ }).click()
    const row = dov.getByRole('row').filter({ hasText: project })
    await expect(row).toContainText('Initial review with the screens')
    await expect(row).toContainText(formatDate(dueOn, dueOn))
  })

  await test.step('Its notice is acknowledged with a reason and a next date', async () => {
    const notice = await mailTo(
      dov,
      'liaison@demo.test',
      `Initial review with the screens, ${project}`,
    )
    const link = linkIn(notice, 'acknowledge')
    // The link speaks for its addressee: it opens in a browser without a session.
    const mailReader = await pageOf()
    await open(mailReader, link)
    await expect(mailReader.getByText(project)).toBeVisible()
    const nextDate = mailReader.getByLabel('Next date')
    const untilOn = (await nextDate.getAttribute('max')) ?? ''
    await mailReader.getByLabel('Reason').fill('Asked the queue desk for the results')
    await nextDate.fill(untilOn)
    await mailReader.getByRole('button', { name: 'Acknowledge' }).click()
    await expect(mailReader.getByText(/^Acknowledged\./)).toContainText(formatDate(untilOn))
    await dov.reload()
    const row = dov.getByRole('row').filter({ hasText: project })
    await expect(row).toContainText('Asked the queue desk for the results')
  })

  await test.step('The executive sees it and may record nothing', async () => {
    await open(priya, routes.application(id))
    await expect(priya.getByRole('heading', { name: project, level: 1 })).toBeVisible()
    await expect(stepLine(priya, project)).toHaveAccessibleName(/Completeness determination/)
    await expect(priya.getByRole('main').getByRole('button', { name: /record/i })).toHaveCount(0)
    await priya.getByRole('link', { name: 'Correspondence', exact: true }).click()
    await expect(priya.getByRole('heading', { name: subject })).toBeVisible()
    await expect(priya.getByRole('main').getByRole('button', { name: /record/i })).toHaveCount(0)
    const fact = { id: randomUUID(), kind: 'happened', step: 'initial_review', outcome: 'pass' }
    const refused = await send(priya, api.facts(id), { ...fact, receivedOn })
    expect(refused.status()).toBe(403)
    expect(refused.headers()['content-type']).toContain('application/problem+json')
    expect(await refused.json()).toMatchObject({ status: 403, code: 'forbidden' })
  })
})
