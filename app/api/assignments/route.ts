import { route } from '@/lib/http/route'
import { assignmentInput } from '@/lib/schemas/assignment'
import { assignObligation } from '@/lib/services/assignments'

export const POST = route({
  action: 'obligation.assign',
  input: assignmentInput,
  status: 201,
  run: assignObligation,
})
