import { eq } from 'drizzle-orm'
import { runOnce } from 'graphile-worker'
import { expect, it } from 'vitest'
import { getDb, getPool } from '@/db/client'
import { obligations } from '@/db/schema/applications'
import { enqueue } from '@/lib/queue/enqueue'
import { makeTasks } from '@/lib/worker/make-tasks'
import { as, makeApplication, makeHouse } from '../factories/house'
import { useTestDatabase } from '../setup/database'

const database = useTestDatabase()

it('a job computes an application anew, and running it again changes nothing', async () => {
  const { db } = database()
  const house = await makeHouse(db)
  const ctx = as(db, house, 'developer', '2026-12-01T16:00:00Z')
  const { id: applicationId } = await makeApplication(ctx, house)
  const titles = async () => {
    const rows = await getDb()
      .select({ title: obligations.title })
      .from(obligations)
      .where(eq(obligations.applicationId, applicationId))
      .orderBy(obligations.position, obligations.obligation)
    return rows.map((row) => row.title)
  }
  const right = await titles()
  expect(right.length).toBeGreaterThan(1)
  await db
    .update(obligations)
    .set({ title: 'Stale' })
    .where(eq(obligations.applicationId, applicationId))
  for (let times = 0; times < 2; times += 1) {
    await enqueue(db, 'recomputeApplication', { applicationId })
    await runOnce({ pgPool: getPool(), taskList: makeTasks })
    expect(await titles()).toEqual(right)
  }
})
