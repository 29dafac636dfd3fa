import { hash } from '@node-rs/argon2'
import { like } from 'drizzle-orm'
import { closeDb, getDb } from '@/db/client'
import { people } from '@/db/schema/people'

// Run by the local start where DEMO_PASSWORD is another than the one the demo was made with.
const password = process.env.DEMO_PASSWORD
if (!password) throw new Error('DEMO_PASSWORD is not set: no password to give to the demo people.')
const passwordHash = await hash(password)
await getDb().update(people).set({ passwordHash }).where(like(people.email, '%@demo.test'))
await closeDb()
