import { closeDb, getDb } from '@/db/client'
import { seedDemo } from '@/db/demo/seed'
import { isSeeded } from '@/db/demo/seed-house'

const password = process.env.DEMO_PASSWORD
if (!password) throw new Error('DEMO_PASSWORD is not set: no password for the demo people.')
const db = getDb()
if (!(await isSeeded(db))) await seedDemo({ db, now: new Date(), password })
await closeDb()
