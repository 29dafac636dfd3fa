import type { Delivery } from '@/lib/domain/delivery'

interface SmtpError extends Error {
  code?: string
  command?: string
  responseCode?: number
  response?: string
}

/** Why a message did not go out, in words, and whether another attempt makes sense. */
export function failureOf(error: unknown): Exclude<Delivery, { outcome: 'accepted' }> {
  const { code, command, responseCode, response, message } = asSmtpError(error)
  const said = oneLine(response ?? message)
  if (command === 'RCPT TO' && responseCode && responseCode >= 500)
    return { outcome: 'refused', reason: `The mail server refused the address: ${said}` }
  if (responseCode) return { outcome: 'failed', reason: `The mail server answered: ${said}` }
  const words = code && unreachable[code]
  if (words) return { outcome: 'unreachable', reason: words }
  return { outcome: 'failed', reason: `The message could not be handed over: ${said}` }
}

function asSmtpError(error: unknown): SmtpError {
  return error instanceof Error ? error : new Error(String(error))
}

const unreachable: Record<string, string> = {
  ECONNECTION: 'The mail server could not be reached.',
  ECONNREFUSED: 'The mail server could not be reached: it refused the connection.',
  ESOCKET: 'The mail server could not be reached, or the connection broke.',
  ECONNRESET: 'The connection to the mail server broke.',
  EDNS: 'The mail server was not found by its name.',
  ETIMEDOUT: 'The mail server did not answer in time.',
  EAUTH: 'The mail server did not accept our sign-in.',
  ETLS: 'No secure connection to the mail server could be made.',
}

function oneLine(text: string): string {
  const line = text.replace(/\s+/g, ' ').trim()
  return line.length > 300 ? `${line.slice(0, 297)}…` : line
}
