import { addDays, earlier, type CivilDate } from '@/lib/domain/clocks/civil-date'
import type { DerivationLine } from '@/lib/domain/clocks/derivation'
import type { Fact } from '@/lib/domain/clocks/facts'
import type { DateBasis, Step } from '@/lib/domain/clocks/procedure'
import { sayDate } from '@/lib/domain/clocks/say'
import type { OrganizationRules } from '@/lib/domain/clocks/schedule-types'
import { closingInstant, localOf } from '@/lib/domain/clocks/zoned'

export interface DatedEvent {
  on: CivilDate
  /** Day 0 is the next business day, whatever the day of the week. */
  afterHours: boolean
  lines: DerivationLine[]
}

/** Whether the step's event is received by the utility (ours) or by us (theirs). */
export function receivedByUtility(step: Step): boolean {
  return step.party === 'applicant' || step.party === 'both'
}

/**
 * The date from which a clock that this event starts is counted, with the reasons.
 *
 * A letter from an organization with a deemed-received rule counts from the earlier of the
 * deemed and the stamped date. The closing hour concerns what the utility receives; what reaches
 * us late in the day counts as that day, the reading that leaves us less time.
 */
export function datedEvent(
  fact: Fact,
  step: Step,
  basis: DateBasis,
  rules: OrganizationRules,
): DatedEvent | null {
  const sentOn = fact.sentOn ?? (fact.sentAt && localOf(fact.sentAt, rules.zone).on)
  const stampedOn = fact.receivedOn ?? (fact.receivedAt && localOf(fact.receivedAt, rules.zone).on)
  if (basis === 'sent') {
    const on = sentOn ?? stampedOn
    return on ? { on, afterHours: false, lines: [] } : null
  }
  const lines: DerivationLine[] = []
  const deemedOn = deemedReceipt(fact, step, sentOn, rules)
  const on =
    stampedOn && deemedOn ? earlier(stampedOn, deemedOn) : (stampedOn ?? deemedOn ?? sentOn)
  if (!on) return null
  if (deemedOn && on === deemedOn)
    lines.push({
      kind: 'receipt',
      on,
      text: `Deemed received ${sayDate(on)}: letter of ${sayDate(sentOn!)} plus ${rules.deemedReceivedDays} calendar days${stampedOn && stampedOn !== on ? `; stamped ${sayDate(stampedOn)}` : ''}.`,
    })
  const afterHours = isAfterHours(fact, step, on, rules)
  if (afterHours)
    lines.push({
      kind: 'receipt',
      on,
      text: `Received ${sayDate(on)} after ${rules.closesAt}, so on the next business day, which is day 0.`,
    })
  return { on, afterHours, lines }
}

function deemedReceipt(
  fact: Fact,
  step: Step,
  sentOn: CivilDate | undefined,
  rules: OrganizationRules,
): CivilDate | undefined {
  if (rules.deemedReceivedDays === null || fact.channel !== 'letter' || !sentOn) return undefined
  return receivedByUtility(step) ? undefined : addDays(sentOn, rules.deemedReceivedDays)
}

function isAfterHours(fact: Fact, step: Step, on: CivilDate, rules: OrganizationRules): boolean {
  const at = fact.receivedAt ?? (fact.receivedOn ? undefined : fact.sentAt)
  if (!at || !rules.closesAt || rules.receiptRule !== 'next_business_day') return false
  if (!receivedByUtility(step)) return false
  if (localOf(at, rules.zone).on !== on) return false
  return Date.parse(at) > Date.parse(closingInstant(on, rules.closesAt, rules.zone))
}
