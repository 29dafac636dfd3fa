import { ServiceError } from '@/lib/services/errors'

const safeMethods = ['GET', 'HEAD', 'OPTIONS']

/** Whether X-Forwarded headers were written by a proxy of ours. */
export function trustsProxy(): boolean {
  return process.env.TRUST_PROXY === '1'
}

/**
 * Refuses a change that another site's page asks for with this person's cookie: browsers say where
 * a request comes from in Sec-Fetch-Site (W3C Fetch Metadata) and Origin (RFC 6454). A request
 * with neither does not come from a page.
 * @throws ServiceError `forbidden`
 */
export function refuseForeignOrigin(request: Request): void {
  if (safeMethods.includes(request.method)) return
  const site = request.headers.get('sec-fetch-site')
  if (site === 'same-origin' || site === 'none') return
  const origin = request.headers.get('origin')
  if (!site && (!origin || ownHosts(request).includes(hostOf(origin)))) return
  throw new ServiceError('forbidden', 'This request comes from another site: nothing was changed.')
}

function ownHosts(request: Request): string[] {
  const hosts = [request.headers.get('host'), hostOf(process.env.NEXTAUTH_URL ?? '')]
  if (trustsProxy()) hosts.push(request.headers.get('x-forwarded-host'))
  return hosts.filter((host): host is string => Boolean(host))
}

function hostOf(url: string): string {
  return URL.canParse(url) ? new URL(url).host : ''
}
