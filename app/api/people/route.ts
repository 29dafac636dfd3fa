import { route } from '@/lib/http/route'
import { invitationInput } from '@/lib/schemas/person'
import { invitePerson, listPeople } from '@/lib/services/people'

export const GET = route({ action: 'person.read', run: listPeople })

export const POST = route({
  action: 'person.write',
  input: invitationInput,
  status: 201,
  run: invitePerson,
})
