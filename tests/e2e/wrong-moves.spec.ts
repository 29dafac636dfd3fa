import { randomUUID } from 'node:crypto'
import type { Page } from '@playwright/test'
import {
  bodyOf,
  daysBack,
  filedApplication,
  ownName,
  readApplication,
  recordHappened,
  send,
  todayAtUtility,
} from './applications'
import { demoPassword, expect, open, signInAs, signInWith, test } from './fixtures'
import { linkIn, mailTo } from './mail'
import { addDays } from '@/lib/domain/clocks/civil-date'
import { api, routes } from '@/lib/routes'
import type { Person } from '@/lib/schemas/person'

/** Opens the form for any event on an application's page. */
async function openEventForm(page: Page, applicationId: string) {
  await open(page, routes.application(applicationId))
  await page.getByRole('button', { name: 'Record an event' }).click()
  const form = page.getByRole('dialog', { name: 'Record an event' })
  await expect(form.getByLabel('Step')).toBeVisible()
  return form
}

type EventForm = Awaited<ReturnType<typeof openEventForm>>
const record = (form: EventForm) => form.getByRole('button', { name: 'Record', exact: true })

/** The completeness determination, complete, with a note of one's own. */
async function fillCompleteness(form: EventForm, note: string): Promise<void> {
  await form.getByLabel('Step').selectOption({ label: 'Completeness determination' })
  await form.getByRole('radio', { name: 'Complete', exact: true }).check()
  await form.getByLabel('Note').fill(note)
}

const factsOf = async (page: Page, id: string, step: string) =>
  (await readApplication(page, id)).facts.filter((fact) => fact.step === step)

test('An outcome that the procedure does not know is refused with the allowed ones', async ({
  pageOf,
}) => {
  const page = await pageOf('liaison')
  const id = await filedApplication(await pageOf('developer'), ownName('Odd Outcome'), 4)
  const form = await openEventForm(page, id)
  await fillCompleteness(form, 'kept after the refusal')
  const outcome = form.getByRole('radio', { name: 'Complete', exact: true })
  await outcome.evaluate((one) => one.setAttribute('value', 'blessed'))
  await record(form).click()
  await expect(form.getByRole('alert')).toContainText(
    'Found "blessed"; allowed are: complete, deficient.',
  )
  await expect(form.getByLabel('Note')).toHaveValue('kept after the refusal')
  expect(await factsOf(page, id, 'completeness')).toEqual([])
})

test('A receipt in the future is refused with today’s date, and what was typed stays', async ({
  pageOf,
}) => {
  const page = await pageOf('liaison')
  const id = await filedApplication(await pageOf('developer'), ownName('Early Receipt'), 4)
  await open(page, routes.application(id, 'correspondence', { record: 1 }))
  const form = page.getByRole('form', { name: 'Record correspondence' })
  await form.getByLabel('Subject').fill('A letter from tomorrow')
  await form
    .getByRole('combobox', { name: /^Event/ })
    .selectOption({ label: 'Completeness determination (theirs)' })
  await form.getByRole('combobox', { name: 'Outcome' }).selectOption({ label: 'Complete' })
  await form.getByLabel('Received on').fill(addDays(todayAtUtility(), 2))
  await form.getByRole('button', { name: 'Record entry and event' }).click()
  await expect(form.getByRole('alert')).toContainText('cannot lie in the future')
  await expect(form.getByLabel('Subject')).toHaveValue('A letter from tomorrow')
  expect(await factsOf(page, id, 'completeness')).toEqual([])

  const event = await openEventForm(page, id)
  await fillCompleteness(event, 'from tomorrow')
  await event.getByLabel('Received on').fill(addDays(todayAtUtility(), 2))
  await record(event).click()
  await expect(event.getByText('cannot lie in the future').first()).toBeVisible()
  await expect(event.getByLabel('Received on')).toBeFocused()
  await expect(event.getByLabel('Note')).toHaveValue('from tomorrow')
  expect(await factsOf(page, id, 'completeness')).toEqual([])
})

test('An event before the one it follows asks for a reason, then is recorded', async ({
  pageOf,
}) => {
  const page = await pageOf('liaison')
  const id = await filedApplication(await pageOf('developer'), ownName('Early Review'), 4)
  const form = await openEventForm(page, id)
  await form.getByLabel('Step').selectOption({ label: 'Initial review with the screens (ahead)' })
  await form.getByRole('radio', { name: 'Passes the screens' }).check()
  await record(form).click()
  await expect(form.getByRole('alert')).toContainText('It can be recorded with a reason.')
  await form.getByLabel('Reason out of order').fill('The notice of completeness was never sent')
  await record(form).click()
  await expect(form).toBeHidden()
  const [fact] = await factsOf(page, id, 'initial_review')
  expect(fact).toMatchObject({
    outcome: 'pass',
    reason: 'The notice of completeness was never sent',
  })
})

test('A tab that somebody overtook says what happened meanwhile and keeps what was typed', async ({
  pageOf,
}) => {
  const [dov, maren] = [await pageOf('liaison'), await pageOf('developer')]
  const id = await filedApplication(maren, ownName('Stale Tab'), 4)
  const stale = await openEventForm(dov, id)
  await fillCompleteness(stale, 'typed in the stale tab')
  await recordHappened(maren, id, {
    step: 'completeness',
    outcome: 'deficient',
    receivedOn: todayAtUtility(),
  })
  await record(stale).click()
  const refusal = stale.getByRole('alert')
  await expect(refusal).toContainText('Nothing was saved: the application has moved on.')
  await expect(refusal).toContainText('Maren Oxley')
  await expect(stale.getByLabel('Note')).toHaveValue('typed in the stale tab')
  expect(await factsOf(dov, id, 'completeness')).toHaveLength(1)
  await refusal.getByRole('button', { name: 'Load the new state' }).click()
  await expect(stale.getByLabel('Note')).toHaveValue('typed in the stale tab')
})

test('A press that comes twice records once', async ({ pageOf }) => {
  const page = await pageOf('liaison')
  const id = await filedApplication(await pageOf('developer'), ownName('Double Press'), 4)
  const form = await openEventForm(page, id)
  await fillCompleteness(form, 'pressed twice')
  await record(form).evaluate((button: HTMLButtonElement) => {
    button.click()
    button.click()
  })
  await expect(form).toBeHidden()
  expect(await factsOf(page, id, 'completeness')).toHaveLength(1)
})

test('The same form sent twice is one fact', async ({ pageOf }) => {
  const page = await pageOf('liaison')
  const id = await filedApplication(await pageOf('developer'), ownName('Sent Twice'), 4)
  const fact = {
    id: randomUUID(),
    kind: 'happened',
    step: 'completeness',
    outcome: 'complete',
    receivedOn: await daysBack(page, 1),
  }
  const answers = await Promise.all([1, 2].map(() => send(page, api.facts(id), fact)))
  expect(answers.map((answer) => answer.ok())).toEqual([true, true])
  expect(await factsOf(page, id, 'completeness')).toHaveLength(1)
})

const newPassword = 'five plain words of a test'

/** An invitation of a person of this test's own, sent through the page. */
async function invite(administrator: Page, name: string, email: string): Promise<string> {
  await open(administrator, routes.people())
  await administrator.getByRole('button', { name: 'Invite a person' }).click()
  const dialog = administrator.getByRole('dialog', { name: 'Invite a person' })
  await dialog.getByLabel('Name').fill(name)
  await dialog.getByLabel('E-mail').fill(email)
  await dialog.getByRole('checkbox', { name: /liaison/i }).check()
  await dialog.getByRole('button', { name: 'Send the invitation' }).click()
  await expect(dialog).toBeHidden()
  await expect(administrator.getByRole('row').filter({ hasText: email })).toContainText('invited')
  return linkIn(await mailTo(administrator, email, ''), 'welcome')
}

async function acceptInvitation(page: Page, link: string): Promise<void> {
  await open(page, link)
  await page.getByLabel('New password').fill(newPassword)
  await page.getByLabel('The same once more').fill(newPassword)
  await page.getByRole('button', { name: 'Set the password and sign in' }).click()
  await expect(page).toHaveURL(/\/due$/)
}

test('An invitation link opens once; later it says that it was used', async ({ pageOf }) => {
  const name = ownName('Quill')
  const email = `${name.replaceAll(' ', '.').toLowerCase()}@demo.test`
  const link = await invite(await pageOf('administrator'), name, email)
  await acceptInvitation(await pageOf(), link)
  const later = await pageOf()
  await open(later, link)
  await expect(later.getByRole('main').getByRole('alert')).toContainText(
    'This link was used already',
  )
  await expect(later.getByLabel('New password')).toHaveCount(0)
  const secret = new URL(link).pathname.split('/').at(-1)
  const again = await send(later, api.acceptLink(), { secret, password: 'another plain password' })
  expect(again.ok()).toBe(false)
})

test('A person who is disabled is out at the next request', async ({ pageOf }) => {
  const name = ownName('Sorrel')
  const email = `${name.replaceAll(' ', '.').toLowerCase()}@demo.test`
  const administrator = await pageOf('administrator')
  const link = await invite(administrator, name, email)
  const person = await pageOf()
  await acceptInvitation(person, link)
  await administrator.getByRole('button', { name: `Disable ${name}` }).click()
  const confirm = administrator.getByRole('alertdialog').or(administrator.getByRole('dialog'))
  await confirm.getByRole('button', { name: 'Disable', exact: true }).click()
  await expect(administrator.getByRole('row').filter({ hasText: email })).toContainText('disabled')
  expect((await person.request.get(api.me())).status()).toBe(401)
  await open(person, routes.pipeline())
  await expect(person).toHaveURL(/\/sign-in/)
  await person.getByLabel('E-mail').fill(email)
  await person.getByLabel('Password').fill(newPassword)
  await person.getByRole('button', { name: 'Sign in' }).click()
  await expect(person.getByText('do not fit together')).toBeVisible()
})

test('A session that ends while a form is open loses nothing that was typed', async ({
  pageOf,
}) => {
  const id = await filedApplication(await pageOf('developer'), ownName('Ended Session'), 4)
  const page = await pageOf('liaison')
  const form = await openEventForm(page, id)
  await fillCompleteness(form, 'typed before the session ended')
  await page.context().clearCookies()
  await record(form).click()
  await expect(form.getByRole('alert')).toContainText(
    'Your session has ended. What you typed is kept here.',
  )
  await expect(form.getByLabel('Note')).toHaveValue('typed before the session ended')
  await signInAs(page, 'liaison')
  await record(form).click()
  await expect(form).toBeHidden()
  expect(await factsOf(page, id, 'completeness')).toHaveLength(1)
})

test('A role that may not finds no press, and the address behind it refuses', async ({
  pageOf,
}) => {
  const dov = await pageOf('liaison')
  await open(dov, routes.people())
  await expect(dov.getByRole('heading', { name: 'People', level: 1 })).toBeVisible()
  await expect(dov.getByRole('main').getByRole('button')).toHaveCount(0)
  const invitation = {
    id: randomUUID(),
    name: 'Nobody',
    email: 'nobody@demo.test',
    roles: ['administrator'],
    zone: 'America/Denver',
  }
  const refused = await send(dov, api.people(), invitation)
  expect(refused.status()).toBe(403)
  expect(await refused.json()).toMatchObject({ status: 403, code: 'forbidden' })
  const { items } = await bodyOf<{ items: Person[] }>(await dov.request.get(api.people()))
  expect(items.some(({ email }) => email === invitation.email)).toBe(false)

  await open(dov, routes.newApplication())
  await expect(dov.getByText('Developers start applications')).toBeVisible()
  await expect(dov.getByRole('main').getByRole('textbox')).toHaveCount(0)
})

test('Nobody gets in by address without a session, and comes back to it after signing in', async ({
  page,
}) => {
  await open(page, routes.pipeline({ standing: 'all' }))
  await expect(page).toHaveURL(/\/sign-in\?from=/)
  expect((await page.request.get(api.applications())).status()).toBe(401)
  await signInWith(page, 'engineer@demo.test', demoPassword())
  await page.reload()
  await expect(page).toHaveURL(/\/pipeline\?standing=all$/)
})

test('A form takes no press before its script has come, so that nothing typed is lost', async ({
  browser,
}) => {
  const context = await browser.newContext({ javaScriptEnabled: false })
  const page = await context.newPage()
  await page.goto(routes.signIn())
  await expect(page.getByRole('button', { name: 'Sign in' })).toBeDisabled()
  await context.close()
})
