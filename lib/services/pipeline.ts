import { and, asc, eq, inArray } from 'drizzle-orm'
import { applications, applicationStates, obligations, projects } from '@/db/schema/applications'
import { localOf } from '@/lib/domain/clocks/zoned'
import type {
  ItemView,
  LineItem,
  Pipeline,
  PipelineFilter,
  PipelineRow,
} from '@/lib/schemas/application'
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
    return { row: rowOf(ctx, head, own, items), items, operator: own.operator }
  })
  const shown = all.filter(({ row, operator }) => isShown(row, operator.id, filter))
  return {
    items: sorted(
      shown.map(({ row }) => row),
      filter,
    ),
    organizations: organizationsOf(all.map(({ operator }) => operator)),
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
    line: items.filter((item) => item.onLine).map(lineItem),
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

/** Rows of a hundred applications go over the wire: only what the drawing reads. */
function lineItem(item: ItemView): LineItem {
  const { step, instance, obligation, title, short, party, kind, onLine } = item
  const { status, startOn, dueOn, doneOn, doneLate, provisional, standing } = item
  const drawn = { step, instance, obligation, title, short, party, kind, onLine }
  return { ...drawn, status, startOn, dueOn, doneOn, doneLate, provisional, standing }
}

function organizationsOf(operators: { id: string; name: string }[]): Pipeline['organizations'] {
  const byId = new Map(operators.map(({ id, name }) => [id, { id, name }]))
  return [...byId.values()].sort((a, b) => a.name.localeCompare(b.name))
}

/** Ours before theirs, the earliest first; without a dated one, the first that is open. */
export function nextClock(items: readonly ItemView[]): ItemView | null {
  const open = items.filter(
    (item) => item.obligation === '' && item.status === 'open' && begun(item),
  )
  const dated = open.filter((item) => item.dueAt !== null)
  const byDue = [...dated].sort((a, b) => (a.dueAt! < b.dueAt! ? -1 : 1))
  const ours = (item: ItemView) => item.party === 'applicant' || item.party === 'both'
  // What is presumed waits for nobody: the clock that runs behind it comes first.
  const runs = byDue.find((item) => item.standing.state !== 'presumed')
  return byDue.find(ours) ?? runs ?? byDue[0] ?? open.find(ours) ?? open[0] ?? null
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

function sorted(rows: PipelineRow[], { sort = 'next', order }: PipelineFilter): PipelineRow[] {
  const turn = (order ?? (sort === 'mwAc' ? 'desc' : 'asc')) === 'asc' ? 1 : -1
  return [...rows].sort(
    (a, b) => turn * compareBy(sort, a, b) || a.project.localeCompare(b.project),
  )
}

type SortKey = NonNullable<PipelineFilter['sort']>

function compareBy(sort: SortKey, a: PipelineRow, b: PipelineRow): number {
  if (sort === 'mwAc') return (a.mwAc ?? 0) - (b.mwAc ?? 0)
  if (sort === 'next') return compareText(urgency(a), urgency(b))
  return a[sort].localeCompare(b[sort])
}

function compareText(a: string, b: string): number {
  return a < b ? -1 : a > b ? 1 : 0
}

/** What we missed, then what we owe by its hour, then what they owe, then what has no date. */
function urgency({ next }: PipelineRow): string {
  if (!next?.dueAt) return '3'
  const rank = { missed: '0', theirs: '2' }[next.standing.tone as string] ?? '1'
  return `${rank}${next.dueAt}`
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
