import { route } from '@/lib/http/route'
import { tokenInput } from '@/lib/schemas/person'
import { createToken, listTokens } from '@/lib/services/api-tokens'

export const GET = route({ action: 'self.read', run: listTokens })

export const POST = route({
  action: 'self.write',
  input: tokenInput,
  status: 201,
  run: createToken,
})
