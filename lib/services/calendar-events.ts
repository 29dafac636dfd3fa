import { and, eq, inArray, isNotNull } from 'drizzle-orm'
import { applications, applicationStates, obligations, projects } from '@/db/schema/applications'
import {
  daysBetween,
  dayNumber,
  fromDayNumber,
  type CivilDate,
} from '@/lib/domain/clocks/civil-date'
import { workingDue } from '@/lib/domain/clocks/working-due'
import { localOf } from '@/lib/domain/clocks/zoned'
import type {
  CalendarAnswer,
  CalendarEvent,
  CalendarFilter,
  ClosedDay,
} from '@/lib/schemas/calendar-event'
import { authorize, personOf, type Context } from '@/lib/services/context'
import { invalid } from '@/lib/services/errors'
import { holdersOf, itemView } from '@/lib/services/item-views'
import { organizationParties, partiesOf, type OrganizationParty } from '@/lib/services/parties'

const longestRangeDays = 800

/** What is owed between two days, and the days that organizations do not count. */
export async function listCalendarEvents(
  ctx: Context,
  filter: CalendarFilter,
): Promise<CalendarAnswer> {
  authorize(ctx, 'calendar.read')
  const days = daysBetween(filter.from, filter.to)
  if (days < 0 || days > longestRangeDays)
    throw invalid([
      {
        path: 'to',
        message: `Found ${days} days; allowed are 0 to ${longestRangeDays} after "from".`,
      },
    ])
  const todayOn = localOf(ctx.now.toISOString(), personOf(ctx).zone).on
  const all = await allEvents(ctx, todayOn)
  const wanted = filter.organizations?.split(',').filter(Boolean)
  const shown = all.filter(
    ({ event, organizationId }) =>
      event.on >= filter.from &&
      event.on <= filter.to &&
      (!wanted || wanted.includes(organizationId)) &&
      (!filter.side || (filter.side === 'ours') === isOurs(event)) &&
      (!filter.project || filter.project === event.applicationId),
  )
  const running = new Set(all.map((one) => one.organizationId))
  const parties = [...(await organizationParties(ctx.db)).values()].filter((one) =>
    running.has(one.id),
  )
  const counted = parties.filter((one) => !wanted || wanted.includes(one.id))
  return {
    events: shown.map(({ event }) => event),
    closedDays: closedDays(counted, filter.from, filter.to),
    organizations: parties
      .map(({ id, shortName }) => ({ id, name: shortName }))
      .sort((a, b) => a.name.localeCompare(b.name)),
    todayOn,
  }
}

function isOurs(event: CalendarEvent): boolean {
  return event.party === 'applicant' || event.party === 'both'
}

/** Every dated open obligation as a calendar entry; a missed one stands on today as well. */
export async function allEvents(
  ctx: Context,
  todayOn: CivilDate,
): Promise<{ event: CalendarEvent; organizationId: string }[]> {
  authorize(ctx, 'calendar.read')
  const rows = await ctx.db
    .select({ obligation: obligations, project: projects.name, state: applicationStates })
    .from(obligations)
    .innerJoin(applications, eq(applications.id, obligations.applicationId))
    .innerJoin(projects, eq(projects.id, applications.projectId))
    .innerJoin(applicationStates, eq(applicationStates.applicationId, applications.id))
    .where(and(inArray(obligations.status, ['open', 'stopped']), isNotNull(obligations.dueAt)))
  const ids = [...new Set(rows.map((row) => row.obligation.applicationId!))]
  const [parties, holders] = await Promise.all([partiesOf(ctx.db, ids), holdersOf(ctx.db, ids)])
  return rows
    .flatMap(({ obligation, project, state }) => {
      const own = parties.get(obligation.applicationId!)!
      const item = itemView(obligation, own, holders, ctx.now)
      const base = {
        applicationId: obligation.applicationId!,
        project,
        requestNo: state.terms.requestNo ?? null,
        organization: own.operator.shortName,
        step: item.step,
        instance: item.instance,
        title: item.title,
        party: item.party,
        kind: item.kind,
        dueAt: item.dueAt,
        zone: item.zone,
        hasHour:
          own.operator.closesAt !== null && (item.party === 'applicant' || item.party === 'both'),
        provisional: item.provisional,
        say: item.consequence.say,
        standing: item.standing,
      }
      const make = (entry: CalendarEvent['entry'], on: CivilDate) => ({
        event: {
          ...base,
          key: `${base.applicationId}:${item.step}:${item.instance}:${item.obligation}:${entry}`,
          entry,
          on,
        },
        organizationId: own.operator.id,
      })
      if (item.obligation !== '') return item.startBy ? [make('start_by', item.startBy)] : []
      const dueOn = workingDue(item)!
      const missed = item.standing.state === 'missed' && dueOn < todayOn
      return missed ? [make('due', dueOn), make('open', todayOn)] : [make('due', dueOn)]
    })
    .sort(
      (a, b) =>
        a.event.on.localeCompare(b.event.on) || a.event.project.localeCompare(b.event.project),
    )
}

/** The days of a range on which some or all of these organizations are closed. */
export function closedDays(
  parties: readonly OrganizationParty[],
  from: CivilDate,
  to: CivilDate,
): ClosedDay[] {
  const days: ClosedDay[] = []
  for (let day = dayNumber(from); day <= dayNumber(to); day += 1) {
    const reasons = parties.map((party) => ({
      name: party.shortName,
      why: party.calendar.closedOnDay(day),
    }))
    const closed = reasons.filter((one) => one.why !== null)
    if (closed.length === 0) continue
    const names = [...new Set(closed.map((one) => one.why!))]
    const weekend = names.every((name) => name === 'Saturday' || name === 'Sunday')
    days.push({
      on: fromDayNumber(day),
      all: closed.length === reasons.length,
      closed: weekend ? [] : closed.map((one) => one.name),
      name: !weekend && names.length === 1 ? names[0]! : null,
    })
  }
  return days
}
