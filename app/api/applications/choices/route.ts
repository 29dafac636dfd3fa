import { route } from '@/lib/http/route'
import { listApplicationChoices } from '@/lib/services/applications'

export const GET = route({ run: (ctx) => listApplicationChoices(ctx) })
