import { createHash, randomUUID } from 'node:crypto'
import { mkdtemp, rm } from 'node:fs/promises'
import { tmpdir } from 'node:os'
import path from 'node:path'
import { eq, sql } from 'drizzle-orm'
import { Logger, runOnce } from 'graphile-worker'
import { Client } from 'pg'
import { afterAll, beforeAll, describe, expect, test } from 'vitest'
import { getPool } from '@/db/client'
import { notices } from '@/db/schema/applications'
import { exhibitRevisions } from '@/db/schema/plant'
import type { SeededHouse } from '@/db/demo/seed-house'
import type { DemoPerson } from '@/db/demo/organizations'
import type { ExhibitRevision } from '@/lib/schemas/exhibit'
import {
  findRenderInput,
  makeDocumentAgain,
  requeueRenders,
  settleRender,
} from '@/lib/services/exhibit-renders'
import {
  checkExhibit,
  downloadExhibit,
  getExhibitRevision,
  issueExhibit,
  listExhibits,
  prepareExhibit,
} from '@/lib/services/exhibits'
import { renderExhibitC } from '@/lib/documents/exhibit-c'
import { revisionRowOf, sourceOf } from '@/lib/services/exhibit-reading'
import { jobContext } from '@/lib/worker/context'
import { makeTasks } from '@/lib/worker/make-tasks'
import { as, makeHouse, record } from '@/tests/factories/house'
import { useTestDatabase } from '@/tests/setup/database'
import {
  addDesign,
  freeze,
  makeExhibitGround,
  type ExhibitGround,
} from '@/tests/setup/exhibit-ground'

const database = useTestDatabase()
const now = '2026-11-30T17:00:00Z'
const filesBefore = process.env.FILES_DIR
let folder: string
let house: SeededHouse

beforeAll(async () => {
  folder = await mkdtemp(path.join(tmpdir(), 'exhibits-'))
  process.env.FILES_DIR = folder
  house = await makeHouse(database().db)
})

afterAll(async () => {
  if (filesBefore === undefined) delete process.env.FILES_DIR
  else process.env.FILES_DIR = filesBefore
  await rm(folder, { recursive: true, force: true })
})

const by = (who: DemoPerson, at = now) => as(database().db, house, who, at)
const ground = () => makeExhibitGround(database().db, house, now)
const logger = new Logger(() => () => undefined)
const work = () => runOnce({ pgPool: getPool(), taskList: makeTasks, logger })

const prepare = ({ applicationId }: ExhibitGround, more: object = {}) =>
  prepareExhibit(by('engineer'), applicationId, {
    id: randomUUID(),
    calculationNo: 1,
    what: 'First issue',
    weatherReason: 'no station file within 40 km',
    ...more,
  })

const check = (id: string) => checkExhibit(by('engineer2'), id, { notes: 'against the design' })

async function checked(place: ExhibitGround, more: object = {}): Promise<ExhibitRevision> {
  const { id } = await prepare(place, more)
  await work()
  await check(id)
  await work()
  return getExhibitRevision(by('engineer'), id)
}

const bytesOf = async (id: string) =>
  Buffer.from(await (await downloadExhibit(by('executive'), id)).arrayBuffer())
const sha256 = (bytes: Buffer) => createHash('sha256').update(bytes).digest('hex')

describe('preparing', () => {
  test('a draft gets its document from the worker, and the other engineer is asked to check it', async () => {
    const prepared = await prepare(await ground())
    expect(prepared).toMatchObject({ letter: 'C', revision: 1, state: 'draft', render: 'waiting' })
    await expect(downloadExhibit(by('developer'), prepared.id)).rejects.toMatchObject({
      code: 'conflict',
    })
    await work()
    const made = await getExhibitRevision(by('developer'), prepared.id)
    expect(made).toMatchObject({ render: 'done', stateWords: 'draft, to be checked' })
    expect(sha256(await bytesOf(prepared.id))).toBe(made.document?.sha256)
    const asked = await database()
      .db.select()
      .from(notices)
      .where(eq(notices.subjectKey, prepared.id))
    expect(asked.map((one) => [one.rung, one.personId])).toEqual([
      ['to_check', house.people.engineer2.id],
    ])
  })

  test('the same form sent twice makes one revision', async () => {
    const place = await ground()
    const id = randomUUID()
    const [first, second] = [await prepare(place, { id }), await prepare(place, { id })]
    expect(second.revision).toBe(first.revision)
    expect(await listExhibits(by('liaison'), place.applicationId)).toHaveLength(1)
  })

  test('an unknown calculation and a synthetic year without its reason are refused by field', async () => {
    const place = await ground()
    await expect(prepare(place, { calculationNo: 7 })).rejects.toMatchObject({
      code: 'invalid',
      fields: [{ path: 'calculationNo' }],
    })
    await expect(prepare(place, { weatherReason: undefined })).rejects.toMatchObject({
      code: 'invalid',
      fields: [{ path: 'weatherReason' }],
    })
    expect(await listExhibits(by('liaison'), place.applicationId)).toEqual([])
  })

  test('the next revision sets aside one that was never issued', async () => {
    const place = await ground()
    const first = await checked(place)
    await prepare(place, { what: 'Corrected' })
    const [second, set] = await listExhibits(by('liaison'), place.applicationId)
    expect(second).toMatchObject({ revision: 2, state: 'draft' })
    expect(set).toMatchObject({ id: first.id, stateWords: 'set aside, never issued' })
  })
})

describe('making the document', () => {
  test('made twice, a revision gives the same bytes', async () => {
    const { id, document } = await checked(await ground())
    expect(await findRenderInput(jobContext('renderExhibit'), id)).toBeNull()
    const again = await renderExhibitC(sourceOf(await revisionRowOf(database().db, id)), null)
    expect(sha256(Buffer.from(again))).toBe(document?.sha256)
  })

  test('a document of what has changed meanwhile is dropped', async () => {
    const { id } = await prepare(await ground())
    const ctx = jobContext('renderExhibit')
    const stale = { ticket: 'of another state', bytes: Buffer.from('stale') }
    expect(await settleRender(ctx, id, stale)).toBe(false)
    expect(await getExhibitRevision(by('engineer'), id)).toMatchObject({ render: 'waiting' })
    await work()
  })

  test('a worker that starts takes over from one that was killed over a document', async () => {
    const { id } = await prepare(await ground())
    await database().db.execute(
      sql`update graphile_worker._private_jobs set locked_by = 'killed', locked_at = now(), attempts = 1 where key = ${`renderExhibit:${id}`}`,
    )
    await work()
    expect(await getExhibitRevision(by('engineer'), id)).toMatchObject({ render: 'waiting' })
    expect(await requeueRenders(jobContext('renderExhibit'))).toBe(1)
    await work()
    expect(await getExhibitRevision(by('engineer'), id)).toMatchObject({ render: 'done' })
  })

  test('a failure is told in words, and made again on request', async () => {
    const { id } = await prepare(await ground())
    const { db } = database()
    await db.execute(
      sql`update graphile_worker._private_jobs set attempts = max_attempts - 1 where key = ${`renderExhibit:${id}`}`,
    )
    process.env.FILES_DIR = '/dev/null/nowhere'
    await work()
    process.env.FILES_DIR = folder
    const failed = await getExhibitRevision(by('engineer'), id)
    expect(failed.render).toBe('failed')
    expect(failed.renderError).not.toBe('')
    await makeDocumentAgain(by('engineer'), id)
    await work()
    expect(await getExhibitRevision(by('engineer'), id)).toMatchObject({
      render: 'done',
      renderError: null,
    })
  })
})

describe('checking', () => {
  test('the preparer cannot check, another engineer can', async () => {
    const { id } = await prepare(await ground())
    await work()
    await expect(checkExhibit(by('engineer'), id, { notes: 'mine' })).rejects.toMatchObject({
      code: 'forbidden',
      message: /another engineer/,
    })
    expect(await check(id)).toMatchObject({ state: 'checked', checkNotes: 'against the design' })
  })

  test('the database refuses the preparer as checker too', async () => {
    const { id } = await prepare(await ground())
    await work()
    const change = database()
      .db.update(exhibitRevisions)
      .set({ checkedBy: house.people.engineer.id })
      .where(eq(exhibitRevisions.id, id))
    await expect(change).rejects.toMatchObject({
      cause: { message: expect.stringContaining('its preparer cannot check it') },
    })
  })

  test('a draft without its document cannot be checked', async () => {
    const { id } = await prepare(await ground())
    await expect(check(id)).rejects.toMatchObject({ code: 'conflict' })
    await work()
  })
})

describe('issuing', () => {
  test('a draft cannot be issued', async () => {
    const { id } = await prepare(await ground())
    await work()
    await expect(issueExhibit(by('developer'), id)).rejects.toMatchObject({ code: 'conflict' })
  })

  test('what was checked is issued byte for byte, under its SHA-256', async () => {
    const { id, document } = await checked(await ground())
    const issued = await issueExhibit(by('developer'), id)
    expect(issued).toMatchObject({ state: 'issued', document })
    expect(sha256(await bytesOf(id))).toBe(document?.sha256)
  })

  test('an issued row is refused every change by the database, for the owner too', async () => {
    const { id } = await checked(await ground())
    await issueExhibit(by('developer'), id)
    const owner = new Client({ connectionString: database().ownerUrl })
    await owner.connect()
    const change = (set: string) =>
      owner.query(`update exhibit_revisions set ${set} where id = $1`, [id])
    await expect(change(`file_sha256 = null`)).rejects.toThrow('frozen')
    await expect(change(`data = '{}'`)).rejects.toThrow('frozen')
    await expect(change(`state = 'draft'`)).rejects.toThrow('frozen')
    await expect(change(`state = 'superseded'`)).rejects.toThrow('only a later issue')
    await expect(owner.query('delete from exhibit_revisions where id = $1', [id])).rejects.toThrow(
      'cannot be deleted',
    )
    await expect(owner.query('truncate exhibit_revisions')).rejects.toThrow('append-only')
    await owner.end()
  })

  test('two issues at once make one', async () => {
    const { id } = await checked(await ground())
    const answers = await Promise.allSettled([
      issueExhibit(by('developer'), id),
      issueExhibit(by('engineer'), id),
    ])
    expect(answers.map((one) => one.status).sort()).toEqual(['fulfilled', 'rejected'])
    const refused = answers.find((one) => one.status === 'rejected')
    expect(refused?.reason).toMatchObject({ code: 'conflict' })
  })

  test('a later issue supersedes the one before, and its document stays', async () => {
    const place = await ground()
    const first = await checked(place)
    await issueExhibit(by('developer'), first.id)
    const second = await checked(place, { what: 'Second issue' })
    await issueExhibit(by('developer'), second.id)
    expect(await getExhibitRevision(by('executive'), first.id)).toMatchObject({
      stateWords: 'superseded by a later issue',
      document: first.document,
    })
  })
})

describe('out of step', () => {
  test('a later design revision says so on what was issued', async () => {
    const place = await ground()
    const { id } = await checked(place)
    await issueExhibit(by('developer'), id)
    await addDesign(database().db, house, now, place, 1, { strings: 190 })
    expect(await getExhibitRevision(by('executive'), id)).toMatchObject({
      state: 'issued',
      stateWords: 'issued, out of step: design revision 2 of 30 Nov',
    })
  })

  test('a checked revision out of step is refused to issue, and its next one is issued', async () => {
    const place = await ground()
    const { id } = await checked(place)
    const designRevisionId = await addDesign(database().db, house, now, place, 1)
    await expect(issueExhibit(by('developer'), id)).rejects.toMatchObject({
      code: 'conflict',
      message: expect.stringContaining('design revision 2'),
    })
    await freeze(database().db, house, now, { ...place, designRevisionId })
    const next = await checked(place, { calculationNo: 2, what: 'On design revision 2' })
    expect(await issueExhibit(by('developer'), next.id)).toMatchObject({ state: 'issued' })
  })

  test('other megawatts at the POI in the terms put it out of step', async () => {
    const place = await ground()
    const { id } = await checked(place)
    await record(by('developer'), place.applicationId, {
      kind: 'changed',
      receivedOn: '2026-11-30',
      terms: { requestedMw: 1.8 },
      reason: 'reduced after the scoping meeting',
    } as never)
    expect((await getExhibitRevision(by('executive'), id)).outOfStep).toMatch(/1\.8 MWac/)
    await expect(issueExhibit(by('developer'), id)).rejects.toMatchObject({ code: 'conflict' })
  })
})
