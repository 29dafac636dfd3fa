import { and, eq, gte } from 'drizzle-orm'
import type { Tx } from '@/db/client'
import { notices } from '@/db/schema/applications'
import { digestDay, digestGroup } from '@/lib/domain/digest'
import { standing } from '@/lib/domain/clocks/standing'
import { localOf } from '@/lib/domain/clocks/zoned'
import { holdersOf } from '@/lib/domain/notices'
import { sayDue } from '@/lib/domain/obligations'
import { routes } from '@/lib/routes'
import { authorize, type Context } from '@/lib/services/context'
import {
  assignedTo,
  calendarOf,
  readSweep,
  silentUntil,
  type OpenObligation,
  type Sweep,
  type SweepPerson,
} from '@/lib/services/notice-sweep-reading'
import { queueNotices, siteUrl, type QueuedNotice } from '@/lib/services/notices'
import { digestLetter, type DigestLine } from '@/templates/notices/digest'

const rung = 'digest'
const dayMs = 24 * 60 * 60 * 1000

/**
 * Queues the morning digest of everybody whose morning it is and who holds something near, missed
 * or late; once a day and person.
 * @returns how many were new
 */
export async function sweepDigests(ctx: Context): Promise<number> {
  authorize(ctx, 'notice.send')
  return ctx.db.transaction(async (tx) => {
    const told = await toldLately(ctx, tx)
    const sweep = await readSweep(tx)
    const waking = [...sweep.people.values()].flatMap((person) => {
      const day = digestDay(ctx.now, person.zone)
      return day && !told.has(`${person.id}|${day}`) ? [{ person, day }] : []
    })
    if (waking.length === 0) return 0
    const held = heldBy(sweep)
    const queued = waking.flatMap(({ person, day }) =>
      digestOf(ctx, sweep, person, day, held.get(person.id) ?? []),
    )
    return queueNotices(ctx, tx, queued)
  })
}

async function toldLately(ctx: Context, tx: Tx): Promise<Set<string>> {
  const since = new Date(ctx.now.getTime() - 2 * dayMs)
  const rows = await tx
    .select({ personId: notices.personId, day: notices.dueOn })
    .from(notices)
    .where(and(eq(notices.rung, rung), gte(notices.createdAt, since)))
  return new Set(rows.map(({ personId, day }) => `${personId}|${day}`))
}

function heldBy(sweep: Sweep): Map<string, OpenObligation[]> {
  const held = new Map<string, OpenObligation[]>()
  const people = [...sweep.people.values()]
  for (const obligation of sweep.obligations)
    for (const id of holdersOf(obligation, people, assignedTo(sweep, obligation)))
      held.set(id, [...(held.get(id) ?? []), obligation])
  return held
}

function digestOf(
  ctx: Context,
  sweep: Sweep,
  person: SweepPerson,
  day: string,
  held: readonly OpenObligation[],
): QueuedNotice[] {
  const inOrder = held.toSorted((a, b) => a.dueOn.localeCompare(b.dueOn))
  const isSilent = (one: OpenObligation) => {
    const until = silentUntil(sweep, one)
    return until !== null && localOf(ctx.now.toISOString(), one.zone).on < until
  }
  const lines = inOrder.filter((one) => !isSilent(one)).flatMap((one) => lineOf(ctx, sweep, one))
  if (lines.length === 0) return []
  const body = digestLetter({
    personName: person.name,
    today: day,
    lines,
    silentCount: inOrder.filter(isSilent).length,
    dueUrl: siteUrl(routes.due()),
  })
  const about = { subjectKind: 'person', subjectKey: person.id, dueOn: day, rung } as const
  return [{ ...about, personId: person.id, to: person.email, body }]
}

function lineOf(ctx: Context, sweep: Sweep, obligation: OpenObligation): DigestLine[] {
  const { party, title, projectName } = obligation
  const item = { ...obligation, status: 'open' as const, doneLate: null }
  const stands = standing(item, ctx.now.toISOString(), calendarOf(sweep, obligation))
  const isPast = stands.state === 'missed' || stands.state === 'theirs_late'
  if (stands.businessDays === null) return []
  const group = digestGroup({ party, isPast, businessDays: stands.businessDays })
  const due = sayDue(obligation)
  return group
    ? [{ group, left: stands.left, title, projectName: projectName ?? 'own date', due }]
    : []
}
