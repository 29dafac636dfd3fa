import { demoCalendars, type DemoCalendar } from '@/db/demo/calendars'
import { demoOrganizations } from '@/db/demo/organizations'
import { businessCalendar } from '@/lib/domain/clocks/calendar'
import type { Fact } from '@/lib/domain/clocks/facts'
import type { ProcedureBody } from '@/lib/domain/clocks/procedure'
import { schedule } from '@/lib/domain/clocks/schedule'
import type { OrganizationRules, Parties, ScheduledItem } from '@/lib/domain/clocks/schedule-types'

/** A calendar of the demonstration, compiled. */
export const calendarOf = (key: DemoCalendar) =>
  businessCalendar(demoCalendars[key].name, demoCalendars[key].rules)

/** How an invented organization counts. */
export function rulesOf(key: 'ave' | 'cbto' | 'dml' | 'tfec'): OrganizationRules {
  const { name, zone, closesAt, receiptRule, deemedReceivedDays, calendar } =
    demoOrganizations.find((one) => one.key === key)!
  return { name, zone, closesAt, receiptRule, deemedReceivedDays, calendar: calendarOf(calendar) }
}

export const partiesOf = (key: 'ave' | 'cbto' | 'dml' | 'tfec'): Parties => ({
  operator: rulesOf(key),
})

export type Told = Partial<Fact> & { kind?: Fact['kind'] }

/** Facts numbered in the order told; `f1` is the first. */
export function told(...statements: Told[]): Fact[] {
  return statements.map((statement, at) => ({
    id: `f${at + 1}`,
    seq: at + 1,
    kind: 'happened',
    instance: 1,
    body: {},
    recordedAt: '2026-01-01T00:00:00Z',
    ...statement,
  }))
}

/** An event received on a day. */
export const on = (receivedOn: string, step: string, outcome?: string, more: Told = {}): Told => ({
  step,
  receivedOn,
  ...(outcome !== undefined && { outcome }),
  ...more,
})

/** One item of a schedule. */
export function itemOf(
  body: ProcedureBody,
  parties: Parties,
  facts: readonly Fact[],
  step: string,
  instance = 1,
  obligation = '',
): ScheduledItem {
  const found = schedule(body, parties, facts).items.find(
    (one) => one.step === step && one.instance === instance && one.obligation === obligation,
  )
  if (!found) throw new Error(`No item ${step}#${instance} ${obligation}`)
  return found
}
