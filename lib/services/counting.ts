import { asc, desc, eq, or } from 'drizzle-orm'
import { calendarRevisions, calendars } from '@/db/schema/organizations'
import type { BusinessCalendar } from '@/lib/domain/clocks/calendar'
import { count } from '@/lib/domain/clocks/count'
import { federalCalendar } from '@/lib/domain/clocks/library-calendars'
import type { CountAnswer, CountInputBody } from '@/lib/schemas/count'
import { authorize, type Context } from '@/lib/services/context'
import { invalid } from '@/lib/services/errors'
import { calendarOf } from '@/lib/services/parties'
import { isUuid } from '@/lib/services/uuid'

/** Counts a clock by any calendar, with its account. @throws ServiceError `invalid`. */
export async function countClock(ctx: Context, input: CountInputBody): Promise<CountAnswer> {
  authorize(ctx, 'clock.count')
  const { calendar: wanted, ...rest } = input
  const calendar = await findCalendar(ctx, wanted ?? 'federal')
  const { dueOn, derivation, account } = count(rest, calendar)
  return { dueOn, derivation, account }
}

/** The calendars a count may go by: the federal one, then the organizations'. */
export async function listCalendarChoices(ctx: Context): Promise<{ key: string; name: string }[]> {
  authorize(ctx, 'calendar.read')
  const rows = await ctx.db
    .select({ key: calendars.key, name: calendars.name })
    .from(calendars)
    .orderBy(asc(calendars.name))
  const others = rows.filter((row) => row.key !== 'federal')
  return [{ key: 'federal', name: federalCalendar.name }, ...others]
}

async function findCalendar(ctx: Context, wanted: string): Promise<BusinessCalendar> {
  if (wanted === 'federal') return federalCalendar
  const [found] = await ctx.db
    .select({ calendar: calendars, revision: calendarRevisions })
    .from(calendars)
    .innerJoin(calendarRevisions, eq(calendarRevisions.calendarId, calendars.id))
    .where(or(eq(calendars.key, wanted), isUuid(wanted) ? eq(calendars.id, wanted) : undefined))
    .orderBy(desc(calendarRevisions.no))
    .limit(1)
  if (!found)
    throw invalid([
      {
        path: 'calendar',
        message: `Found "${wanted}"; allowed are federal and the id or key of a calendar.`,
      },
    ])
  return calendarOf(found.revision, found.calendar.name)
}
