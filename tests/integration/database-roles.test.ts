import { randomUUID } from 'node:crypto'
import { sql } from 'drizzle-orm'
import { runOnce } from 'graphile-worker'
import { Client } from 'pg'
import { describe, expect, it } from 'vitest'
import { appendOnlyTables } from '@/db/append-only'
import { getPool, withTransaction } from '@/db/client'
import { migrateDatabase } from '@/db/migrate'
import { enqueue } from '@/lib/queue/enqueue'
import { useTestDatabase } from '../setup/database'

const database = useTestDatabase()

async function asOwner<T>(work: (client: Client) => Promise<T>): Promise<T> {
  const client = new Client({ connectionString: database().ownerUrl })
  await client.connect()
  try {
    return await work(client)
  } finally {
    await client.end()
  }
}

describe('append-only tables', () => {
  it.each(appendOnlyTables)(
    '%s: the application role may add and read, nothing else',
    async (t) => {
      const { rows } = await getPool().query<Record<string, boolean>>(
        `select has_table_privilege($1, 'select') as read, has_table_privilege($1, 'insert') as add,
        has_table_privilege($1, 'update') as change, has_any_column_privilege($1, 'update') as part,
        has_table_privilege($1, 'delete') as remove, has_table_privilege($1, 'truncate') as empty`,
        [t],
      )
      const nothing = { change: false, part: false, remove: false, empty: false }
      expect(rows[0]).toEqual({ read: true, add: true, ...nothing })
    },
  )

  it.each(appendOnlyTables)('%s: even the owner cannot empty it', async (table) => {
    await expect(asOwner((owner) => owner.query(`truncate "${table}" cascade`))).rejects.toThrow(
      /is append-only: TRUNCATE refused/,
    )
  })

  it.each(['update files set size = 2', 'delete from files'])(
    'a recorded row withstands "%s" of its owner',
    async (statement) => {
      const sha = randomUUID().replaceAll('-', '').repeat(2)
      await asOwner(async (owner) => {
        await owner.query('begin')
        await owner.query(`insert into files (sha256, size, type) values ($1, 1, 'text/plain')`, [
          sha,
        ])
        await expect(owner.query(statement)).rejects.toThrow(/is append-only/)
        await owner.query('rollback')
      })
    },
  )

  it('the application role can neither drop a guard nor make a table', async () => {
    const pool = getPool()
    await expect(pool.query('drop trigger facts_append_only_rows on facts')).rejects.toThrow(
      /must be owner/,
    )
    await expect(pool.query('alter table facts disable trigger all')).rejects.toThrow(
      /must be owner/,
    )
    await expect(pool.query('create table extra (id int)')).rejects.toThrow(/permission denied/)
  })
})

describe('migrations', () => {
  it('run again, two at a time, over a finished database without change or error', async () => {
    const { ownerUrl } = database()
    const guards = () =>
      asOwner((owner) => owner.query(`select count(*) from pg_trigger where not tgisinternal`))
    const before = (await guards()).rows
    await Promise.all([1, 2].map(() => migrateDatabase(ownerUrl, 'lineside_app')))
    expect((await guards()).rows).toEqual(before)
  })
})

async function jobsNamed(key: string): Promise<number> {
  const { rows } = await getPool().query('select 1 from graphile_worker.jobs where key = $1', [key])
  return rows.length
}

describe('jobs', () => {
  it('a job is there once its transaction commits, and the application role can do it', async () => {
    const applicationId = randomUUID()
    await withTransaction((tx) =>
      enqueue(tx, 'recomputeApplication', { applicationId }, { jobKey: 'kept' }),
    )
    expect(await jobsNamed('kept')).toBe(1)
    const done: unknown[] = []
    const recomputeApplication = (payload: unknown) => void done.push(payload)
    await runOnce({ pgPool: getPool(), taskList: { recomputeApplication } })
    expect(done).toEqual([{ applicationId }])
    expect(await jobsNamed('kept')).toBe(0)
  })

  it('a rollback leaves no job behind', async () => {
    const broken = withTransaction(async (tx) => {
      await enqueue(tx, 'sweepNotices', {}, { jobKey: 'undone' })
      await tx.execute(sql`select 1 / 0`)
    })
    await expect(broken).rejects.toThrow()
    expect(await jobsNamed('undone')).toBe(0)
  })

  it('nudges with one key make one job', async () => {
    const later = new Date('2100-01-01T00:00:00Z')
    for (let count = 0; count < 3; count += 1) {
      await enqueue(database().db, 'sendNotices', {}, { jobKey: 'nudge', runAt: later })
    }
    expect(await jobsNamed('nudge')).toBe(1)
  })

  it('a payload of another shape is refused before it reaches the queue', async () => {
    const wrong = { applicationId: 'not-an-id' }
    await expect(enqueue(database().db, 'recomputeApplication', wrong)).rejects.toThrow(/uuid/i)
  })
})
