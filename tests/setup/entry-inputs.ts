import { randomUUID } from 'node:crypto'
import { sql } from 'drizzle-orm'
import { POST as postEntryDoor } from '@/app/api/entries/route'
import { POST as postFileDoor } from '@/app/api/files/route'
import { getDb } from '@/db/client'
import type { EntryInputGiven } from '@/lib/schemas/entry'
import type { UploadedFile } from '@/lib/schemas/file'
import type { BareApplication } from './bare-application'
import type { SignedPerson } from './person'

const noParams = { params: Promise.resolve({}) }

/** The present of the tests of correspondence; the calls are of the day before. */
export const correspondenceNow = new Date('2024-12-03T18:00:00Z')

/** A call about an application, complete but for what the test is about. */
export function call(
  application: BareApplication,
  more: Partial<EntryInputGiven> = {},
): EntryInputGiven {
  return {
    id: randomUUID(),
    on: '2024-12-02',
    time: '16:30',
    channel: 'call',
    direction: 'out',
    parties: 'Interconnection desk',
    subject: 'Is the request complete?',
    applications: [{ applicationId: application.id }],
    ...more,
  }
}

/** The event that an application was filed, by the short procedure. */
export const filed = (application: BareApplication, more: object = {}) => ({
  id: randomUUID(),
  applicationId: application.id,
  kind: 'happened' as const,
  step: 'filed',
  sentOn: '2024-12-02',
  receivedOn: '2024-12-02',
  outcome: 'done',
  ...more,
})

/** Bytes through the door for uploads. */
export async function upload(
  person: SignedPerson,
  bytes: Uint8Array<ArrayBuffer>,
  name: string,
): Promise<UploadedFile> {
  const request = new Request('http://lineside.test/api/files', {
    method: 'POST',
    headers: { ...person.headers, 'x-file-name': encodeURIComponent(name) },
    body: bytes,
  })
  return (await postFileDoor(request, noParams)).json()
}

/** An entry through its door. */
export function post(person: SignedPerson, body: unknown): Promise<Response> {
  const request = new Request('http://lineside.test/api/entries', {
    method: 'POST',
    headers: person.headers,
    body: JSON.stringify(body),
  })
  return postEntryDoor(request, noParams)
}

/** How many rows the tables of correspondence hold. */
export async function counts() {
  const { rows } = await getDb().execute<Record<string, string>>(sql`select
    (select count(*) from entries) as entries, (select count(*) from entry_applications) as concerned,
    (select count(*) from file_links) as links, (select count(*) from facts) as facts,
    (select count(*) from fact_evidence) as evidence, (select count(*) from audit) as audit`)
  return rows[0]
}
