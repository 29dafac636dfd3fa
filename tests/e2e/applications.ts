import { randomUUID } from 'node:crypto'
import { expect, type APIResponse, type Page } from '@playwright/test'
import { origin } from './fixtures'
import { civilDateAt } from '@/lib/domain/format-date'
import { api } from '@/lib/routes'
import type { ApplicationChoices, ApplicationView } from '@/lib/schemas/application'
import type { CountAnswer, CountInputBody } from '@/lib/schemas/count'

/** What the browser tests ask of a server beside its pages, with the session of a page. */

type Method = 'POST' | 'PUT' | 'PATCH' | 'DELETE'

/** Sends JSON as the product's own pages do, with their origin. */
export function send(page: Page, path: string, data: unknown, method: Method = 'POST') {
  return page.request.fetch(path, { method, data, headers: { origin } })
}

/** The JSON of an answer that has to be a success. */
export async function bodyOf<T>(answer: APIResponse): Promise<T> {
  expect(answer.ok(), `${answer.url()}: ${answer.status()} ${await answer.text()}`).toBe(true)
  return (await answer.json()) as T
}

/** Today where the utility is whose fast track the tests file under. */
export const todayAtUtility = () => civilDateAt(new Date(), 'America/Denver')

/** Counts by Ambrel Valley's calendar, from any day, on the door made for counting alone. */
export async function countDays(page: Page, input: Omit<CountInputBody, 'calendar'>) {
  const answer = await send(page, api.countClocks(), { ...input, calendar: 'ave' })
  return (await bodyOf<CountAnswer>(answer)).dueOn
}

/** The business day that lies so many before today at Ambrel Valley. */
export function daysBack(page: Page, length: number): Promise<string> {
  const start = todayAtUtility()
  return countDays(page, { start, length, unit: 'business_day', direction: 'before' })
}

/** A name that no other test and no other run uses. */
export const ownName = (words: string) => `${words} ${randomUUID().slice(0, 6)}`

/** Starts a fast track at Ambrel Valley, as a developer. */
export async function startApplication(page: Page, name: string): Promise<string> {
  const choices = await bodyOf<ApplicationChoices>(
    await page.request.get('/api/applications/choices'),
  )
  const operator = choices.organizations.find((one) => one.name.startsWith('Ambrel Valley'))
  const procedure = choices.procedures.find((one) => one.key === 'federal_fast_track')
  const started = await send(page, api.applications(), {
    id: randomUUID(),
    project: { name, town: 'Sorrel Wells' },
    entityName: `${name} Solar, LLC`,
    operatorId: operator?.id,
    procedureRevisionId: procedure?.revisionId,
    terms: { requestedMw: 2, poi: '12.47 kV feeder SW-9' },
  })
  return (await bodyOf<{ id: string }>(started)).id
}

/** Records that a step happened; who may is the page's person. */
export async function recordHappened(
  page: Page,
  applicationId: string,
  fact: { step: string; instance?: number; outcome?: string; sentOn?: string; receivedOn: string },
): Promise<ApplicationView> {
  const happened = { id: randomUUID(), kind: 'happened', ...fact }
  return bodyOf(await send(page, api.facts(applicationId), happened))
}

/** A request of its own, filed so many business days ago. */
export async function filedApplication(page: Page, name: string, businessDaysAgo: number) {
  const id = await startApplication(page, name)
  const receivedOn = await daysBack(page, businessDaysAgo)
  await recordHappened(page, id, { step: 'file', outcome: 'filed', receivedOn })
  return id
}

/** The application as it stands. */
export async function readApplication(page: Page, id: string): Promise<ApplicationView> {
  return bodyOf(await page.request.get(api.application(id)))
}
