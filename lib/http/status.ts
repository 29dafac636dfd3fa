import type { ErrorCode } from '@/lib/services/errors'

export const statusOf: Record<ErrorCode, number> = {
  unsigned: 401,
  forbidden: 403,
  not_found: 404,
  invalid: 422,
  unreadable: 400,
  conflict: 409,
  too_large: 413,
  too_often: 429,
  unavailable: 503,
}

export const titleOf: Record<ErrorCode, string> = {
  unsigned: 'Sign in first',
  forbidden: 'Not allowed',
  not_found: 'Not found',
  invalid: 'Some fields need another look',
  unreadable: 'The request could not be read',
  conflict: 'Somebody was faster',
  too_large: 'Too large',
  too_often: 'Too many tries',
  unavailable: 'Not available right now',
}
