import { route } from '@/lib/http/route'
import { countInput } from '@/lib/schemas/count'
import { countClock } from '@/lib/services/counting'

export const POST = route({ input: countInput, run: countClock })
