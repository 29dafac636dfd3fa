import { route } from '@/lib/http/route'
import { passwordChange } from '@/lib/schemas/person'
import { changePassword } from '@/lib/services/own-account'

export const POST = route({ action: 'self.write', input: passwordChange, run: changePassword })
