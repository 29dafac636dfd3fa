import { mkdtemp, rm } from 'node:fs/promises'
import { tmpdir } from 'node:os'
import path from 'node:path'
import { drizzle } from 'drizzle-orm/node-postgres'
import { Pool } from 'pg'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { seedDemo } from '@/db/demo/seed'
import { people } from '@/db/schema/people'
import type { Context } from '@/lib/services/context'
import { listDue } from '@/lib/services/due'
import { listApplications } from '@/lib/services/pipeline'
import { createTestDatabase } from '../setup/database'

let filesDir: string

beforeAll(async () => {
  filesDir = await mkdtemp(path.join(tmpdir(), 'lineside-files-'))
  process.env.FILES_DIR = filesDir
})
afterAll(() => rm(filesDir, { recursive: true, force: true }))

describe('the demo company, made through the services', () => {
  it.each(['2026-12-01T18:00:00Z', '2027-06-21T04:30:00Z', '2028-02-29T23:00:00Z'])(
    'opens with the same story when today is %s',
    async (instant) => {
      const database = await createTestDatabase('demo-seed')
      const pool = new Pool({ connectionString: database.appUrl })
      try {
        const db = drizzle(pool, { casing: 'snake_case' })
        const now = new Date(instant)
        await seedDemo({ db, now, password: 'a long demo password' })
        const all = await db.select().from(people)
        const maren = all.find((person) => person.email === 'developer@demo.test')!
        const ctx: Context = {
          actor: {
            kind: 'person',
            id: maren.id,
            name: maren.name,
            roles: ['developer'],
            zone: maren.zone,
          },
          db,
          now,
          requestId: 'test',
        }
        const pipeline = await listApplications(ctx, { standing: 'all' })
        const row = (name: string) => pipeline.items.find((one) => one.project === name)!
        expect(pipeline.items).toHaveLength(13)
        expect(row('Cold Spring Road').next?.standing.state).toBe('missed')
        expect(row('Bellweather South').next?.statedDueOn).toBeTruthy()
        expect(row('Ferris Cut').next?.standing.state).toBe('theirs_late')
        expect(row('Pike Hill Landing').standing).toBe('in_operation')
        expect(row('Quillmark Meadow').standing).toBe('preparing')
        expect(row('Juniper Flat').next?.title).toContain('Gate')
        const due = await listDue(ctx, { scope: 'ours' })
        expect(due.rows.find((one) => one.project === 'Cold Spring Road')?.group).toBe('missed')
      } finally {
        await pool.end()
        await database.drop()
      }
    },
  )
})
