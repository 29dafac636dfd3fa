import type { BusinessCalendar } from '@/lib/domain/clocks/calendar'
import type { CivilDate } from '@/lib/domain/clocks/civil-date'
import type { DerivationLine } from '@/lib/domain/clocks/derivation'
import type { Terms } from '@/lib/domain/clocks/facts'
import type {
  Consequence,
  OwnerRole,
  PartyRole,
  RuleSource,
  StepKind,
  StepParty,
} from '@/lib/domain/clocks/procedure'

export const statuses = [
  'waiting',
  'open',
  'stopped',
  'done',
  'not_needed',
  'waived',
  'closed',
] as const
export type Status = (typeof statuses)[number]

/** How one organization on the application counts. */
export interface OrganizationRules {
  name: string
  zone: string
  /** Local `HH:MM`; null: to the end of the day. */
  closesAt: string | null
  receiptRule: 'as_is' | 'next_business_day'
  /** A letter counts as received this many calendar days after it was sent. */
  deemedReceivedDays: number | null
  calendar: BusinessCalendar
}

/** Who is on the application, by role; `operator` must be there. */
export type Parties = Partial<Record<PartyRole, OrganizationRules>> & {
  operator: OrganizationRules
}

export interface ScheduledItem {
  step: string
  instance: number
  /** Empty for the step itself. */
  obligation: string
  title: string
  /** For labels on drawings. */
  short: string | null
  stage: string
  party: StepParty
  kind: StepKind
  /** Drawn on the step line: done, running, or on the usual way ahead. */
  onLine: boolean
  ownerRole: OwnerRole | null
  consequence: Consequence
  status: Status
  /** Counted from a booked, forecast or presumed date. */
  provisional: boolean
  outcome: string | null
  startOn: CivilDate | null
  dueOn: CivilDate | null
  /**
   * ISO instant at which the day to work to closes for the receiving party: the earlier of
   * `dueOn` and `statedDueOn`.
   */
  dueAt: string | null
  zone: string
  statedDueOn: CivilDate | null
  startBy: CivilDate | null
  doneOn: CivilDate | null
  doneLate: boolean | null
  /** False: done on the due date without an hour; counted as in time. */
  hourRecorded: boolean | null
  moneyTargetMinor: number | null
  moneyHeldMinor: number | null
  source: RuleSource
  derivation: DerivationLine[]
  position: number
}

export interface Schedule {
  items: ScheduledItem[]
  terms: Terms
  /** Facts that no longer fit the procedure as it stands, shown beside the step line. */
  stranded: { factId: string; reason: string }[]
  standing: 'preparing' | 'filed' | 'in_operation' | 'withdrawn'
  stage: string
}
