import { route } from '@/lib/http/route'
import { resendInvitation } from '@/lib/services/people'

export const POST = route<undefined, { id: string }>({
  action: 'person.write',
  run: (ctx, _input, { id }) => resendInvitation(ctx, id),
})
