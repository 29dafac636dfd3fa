import {
  gatePercents,
  readinessAtRequest,
  studyDeposit,
} from '@/lib/domain/clocks/library/cluster-money'
import { noticeDuty, withdrawn } from '@/lib/domain/clocks/library/step-of'
import type { ClockRule, Consequence, MoneyRule, Roll } from '@/lib/domain/clocks/procedure'

/** Where utilities' versions of the cluster process differ; left out: the pro forma. */
export interface ClusterOptions {
  key?: string
  title?: string
  /** Calendar days that the request window is open. */
  windowDays?: number
  /** Whether a deadline in calendar days rolls off a closed day; never in the pro forma. */
  calendarRoll?: Roll
  applicationFeeMinor?: number
  studyDeposit?: MoneyRule
  readiness?: MoneyRule
  /** Percent of assigned cost to reach at each gate. */
  gatePercents?: { gate1: number; gate2: number; gate3: number }
  /** Business days to cure a deficient request. */
  cureDays?: number
  /** Business days to cure after a notice of withdrawal. */
  noticeCureDays?: number
  cureMissed?: Consequence
  gateMissed?: Consequence
  /** Whether late studies cost the utility a penalty: challenged in court. */
  delayPenalties?: boolean
  /** `draft`: 60 calendar days from the draft; `final`: 15 business days from the final text. */
  signFrom?: 'draft' | 'final'
  /** Calendar days before the utility's work by which security is posted. */
  securityDays?: number
  /** Business days that a wire or a letter of credit takes. */
  depositLeadDays?: number
  affectedDepositMinor?: number
}

export interface ClusterRules extends Required<
  Omit<ClusterOptions, 'calendarRoll' | 'affectedDepositMinor'>
> {
  affectedDepositMinor: number | null
  /** A clock in calendar days, rolled as this utility rolls. */
  calendarDays(length: number, more?: Partial<ClockRule>): ClockRule
  /** What follows a late study. */
  late(perBusinessDay: string): Consequence
}

/** The options with the pro forma where nothing is given. */
export function clusterRules(options: ClusterOptions): ClusterRules {
  const roll = options.calendarRoll ? { roll: options.calendarRoll } : {}
  const delayPenalties = options.delayPenalties ?? true
  return {
    key: options.key ?? 'federal_cluster',
    title: options.title ?? 'Large generator, cluster process',
    windowDays: options.windowDays ?? 45,
    applicationFeeMinor: options.applicationFeeMinor ?? 500_000,
    studyDeposit: options.studyDeposit ?? studyDeposit,
    readiness: options.readiness ?? readinessAtRequest,
    gatePercents: options.gatePercents ?? gatePercents,
    cureDays: options.cureDays ?? 10,
    noticeCureDays: options.noticeCureDays ?? 15,
    cureMissed: options.cureMissed ?? noCure,
    gateMissed:
      options.gateMissed ?? withdrawn('Call the queue desk, then post what is open today.'),
    delayPenalties,
    signFrom: options.signFrom ?? 'draft',
    securityDays: options.securityDays ?? 30,
    depositLeadDays: options.depositLeadDays ?? 5,
    affectedDepositMinor: options.affectedDepositMinor ?? null,
    calendarDays: (length, more = {}) => ({ length, unit: 'calendar_day', ...roll, ...more }),
    late: (perBusinessDay) => (delayPenalties ? latePenalty(perBusinessDay) : noticeDuty),
  }
}

const noCure: Consequence = {
  effect: 'withdrawn',
  say: 'Withdrawn without a further cure: the fee is lost, both deposits come back.',
  first: 'Supply what can be supplied before the hour closes, and write which item is left.',
}

/** Source: pro forma LGIP 3.9 (from memory). */
function latePenalty(perBusinessDay: string): Consequence {
  return {
    effect: 'penalty',
    say: `They owe ${perBusinessDay} per business day, once more than 10 late and then from the first.`,
    first: 'Ask for the reason and a new date, and note the days late.',
  }
}
