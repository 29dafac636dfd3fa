import { route } from '@/lib/http/route'
import { listMilestones } from '@/lib/services/milestones'

export const GET = route<undefined, { id: string }>({
  run: (ctx, _input, { id }) => listMilestones(ctx, id),
})
