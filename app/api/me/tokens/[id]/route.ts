import { route } from '@/lib/http/route'
import { revokeToken } from '@/lib/services/api-tokens'

export const DELETE = route<undefined, { id: string }>({
  action: 'self.write',
  run: (ctx, _input, { id }) => revokeToken(ctx, id),
})
