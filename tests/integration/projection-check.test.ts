import { and, eq } from 'drizzle-orm'
import { beforeAll, describe, expect, it } from 'vitest'
import type { SeededHouse } from '@/db/demo/seed-house'
import { notices, obligations } from '@/db/schema/applications'
import { audit } from '@/db/schema/people'
import type { Context } from '@/lib/services/context'
import { compareProjections } from '@/lib/services/projection-check'
import { as, makeApplication, makeHouse, record } from '../factories/house'
import { useTestDatabase } from '../setup/database'

const database = useTestDatabase()
let house: SeededHouse
let applicationId: string
const now = '2026-12-01T18:00:00Z'
const nightly = (): Context => ({
  actor: { kind: 'job', name: 'compareProjections' },
  db: database().db,
  now: new Date(now),
  requestId: 'nightly',
})

beforeAll(async () => {
  house = await makeHouse(database().db)
  const developer = as(database().db, house, 'developer', now)
  applicationId = (await makeApplication(developer, house)).id
  await record(developer, applicationId, {
    kind: 'happened',
    step: 'file',
    outcome: 'filed',
    receivedOn: '2026-11-02',
  })
})

describe('the nightly comparison', () => {
  it('finds nothing where kept dates are those of the facts', async () => {
    expect(await compareProjections(nightly())).toEqual({ checked: 1, differences: [] })
    expect(await database().db.select().from(notices)).toHaveLength(0)
  })

  it('names a date that was changed behind the facts and tells the administrators once a day', async () => {
    await database()
      .db.update(obligations)
      .set({ dueOn: '2026-12-24' })
      .where(
        and(eq(obligations.applicationId, applicationId), eq(obligations.step, 'completeness')),
      )
    const report = await compareProjections(nightly())
    expect(report.differences).toEqual([
      { applicationId, project: expect.any(String), keys: ['completeness, round 1'] },
    ])
    await compareProjections(nightly())
    const told = await database().db.select().from(notices)
    expect(told.map((notice) => notice.to)).toEqual(['administrator@demo.test'])
    expect(told[0]?.body.text).toContain('completeness, round 1')
    const [row] = await database()
      .db.select()
      .from(audit)
      .where(eq(audit.action, 'projection.differs'))
    expect(row?.actorName).toBe('compareProjections')
  })

  it('names an obligation that is gone', async () => {
    await database().db.delete(obligations).where(eq(obligations.step, 'acknowledge'))
    const report = await compareProjections(nightly())
    expect(report.differences[0]?.keys).toContain('acknowledge, round 1')
  })
})
