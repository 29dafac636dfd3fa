import { trustsProxy } from '@/lib/auth/same-origin'

/**
 * The network address that a request is counted under. Behind a proxy of ours it is the last entry
 * of X-Forwarded-For, the one that the proxy added itself. Without one the header is whatever the
 * sender wrote, so all share one count: served directly, the product is on loopback.
 */
export function networkAddressOf(request: Request): string {
  if (!trustsProxy()) return 'direct'
  const forwarded = request.headers.get('x-forwarded-for')?.split(',') ?? []
  return forwarded.at(-1)?.trim() || 'unknown'
}
