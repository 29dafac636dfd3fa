import { openRoute } from '@/lib/http/open-route'
import { linkAcceptance } from '@/lib/schemas/person'
import { acceptLink } from '@/lib/services/one-time-links'

export const POST = openRoute({ input: linkAcceptance, run: acceptLink })
