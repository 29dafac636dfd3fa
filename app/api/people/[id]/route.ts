import { route } from '@/lib/http/route'
import { personChange } from '@/lib/schemas/person'
import { changePerson, getPerson } from '@/lib/services/people'

interface Params {
  id: string
}

export const GET = route<undefined, Params>({
  action: 'person.read',
  run: (ctx, _input, { id }) => getPerson(ctx, id),
})

export const PATCH = route({
  action: 'person.write',
  input: personChange,
  run: (ctx, change, { id }: Params) => changePerson(ctx, id, change),
})
