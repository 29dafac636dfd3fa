import { openRoute } from '@/lib/http/open-route'
import { resetRequest } from '@/lib/schemas/person'
import { resetLimits, takeTry } from '@/lib/services/limiter'
import { requestReset } from '@/lib/services/one-time-links'

/** One sentence whether the address is known or not. */
const message =
  'If this address belongs to a person here, an e-mail with a link is on its way. The link works for one hour.'

export const POST = openRoute({
  input: resetRequest,
  async run(visit, input) {
    await takeTry(visit.db, resetLimits(input.email, visit.network), visit.now)
    await requestReset(visit, input)
    return { message }
  },
})
