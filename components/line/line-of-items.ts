import { workingDue } from '@/lib/domain/clocks/working-due'
import { formatShortDate } from '@/lib/domain/format-date'
import type { LineClock, LineModel, LineParty, LineState, LineStep } from '@/components/line/model'

/** What the line reads of an obligation as it stands now; an application's items fit it. */
export interface LineSource {
  step: string
  instance: number
  /** Empty for the step itself, else the part of it. */
  obligation: string
  title: string
  short: string | null
  party: string
  kind: string
  onLine: boolean
  status: string
  startOn: string | null
  dueOn: string | null
  statedDueOn?: string | null
  doneOn: string | null
  doneLate: boolean | null
  provisional: boolean
  standing: { state: string; businessDays: number | null }
}

export interface LineExtras {
  /** The clock drawn as a dimension line. */
  running?: LineClock
  /** Said beside the drawing, such as "Times are Mountain prevailing". */
  zoneNote?: string
}

/**
 * The step line of an application from its items in drawing order. Dates are civil dates in the
 * utility's zone, worded against `todayOn`. What a later step overtook without a record of its own
 * has no date to stand at and is left to the clocks.
 */
export function lineModelOf(
  items: readonly LineSource[],
  todayOn: string,
  extras: LineExtras = {},
): LineModel {
  const steps = items.filter(
    (item) => item.obligation === '' && item.onLine && item.status !== 'closed',
  )
  const repeated = new Set(steps.filter((item) => item.instance > 1).map((item) => item.step))
  return {
    steps: steps.map((item) => ({
      ...stepOf(item, todayOn),
      ...(repeated.has(item.step) && { repeated: true }),
      ...(item.kind === 'gate' && { obligations: partsOf(items, item) }),
    })),
    todayOn,
    ...extras,
  }
}

function stepOf(item: LineSource, todayOn: string): LineStep {
  const state = lineStateOf(item)
  const on = lineDateOf(item)
  return {
    key: item.step,
    instance: item.instance,
    title: item.title,
    ...(item.short !== null && { shortTitle: item.short }),
    party: linePartyOf(item.party),
    kind: item.kind === 'gate' ? 'gate' : 'step',
    state,
    ...(on !== null && { on, onLabel: dateLabel(item, state, on, todayOn) }),
    ...(item.provisional && { forecast: true }),
    ...(item.party === 'affected_system' && { tap: true }),
  }
}

/** Whose switch it is: ours a round contact, theirs a square. */
export function linePartyOf(party: string): LineParty {
  if (party === 'applicant') return 'ours'
  return party === 'both' ? 'both' : 'theirs'
}

/** How the switch of a step is drawn. Only what we missed carries a flag; theirs runs over. */
export function lineStateOf(item: Pick<LineSource, 'status' | 'dueOn' | 'standing'>): LineState {
  switch (item.status) {
    case 'done':
      return 'done'
    case 'waived':
      return 'waived'
    case 'not_needed':
    case 'closed':
      return 'not_needed'
    case 'stopped':
      return 'open'
    case 'open':
      if (item.standing.state === 'missed') return 'missed'
      if (item.standing.state === 'not_begun') return 'ahead'
      return item.standing.businessDays === null ? 'open' : 'running'
    default:
      return 'ahead'
  }
}

function lineDateOf(item: LineSource): string | null {
  if (item.status === 'done' || item.status === 'waived') return item.doneOn
  if (item.status === 'closed' || item.status === 'not_needed') return null
  return workingDueOf(item)
}

/** People work to the earlier of our count and the date the utility states. */
export function workingDueOf(item: Pick<LineSource, 'dueOn' | 'statedDueOn'>): string | null {
  return workingDue({ dueOn: item.dueOn, statedDueOn: item.statedDueOn ?? null })
}

function dateLabel(item: LineSource, state: LineState, on: string, todayOn: string): string {
  const date = formatShortDate(on, todayOn)
  if (state === 'done') return item.doneLate ? `${date}, late` : date
  if (state === 'waived') return `${date}, waived`
  if (item.status === 'stopped') return `${date}, stopped`
  const over = -(item.standing.businessDays ?? 0)
  if (item.standing.state === 'theirs_late') return `due ${date}, ${over} BD over`
  if (item.standing.state === 'presumed') return `${date}, presumed`
  if (state === 'missed') return `due ${date}, missed`
  return item.provisional ? `${date}, provisional` : `due ${date}`
}

function partsOf(items: readonly LineSource[], step: LineSource): LineStep['obligations'] {
  return items
    .filter(
      (item) =>
        item.obligation !== '' && item.step === step.step && item.instance === step.instance,
    )
    .map((item) => ({
      title: item.title,
      done: item.status === 'done' || item.status === 'waived',
    }))
}
