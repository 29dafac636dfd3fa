import type { BusinessCalendar } from '@/lib/domain/clocks/calendar'
import { businessDayFrom } from '@/lib/domain/clocks/calendar'
import {
  addDays,
  addMonths,
  dayNumber,
  fromDayNumber,
  type CivilDate,
} from '@/lib/domain/clocks/civil-date'
import type { Channel, Terms } from '@/lib/domain/clocks/facts'
import type { FactInput } from '@/lib/schemas/fact'
import type { DemoOrganization, DemoPerson } from '@/db/demo/organizations'

export type DemoFact = Omit<FactInput, 'id' | 'atSeq' | 'evidence' | 'replaces'>

/** Something that happened on a day, played through the services as that person. */
export interface DemoEvent {
  by: DemoPerson
  on: CivilDate
  /** Local hour in the organization's zone. */
  time?: string
  fact?: DemoFact
  entry?: {
    channel: Channel
    direction: 'in' | 'out'
    parties: string
    subject: string
    text: string
    visibility?: 'internal' | 'shareable'
    replyOwedBy?: 'us' | 'them'
    replyOwedOn?: CivilDate
  }
}

export interface DemoProject {
  name: string
  town: string
  latitude: number
  longitude: number
  organization: DemoOrganization['key']
  others?: { organization: DemoOrganization['key']; role: 'wires_owner' | 'affected_system' }[]
  procedure: string
  terms: Terms & { requestedMw: number; poi: string }
  requestNo?: string
  events: DemoEvent[]
  /** What the scenario says must stand open: step, round and its date as computed from today. */
  expects: { step: string; instance?: number; dueOn: CivilDate }[]
}

/** Days counted by one organization's calendar, relative to today. */
export class DemoDates {
  constructor(
    readonly today: CivilDate,
    readonly calendar: BusinessCalendar,
  ) {}

  /** The n-th business day from today; negative: back; 0: today, or the business day before. */
  day(n: number): CivilDate {
    if (n === 0) return this.open(this.today)
    return n > 0 ? this.after(this.today, n) : this.before(this.today, -n)
  }

  after(on: CivilDate, n: number): CivilDate {
    return this.walk(on, n, 1)
  }

  before(on: CivilDate, n: number): CivilDate {
    return this.walk(on, n, -1)
  }

  /** Calendar days before, on an open day. */
  daysBefore(on: CivilDate, n: number): CivilDate {
    return this.open(addDays(on, -n))
  }

  monthsBefore(on: CivilDate, n: number): CivilDate {
    return this.open(addMonths(on, -n))
  }

  /** The day itself, or the business day before it. */
  open(on: CivilDate): CivilDate {
    return businessDayFrom(this.calendar, on, -1)
  }

  private walk(on: CivilDate, n: number, step: 1 | -1): CivilDate {
    let day = dayNumber(on)
    for (let left = n; left > 0;) {
      day += step
      if (this.calendar.closedOnDay(day) === null) left -= 1
    }
    return fromDayNumber(day)
  }
}

interface Told {
  instance?: number
  time?: string
  entry?: DemoEvent['entry']
  amountMinor?: number
}

/** An event of ours, received by the utility the day it was sent. */
export function ours(
  by: DemoPerson,
  on: CivilDate,
  step: string,
  outcome: string,
  { instance = 1, amountMinor, ...event }: Told = {},
): DemoEvent {
  const fact: DemoFact = { kind: 'happened', step, outcome, instance, sentOn: on, receivedOn: on }
  return { by, on, ...event, fact: amountMinor === undefined ? fact : { ...fact, amountMinor } }
}

/** An event of the utility, which reaches us the day it was sent. */
export function theirs(on: CivilDate, step: string, outcome: string, told: Told = {}): DemoEvent {
  return ours('liaison', on, step, outcome, told)
}
