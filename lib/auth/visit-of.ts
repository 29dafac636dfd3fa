import { getDb } from '@/db/client'
import { networkAddressOf } from '@/lib/auth/network-address'
import { requestNow } from '@/lib/auth/now'
import type { Visit } from '@/lib/services/one-time-links'

/** A request without a session: the moment and the network address, no person. */
export function visitOf(request: Request, requestId: string): Visit & { network: string } {
  return { db: getDb(), now: requestNow(), requestId, network: networkAddressOf(request) }
}
