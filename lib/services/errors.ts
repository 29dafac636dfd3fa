/** The one union of things a service refuses; lib/http turns a code into a status. */
export type ErrorCode =
  | 'unsigned'
  | 'forbidden'
  | 'not_found'
  | 'invalid'
  | 'unreadable'
  | 'conflict'
  | 'too_large'
  | 'too_often'
  | 'unavailable'

export interface FieldError {
  path: string
  message: string
}

export class ServiceError extends Error {
  constructor(
    readonly code: ErrorCode,
    message: string,
    readonly fields: FieldError[] = [],
    readonly retryAfterSeconds?: number,
  ) {
    super(message)
    this.name = 'ServiceError'
  }
}

/** What was looked for is not there, or not visible to this person. */
export function notFound(what: string): ServiceError {
  return new ServiceError('not_found', `There is no such ${what}, or it is not open to you.`)
}

/** Bad input: which field, what was found, what is allowed. */
export function invalid(fields: FieldError[]): ServiceError {
  return new ServiceError('invalid', fields.map((field) => field.message).join(' '), fields)
}
