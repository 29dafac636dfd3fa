import { route } from '@/lib/http/route'
import { meChange } from '@/lib/schemas/person'
import { changeMe, getMe } from '@/lib/services/own-account'

export const GET = route({ action: 'self.read', run: getMe })

export const PATCH = route({ action: 'self.write', input: meChange, run: changeMe })
