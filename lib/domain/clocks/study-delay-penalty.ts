import { sayDollars } from '@/lib/domain/money'

export type DelayedStudy =
  'cluster_study' | 'cluster_restudy' | 'affected_system_study' | 'facilities_study'

export interface DelayRules {
  /** The switch: the penalties are challenged in court, and not every tariff has them. */
  inForce: boolean
  perBusinessDayMinor: Record<DelayedStudy, number>
  /** Late by no more than this, nothing is owed; later, it is owed from the first late day. */
  graceBusinessDays: number
  /** Added once when every customer of the study agrees. */
  agreedExtensionBusinessDays: number
}

/**
 * Source: pro forma LGIP 3.9 after Order 2023 (from memory). Challenged in the D.C. Circuit,
 * No. 23-1282 and others; outcome not known here.
 */
export const federalDelayRules: DelayRules = {
  inForce: true,
  perBusinessDayMinor: {
    cluster_study: 100_000,
    cluster_restudy: 200_000,
    affected_system_study: 200_000,
    facilities_study: 250_000,
  },
  graceBusinessDays: 10,
  agreedExtensionBusinessDays: 30,
}

export interface DelayInput {
  /** Business days after the due date on which the study was given, by the utility's calendar. */
  businessDaysLate: number
  /** Every customer of the study agreed to the one extension. */
  extensionAgreed?: boolean
  /** Initial study deposits of all requests in the study: the cap; null when not known. */
  depositsOfAllMinor: number | null
}

export interface DelayPenalty {
  /** Owed by the utility for the whole study, shared among its customers. Minor units. */
  penaltyMinor: number
  account: string
}

/** What a utility owes for a late study under the pro forma LGIP 3.9 (from memory). */
export function studyDelayPenalty(
  study: DelayedStudy,
  input: DelayInput,
  rules: DelayRules = federalDelayRules,
): DelayPenalty {
  if (!rules.inForce)
    return { penaltyMinor: 0, account: 'Penalties for late studies are switched off.' }
  const extension = input.extensionAgreed ? rules.agreedExtensionBusinessDays : 0
  const late = Math.max(0, input.businessDaysLate - extension)
  const days = `${late} business day${late === 1 ? '' : 's'} late${extension > 0 ? ` after the agreed ${extension}` : ''}`
  if (late <= rules.graceBusinessDays)
    return {
      penaltyMinor: 0,
      account: `No penalty: ${days}, ${rules.graceBusinessDays} or fewer.`,
    }
  const perDay = rules.perBusinessDayMinor[study]
  const full = late * perDay
  const cap = input.depositsOfAllMinor
  const penaltyMinor = cap === null ? full : Math.min(full, cap)
  const words = `${days} × ${sayDollars(perDay)} = ${sayDollars(full)}`
  return {
    penaltyMinor,
    account:
      penaltyMinor < full
        ? `${words}, at most the study deposits of ${sayDollars(penaltyMinor)}.`
        : `${words}.`,
  }
}
