import { and, eq, inArray } from 'drizzle-orm'
import { applications, applicationStates, obligations, projects } from '@/db/schema/applications'
import { addDays, weekdayOf } from '@/lib/domain/clocks/civil-date'
import { startStanding, type Standing } from '@/lib/domain/clocks/standing'
import { workingDue } from '@/lib/domain/clocks/working-due'
import { localOf } from '@/lib/domain/clocks/zoned'
import type { Due, DueFilter, DueRow } from '@/lib/schemas/application'
import { authorize, personOf, type Context } from '@/lib/services/context'
import { holdersOf, itemView, organizationFor } from '@/lib/services/item-views'
import { partiesOf } from '@/lib/services/parties'

/** What is owed: by the person, by us, by the utilities; nearest first. */
export async function listDue(ctx: Context, filter: DueFilter = {}): Promise<Due> {
  authorize(ctx, 'obligation.read')
  const person = personOf(ctx)
  const todayOn = localOf(ctx.now.toISOString(), person.zone).on
  const rows = (await dueRows(ctx, todayOn)).filter(
    (row) => !filter.organization || row.organizationId === filter.organization,
  )
  const isMine = (row: DueRow) =>
    isOurs(row) &&
    (row.owner
      ? row.owner.id === person.id
      : row.ownerRole !== null && person.roles.includes(row.ownerRole))
  const scopes = {
    mine: rows.filter(({ row }) => isMine(row)),
    ours: rows.filter(({ row }) => isOurs(row)),
    theirs: rows.filter(({ row }) => !isOurs(row)),
  }
  return {
    rows: scopes[filter.scope ?? 'mine'].map(({ row }) => row),
    counts: { mine: scopes.mine.length, ours: scopes.ours.length, theirs: scopes.theirs.length },
    todayOn,
  }
}

function isOurs(row: DueRow): boolean {
  return row.party === 'applicant' || row.party === 'both'
}

async function dueRows(
  ctx: Context,
  todayOn: string,
): Promise<{ row: DueRow; organizationId: string }[]> {
  const found = await ctx.db
    .select({ obligation: obligations, project: projects.name, state: applicationStates })
    .from(obligations)
    .innerJoin(applications, eq(applications.id, obligations.applicationId))
    .innerJoin(projects, eq(projects.id, applications.projectId))
    .innerJoin(applicationStates, eq(applicationStates.applicationId, applications.id))
    .where(and(inArray(obligations.status, ['open', 'stopped'])))
  const ids = [...new Set(found.map((one) => one.obligation.applicationId!))]
  const [parties, holders] = await Promise.all([partiesOf(ctx.db, ids), holdersOf(ctx.db, ids)])
  return found
    .flatMap(({ obligation, project, state }) => {
      const own = parties.get(obligation.applicationId!)!
      const item = itemView(obligation, own, holders, ctx.now)
      const { calendar } = organizationFor(own, obligation.party)
      const base = {
        ...item,
        applicationId: obligation.applicationId!,
        project,
        requestNo: state.terms.requestNo ?? null,
        operator: own.operator.shortName,
        closesAt: own.operator.closesAt,
      }
      const organizationId = own.operator.id
      const left = () => startStanding(item.startBy!, item.zone, ctx.now.toISOString(), calendar)
      const due =
        item.obligation === '' && workingDue(item)
          ? [{ row: dueRow(base, todayOn), organizationId }]
          : []
      const start =
        item.startBy && item.obligation !== '' && item.status === 'open'
          ? [{ row: startRow(base, todayOn, left), organizationId }]
          : []
      return [...due, ...start]
    })
    .sort((a, b) => a.row.on.localeCompare(b.row.on) || a.row.project.localeCompare(b.row.project))
}

type Base = Omit<DueRow, 'rowKind' | 'on' | 'group'>

function dueRow(base: Base, todayOn: string): DueRow {
  const on = workingDue(base)!
  const missed = base.standing.state === 'missed' || base.standing.state === 'theirs_late'
  return { ...base, rowKind: 'due', on, group: missed ? 'missed' : groupOf(on, todayOn) }
}

/** A late start is no missed clock: it stands first in this week, with the days it is late. */
function startRow(base: Base, todayOn: string, left: () => Standing): DueRow {
  const on = base.startBy!
  return { ...base, rowKind: 'start_by', on, standing: left(), group: groupOf(on, todayOn) }
}

/** Weeks run Monday to Sunday, as a reader's week does. */
function groupOf(on: string, todayOn: string): DueRow['group'] {
  const sunday = addDays(todayOn, (7 - weekdayOf(todayOn)) % 7)
  if (on <= sunday) return 'this_week'
  return on <= addDays(sunday, 7) ? 'next_week' : 'later'
}
