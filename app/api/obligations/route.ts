import { route } from '@/lib/http/route'
import { dueFilter } from '@/lib/schemas/application'
import { listDue } from '@/lib/services/due'

export const GET = route({ input: dueFilter, run: listDue })
