import type { Door } from '@/lib/http/door'
import {
  acceptedSchema,
  invitationInput,
  linkAcceptance,
  meChange,
  meSchema,
  newTokenSchema,
  passwordChange,
  personChange,
  personListSchema,
  personSchema,
  resetRequest,
  saidSchema,
  tokenInput,
  tokenListSchema,
} from '@/lib/schemas/person'

export const peopleDoors: Door[] = [
  {
    method: 'get',
    path: '/api/people',
    summary: 'Everybody of the company, by name',
    action: 'person.read',
    output: personListSchema,
  },
  {
    method: 'post',
    path: '/api/people',
    summary: 'Invite a person; the same id again is the same invitation',
    action: 'person.write',
    input: invitationInput,
    output: personSchema,
    status: 201,
  },
  {
    method: 'get',
    path: '/api/people/{id}',
    summary: 'One person',
    action: 'person.read',
    output: personSchema,
  },
  {
    method: 'patch',
    path: '/api/people/{id}',
    summary: 'Change name, zone or roles; disable or enable',
    action: 'person.write',
    input: personChange,
    output: personSchema,
  },
  {
    method: 'post',
    path: '/api/people/{id}/invitation',
    summary: 'Send the invitation again with a new link',
    action: 'person.write',
    output: personSchema,
  },
]

export const ownDoors: Door[] = [
  {
    method: 'get',
    path: '/api/me',
    summary: 'Who is signed in',
    action: 'self.read',
    output: meSchema,
  },
  {
    method: 'patch',
    path: '/api/me',
    summary: 'Change one’s own name and time zone',
    action: 'self.write',
    input: meChange,
    output: meSchema,
  },
  {
    method: 'post',
    path: '/api/me/password',
    summary: 'Choose another password; every session ends',
    action: 'self.write',
    input: passwordChange,
  },
  {
    method: 'get',
    path: '/api/me/tokens',
    summary: 'One’s own API tokens, without their secrets',
    action: 'self.read',
    output: tokenListSchema,
  },
  {
    method: 'post',
    path: '/api/me/tokens',
    summary: 'Make an API token; its secret is in this answer alone',
    action: 'self.write',
    input: tokenInput,
    output: newTokenSchema,
    status: 201,
  },
  {
    method: 'delete',
    path: '/api/me/tokens/{id}',
    summary: 'Revoke an API token',
    action: 'self.write',
  },
]

export const linkDoors: Door[] = [
  {
    method: 'post',
    path: '/api/one-time-links/request',
    summary: 'Ask for a reset link by e-mail; the answer is the same for every address',
    action: null,
    input: resetRequest,
    output: saidSchema,
  },
  {
    method: 'post',
    path: '/api/one-time-links/accept',
    summary: 'Use an invitation or reset link once: choose the password',
    action: null,
    input: linkAcceptance,
    output: acceptedSchema,
  },
]
