/** What the outbox and the mail room say to each other. */

export interface OutgoingMessage {
  to: string
  subject: string
  text: string
  html: string
  /** The same for every attempt, so that a repeat is known as the same message. */
  messageId: string
}

/**
 * refused: the server knows the address does not exist; failed: this message, this time;
 * unreachable: no server to talk to, so that the next message would fare no better.
 */
export type Delivery =
  { outcome: 'accepted' } | { outcome: 'refused' | 'failed' | 'unreachable'; reason: string }

export interface Mailer {
  /** How many messages travel side by side. */
  connections: number
  /**
   * Hands a message to the server. `settle` runs once the server has accepted it, and before any
   * other message may be accepted through this mailer: a kill in between repeats one at most.
   */
  deliver(message: OutgoingMessage, settle: () => Promise<void>): Promise<Delivery>
}

const firstPauseSeconds = 15
const longestPauseSeconds = 15 * 60

/** Seconds from a failed attempt to the next: doubled each time, up to a quarter of an hour. */
export function pauseAfterAttempt(attempts: number): number {
  return Math.min(firstPauseSeconds * 2 ** Math.max(0, attempts - 1), longestPauseSeconds)
}
