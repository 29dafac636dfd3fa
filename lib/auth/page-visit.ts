import { getDb } from '@/db/client'
import { requestNow } from '@/lib/auth/now'

/** What a page outside the product reads with: the database and the moment, no person. */
export function pageVisit() {
  return { db: getDb(), now: requestNow() }
}
