import { z } from 'zod'
import { call } from '@/lib/client/fetcher'
import { api } from '@/lib/routes'
import {
  acceptedSchema,
  type InvitationInput,
  type LinkAcceptance,
  type MeChange,
  meSchema,
  newTokenSchema,
  type PasswordChange,
  type PersonChange,
  personSchema,
  saidSchema,
  type TokenInput,
} from '@/lib/schemas/person'

/** Asks for a reset link; the answer is a sentence, the same for every address. */
export const requestLink = (email: string) =>
  call(api.requestLink(), saidSchema, { method: 'POST', body: { email } })

export const acceptLink = (body: LinkAcceptance) =>
  call(api.acceptLink(), acceptedSchema, { method: 'POST', body })

export const invitePerson = (body: InvitationInput) =>
  call(api.people(), personSchema, { method: 'POST', body })

export const changePerson = (id: string, body: PersonChange) =>
  call(api.person(id), personSchema, { method: 'PATCH', body })

export const resendInvitation = (id: string) =>
  call(api.personInvitation(id), personSchema, { method: 'POST' })

export const changeMe = (body: MeChange) => call(api.me(), meSchema, { method: 'PATCH', body })

export const changePassword = (body: PasswordChange) =>
  call(api.ownPassword(), z.undefined(), { method: 'POST', body })

export const createToken = (body: TokenInput) =>
  call(api.tokens(), newTokenSchema, { method: 'POST', body })

export const revokeToken = (id: string) => call(api.token(id), z.undefined(), { method: 'DELETE' })
