import { eq } from 'drizzle-orm'
import { people } from '@/db/schema/people'
import { addDays } from '@/lib/domain/clocks/civil-date'
import { formatHour } from '@/lib/domain/format-date'
import { localOf } from '@/lib/domain/clocks/zoned'
import type { CalendarEvent } from '@/lib/schemas/calendar-event'
import { recordAudit } from '@/lib/services/audit'
import { allEvents } from '@/lib/services/calendar-events'
import { authorize, personOf, type Context } from '@/lib/services/context'
import { hashOfSecret, newSecret } from '@/lib/services/secrets'

/** Whether the person has a private calendar address; the address itself is shown only once. */
export async function getCalendarAddress(ctx: Context): Promise<{ made: boolean; address: null }> {
  authorize(ctx, 'calendar.feed')
  const [row] = await ctx.db
    .select({ hash: people.calendarSecretHash })
    .from(people)
    .where(eq(people.id, personOf(ctx).id))
  return { made: Boolean(row?.hash), address: null }
}

/** Makes a new private address; an earlier one stops working. The secret is shown this once. */
export async function makeCalendarAddress(ctx: Context): Promise<{ made: true; secret: string }> {
  authorize(ctx, 'calendar.feed')
  const person = personOf(ctx)
  const secret = newSecret()
  await ctx.db.transaction(async (tx) => {
    await tx
      .update(people)
      .set({ calendarSecretHash: hashOfSecret(secret) })
      .where(eq(people.id, person.id))
    await recordAudit(ctx, tx, {
      action: 'calendar.address',
      subjectKind: 'person',
      subjectId: person.id,
    })
  })
  return { made: true, secret }
}

/** Ends the private address. */
export async function endCalendarAddress(ctx: Context): Promise<void> {
  authorize(ctx, 'calendar.feed')
  const person = personOf(ctx)
  await ctx.db.transaction(async (tx) => {
    await tx.update(people).set({ calendarSecretHash: null }).where(eq(people.id, person.id))
    await recordAudit(ctx, tx, {
      action: 'calendar.address_ended',
      subjectKind: 'person',
      subjectId: person.id,
    })
  })
}

export interface FeedEvent {
  uid: string
  on: string
  untilOn: string
  summary: string
  description: string
  applicationId: string
}

/** What the private calendar shows, one day an entry. */
export async function readCalendarFeed(ctx: Context): Promise<FeedEvent[]> {
  authorize(ctx, 'calendar.feed')
  const todayOn = localOf(ctx.now.toISOString(), personOf(ctx).zone).on
  const events = await allEvents(ctx, todayOn)
  return events.filter(({ event }) => event.entry !== 'open').map(({ event }) => feedEvent(event))
}

function feedEvent(event: CalendarEvent): FeedEvent {
  const theirs = event.party !== 'applicant' && event.party !== 'both'
  const hour =
    event.hasHour && event.dueAt && event.entry === 'due'
      ? `, ${formatHour(event.dueAt, event.zone)}`
      : ''
  const round = event.instance > 1 ? `, round ${event.instance}` : ''
  const lead = event.entry === 'start_by' ? 'Start: ' : theirs ? `${event.organization} owes: ` : ''
  return {
    uid: `${event.key}@lineside`,
    on: event.on,
    untilOn: addDays(event.on, 1),
    summary: `${event.project}: ${lead}${event.title}${round}${hour}${event.provisional ? ' (provisional)' : ''}`,
    description: [
      event.requestNo ?? 'not filed yet',
      event.organization,
      `If missed: ${event.say}`,
    ].join('\n'),
    applicationId: event.applicationId,
  }
}
