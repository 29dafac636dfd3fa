import { freePort, keptOrFreePort, waitForPort } from './ports.mjs'
import { keep, readKept } from './secrets.mjs'

/**
 * Starts the SMTP fake with its page on loopback, unless SMTP_URL names a real server.
 * `remember` keeps its two ports for the next start. Returns { url, page }, page null for a real server.
 */
export async function startMail(house, { remember = false, name = 'mail' } = {}) {
  if (process.env.SMTP_URL) return { url: process.env.SMTP_URL, page: null }
  const kept = readKept()
  const smtp = remember ? await keptOrFreePort(kept.mailPort) : await freePort()
  const web = remember ? await keptOrFreePort(kept.mailPagePort) : await freePort()
  if (remember) keep({ mailPort: smtp, mailPagePort: web })
  const where = ['--ip', '127.0.0.1', '--smtp', String(smtp), '--web-ip', '127.0.0.1']
  const args = ['node_modules/maildev/bin/maildev', ...where, '--web', String(web)]
  const child = house.start(name, args, { last: true })
  await waitForPort(smtp, 'The SMTP fake', { gaveUp: child.isGone })
  await waitForPort(web, 'The page of the SMTP fake', { gaveUp: child.isGone })
  return { url: `smtp://127.0.0.1:${smtp}`, page: `http://127.0.0.1:${web}`, child }
}
