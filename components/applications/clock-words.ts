import { workingDueOf } from '@/components/line/line-of-items'
import { civilDateAt, formatDate, formatHour } from '@/lib/domain/format-date'
import type { ItemView } from '@/lib/schemas/application'
import type { Tone } from '@/components/ui/state-word'
import type { LeftTone } from '@/components/ui/left-figure'

/** The key of a clock in addresses: `cure~2`, `gate~1~deposit`. */
export function clockKey(item: Pick<ItemView, 'step' | 'instance' | 'obligation'>): string {
  const { step, instance, obligation } = item
  return [step, String(instance), ...(obligation === '' ? [] : [obligation])].join('~')
}

const partyWords: Record<ItemView['party'], string> = {
  applicant: 'ours',
  operator: 'the utility',
  wires_owner: 'the wires owner',
  affected_system: 'the affected system',
  load_utility: 'the load utility',
  regulator: 'the regulator',
  both: 'both sides',
  other: 'others',
}

/** Whose move a step is. */
export function whoseWords(party: ItemView['party']): string {
  return partyWords[party]
}

/** Whether the step is ours to close, alone or with them. */
export function isOurs(item: Pick<ItemView, 'party'>): boolean {
  return item.party === 'applicant' || item.party === 'both'
}

interface StateWords {
  tone: Tone
  text: string
}

/** The state of a clock in words, with the tone it is said in. */
export function stateWords(item: Pick<ItemView, 'standing' | 'outcome'>): StateWords {
  const words: Record<ItemView['standing']['state'], StateWords> = {
    missed: { tone: 'missed', text: 'missed' },
    theirs_late: { tone: 'theirs', text: 'they are late' },
    presumed: { tone: 'theirs', text: 'presumed, to be confirmed' },
    running: { tone: item.standing.tone === 'soon' ? 'soon' : 'plain', text: 'running' },
    theirs_running: { tone: 'theirs', text: 'with them' },
    undated: { tone: 'plain', text: 'open, no date' },
    not_begun: { tone: 'far', text: 'not begun' },
    stopped: { tone: 'soon', text: 'clock stopped' },
    done: { tone: 'done', text: 'done' },
    done_late: { tone: 'done', text: 'done late' },
    waived: { tone: 'done', text: 'waived' },
    closed: { tone: 'far', text: 'closed' },
    waiting: { tone: 'far', text: 'waits' },
    not_needed: { tone: 'far', text: 'not needed' },
  }
  return words[item.standing.state]
}

/** The tone of a left figure; null where no time is left to speak of. */
export function leftTone(item: Pick<ItemView, 'standing'>): LeftTone | null {
  const { tone } = item.standing
  return tone === 'done' || tone === 'none' ? null : tone
}

/** The figure of time left as a table shows it: their side is named by color and column already. */
export function leftWords(item: Pick<ItemView, 'standing'>): string {
  return item.standing.left.replace(/^theirs, /, '')
}

/** "Thu 10 Dec, 5 pm MT": the date worked to with its closing hour; end of day has no hour. */
export function dueWords(
  item: Pick<ItemView, 'dueOn' | 'statedDueOn' | 'dueAt' | 'zone'>,
  todayOn: string,
): string | null {
  const on = workingDueOf(item)
  if (!on) return null
  const date = formatDate(on, todayOn)
  const endsWithDay = item.dueAt !== null && civilDateAt(item.dueAt, item.zone) !== on
  return item.dueAt && !endsWithDay ? `${date}, ${formatHour(item.dueAt, item.zone)}` : date
}

/** "Mountain prevailing": how the drawing names the zone of its times. */
export function zoneWords(zone: string): string {
  const names: Record<string, string> = {
    'America/New_York': 'Eastern prevailing',
    'America/Chicago': 'Central prevailing',
    'America/Denver': 'Mountain prevailing',
    'America/Los_Angeles': 'Pacific prevailing',
    'America/Phoenix': 'Mountain standard',
  }
  return names[zone] ?? zone.replaceAll('_', ' ')
}

/** "Mountain time", beside an hour that is typed. */
export function zoneTimeWords(zone: string): string {
  return `${zoneWords(zone).replace(' prevailing', '')} time`
}

/** What a recorded fact moved: the first clock of ours that opened or got another date, else theirs. */
export function movedWords(
  before: readonly ItemView[],
  after: readonly ItemView[],
  todayOn: string,
): string {
  const old = new Map(before.map((item) => [clockKey(item), item]))
  const moved = after.filter((item) => {
    const was = old.get(clockKey(item))
    const due = workingDueOf(item)
    if (item.obligation !== '' || item.status !== 'open' || due === null || !item.onLine)
      return false
    return was?.status !== 'open' || workingDueOf(was) !== due
  })
  const first = moved.find(isOurs) ?? moved[0]
  if (!first) return 'No due date moved.'
  const more = moved.length > 1 ? ` ${moved.length - 1} more moved.` : ''
  return `${first.title} due ${dueWords(first, todayOn)}.${more}`
}
