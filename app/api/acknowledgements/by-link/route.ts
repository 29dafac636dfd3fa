import { openRoute } from '@/lib/http/open-route'
import { linkAcknowledgement } from '@/lib/schemas/notice'
import { acknowledgeByLink } from '@/lib/services/acknowledge-links'

/** Opens without a session: the secret of the e-mail is the authorization. */
export const POST = openRoute({
  input: linkAcknowledgement,
  run: (visit, input) => acknowledgeByLink(visit, input),
})
