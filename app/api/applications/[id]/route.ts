import { route } from '@/lib/http/route'
import { getApplication } from '@/lib/services/applications'

export const GET = route<undefined, { id: string }>({
  run: (ctx, _input, { id }) => getApplication(ctx, id),
})
