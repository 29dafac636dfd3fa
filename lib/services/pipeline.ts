import { and, asc, eq, inArray } from 'drizzle-orm'
import { applications, applicationStates, obligations, projects } from '@/db/schema/applications'
import { localOf } from '@/lib/domain/clocks/zoned'
import type { ItemView, Pipeline, PipelineFilter, PipelineRow } from '@/lib/schemas/application'
import { authorize, type Context } from '@/lib/services/context'
import { holdersOf, itemView, type ObligationRow } from '@/lib/services/item-views'
import { partiesOf, type ApplicationParties } from '@/lib/services/parties'

const nearBusinessDays = 10

/** Every application with its step line, its next clock and how that stands now. */
export async function listApplications(
  ctx: Context,
  filter: PipelineFilter = {},
): Promise<Pipeline> {
  authorize(ctx, 'application.read')
  const heads = await ctx.db
    .select({ application: applications, project: projects, state: applicationStates })
    .from(applications)
    .innerJoin(projects, eq(projects.id, applications.projectId))
    .innerJoin(applicationStates, eq(applicationStates.applicationId, applications.id))
    .orderBy(asc(projects.name))
  const ids = heads.map((head) => head.application.id)
  const [parties, rows, holders] = await Promise.all([
    partiesOf(ctx.db, ids),
    obligationRows(ctx, ids),
    holdersOf(ctx.db, ids),
  ])
  const all = heads.map((head) => {
    const own = parties.get(head.application.id)!
    const items = (rows.get(head.application.id) ?? []).map((row) =>
      itemView(row, own, holders, ctx.now),
    )
    return { row: rowOf(ctx, head, own, items), items, operatorId: own.operator.id }
  })
  const shown = all.filter(({ row, operatorId }) => isShown(row, operatorId, filter))
  return {
    items: sorted(
      shown.map(({ row }) => row),
      filter.sort ?? 'next',
    ),
    totals: totalsOf(all),
  }
}

async function obligationRows(ctx: Context, ids: string[]): Promise<Map<string, ObligationRow[]>> {
  const result = new Map<string, ObligationRow[]>()
  if (ids.length === 0) return result
  const rows = await ctx.db
    .select()
    .from(obligations)
    .where(and(inArray(obligations.applicationId, ids), eq(obligations.subjectKind, 'application')))
    .orderBy(asc(obligations.position), asc(obligations.obligation))
  for (const row of rows) {
    const list = result.get(row.applicationId!) ?? []
    list.push(row)
    result.set(row.applicationId!, list)
  }
  return result
}

interface Head {
  application: typeof applications.$inferSelect
  project: typeof projects.$inferSelect
  state: typeof applicationStates.$inferSelect
}

function rowOf(
  ctx: Context,
  head: Head,
  parties: ApplicationParties,
  items: ItemView[],
): PipelineRow {
  const { terms, standing, stage } = head.state
  const next = nextClock(items)
  return {
    id: head.application.id,
    project: head.project.name,
    town: head.project.town,
    operator: parties.operator.shortName,
    requestNo: terms.requestNo ?? null,
    poi: terms.poi ?? null,
    mwAc: terms.grantedMw ?? terms.requestedMw ?? null,
    dcMw: terms.dcMw ?? null,
    standing,
    stage,
    todayOn: localOf(ctx.now.toISOString(), parties.operator.zone).on,
    line: items.filter((item) => item.onLine),
    next: next && {
      step: next.step,
      instance: next.instance,
      title: next.title,
      dueOn: next.dueOn,
      dueAt: next.dueAt,
      statedDueOn: next.statedDueOn,
      zone: next.zone,
      closesAt: parties.operator.closesAt,
      standing: next.standing,
      party: next.party,
    },
  }
}

/** Ours before theirs, the earliest first; without a dated one, the first that is open. */
export function nextClock(items: readonly ItemView[]): ItemView | null {
  const open = items.filter(
    (item) => item.obligation === '' && item.status === 'open' && begun(item),
  )
  const dated = open.filter((item) => item.dueAt !== null)
  const byDue = [...dated].sort((a, b) => (a.dueAt! < b.dueAt! ? -1 : 1))
  const ours = (item: ItemView) => item.party === 'applicant' || item.party === 'both'
  return byDue.find(ours) ?? byDue[0] ?? open.find(ours) ?? open[0] ?? null
}

function begun(item: ItemView): boolean {
  return item.standing.state !== 'not_begun' && item.onLine
}

function isShown(row: PipelineRow, operatorId: string, filter: PipelineFilter): boolean {
  const wanted = filter.standing ?? 'open'
  const open = row.standing === 'preparing' || row.standing === 'filed'
  if (wanted !== 'all' && (wanted === 'open' ? !open : row.standing !== wanted)) return false
  if (filter.organization && filter.organization !== operatorId) return false
  const words = filter.find?.toLowerCase()
  if (!words) return true
  return [row.project, row.requestNo, row.poi, row.town, row.operator].some((text) =>
    text?.toLowerCase().includes(words),
  )
}

function sorted(rows: PipelineRow[], by: NonNullable<PipelineFilter['sort']>): PipelineRow[] {
  const far = '9999'
  const key = (row: PipelineRow): string => {
    if (by === 'project') return row.project
    if (by === 'operator') return row.operator
    const theirs = row.next?.standing.tone === 'theirs' ? '1' : '0'
    return row.next?.dueAt
      ? `${row.next.standing.tone === 'missed' ? '' : theirs}${row.next.dueAt}`
      : far
  }
  if (by === 'mwAc') return [...rows].sort((a, b) => (b.mwAc ?? 0) - (a.mwAc ?? 0))
  return [...rows].sort(
    (a, b) => key(a).localeCompare(key(b)) || a.project.localeCompare(b.project),
  )
}

function totalsOf(all: { row: PipelineRow; items: ItemView[] }[]): Pipeline['totals'] {
  const open = all.filter(({ row }) => row.standing === 'preparing' || row.standing === 'filed')
  const ours = open.flatMap(({ items }) =>
    items.filter(
      (item) =>
        item.obligation === '' &&
        (item.standing.state === 'running' || item.standing.state === 'missed'),
    ),
  )
  return {
    open: open.length,
    filed: open.filter(({ row }) => row.standing === 'filed').length,
    mwAc: Math.round(open.reduce((sum, { row }) => sum + (row.mwAc ?? 0), 0) * 1000) / 1000,
    owedInTenDays: ours.filter((item) => (item.standing.businessDays ?? 99) <= nearBusinessDays)
      .length,
    missed: ours.filter((item) => item.standing.state === 'missed').length,
  }
}
