import { isOurs } from '@/components/applications/clock-words'
import { otherDateWords, titleWithRound } from '@/components/pipeline/clock-text'
import { civilDateAt, formatDate, formatHour } from '@/lib/domain/format-date'
import { workingDue } from '@/lib/domain/obligations'
import type { Due, DueFilter, DueRow } from '@/lib/schemas/application'

export type DueScope = NonNullable<DueFilter['scope']>

/** "Cure the deficiency, round 2"; a preparation says that it is one: "Start: the wire". */
export function dueTitle(row: DueRow): string {
  const title = titleWithRound(row)
  return row.rowKind === 'start_by' ? `Start: ${title}` : title
}

/** "4 pm CT": the hour the date worked to closes; null for the end of the day and for a start. */
export function closingHourWords(row: DueRow): string | null {
  if (row.rowKind === 'start_by' || !isOurs(row)) return null
  return hourOf(row)
}

/** What stands small under a row's date: a year that is not this one, and the closing hour. */
export function underDate(row: DueRow, todayOn: string): string {
  const year = row.on.slice(0, 4)
  const words = [year === todayOn.slice(0, 4) ? null : year, closingHourWords(row)]
  return words.filter(Boolean).join(', ')
}

function hourOf(row: DueRow): string | null {
  const due = workingDue(row)
  if (!due?.dueAt || civilDateAt(due.dueAt, row.zone) !== due.dueOn) return null
  return formatHour(due.dueAt, row.zone)
}

export type LineTone = 'missed' | 'soon' | 'theirs' | 'far'

/**
 * The one line under a row's title: what follows and what to do first once a clock is missed or
 * near, which dates differ, and for a preparation the clock behind it. Null where nothing presses.
 */
export function dueLine(row: DueRow, todayOn: string): { tone: LineTone; text: string } | null {
  if (row.rowKind === 'start_by') return { tone: 'far', text: startLine(row, todayOn) }
  if (row.status === 'stopped') return { tone: 'far', text: 'The clock is stopped.' }
  const { state, tone } = row.standing
  const { say, first = '' } = row.consequence
  if (state === 'missed') return { tone: 'missed', text: sentences(say, first) }
  if (state === 'theirs_late') return { tone: 'theirs', text: sentences(say, first) }
  const differ = differLine(row, todayOn)
  if (tone !== 'soon')
    return differ ? { tone: tone === 'theirs' ? 'theirs' : 'far', text: differ } : null
  const text = sentences(differ, nearLine(row))
  return text ? { tone: 'soon', text } : null
}

function startLine(row: DueRow, todayOn: string): string {
  const due = workingDue(row)
  const hour = hourOf(row)
  return due
    ? `Due ${formatDate(due.dueOn, todayOn)}${hour ? `, ${hour}` : ''}.`
    : 'Due without a date.'
}

/** "Closes 4 pm CT. They say 4 Dec." where two dates stand side by side. */
function differLine(row: DueRow, todayOn: string): string {
  const other = otherDateWords(row, todayOn)
  if (!other) return ''
  const hour = closingHourWords(row)
  return sentences(
    hour ? `Closes ${hour}.` : '',
    `${other.charAt(0).toUpperCase()}${other.slice(1)}.`,
  )
}

/** What a miss leads to, for whatever leads to something. */
function nearLine({ consequence }: DueRow): string {
  if (consequence.effect === 'duty' && !consequence.first) return ''
  return `If missed: ${lowerFirst(consequence.say)}`
}

function sentences(...parts: string[]): string {
  return parts.filter(Boolean).join(' ')
}

function lowerFirst(text: string): string {
  return text.charAt(0).toLowerCase() + text.slice(1)
}

/** The figure at a row's end; its group or its list says already whose it is and that it is missed. */
export function dueLeft({ standing, group }: DueRow): string {
  const left = standing.left.replace(/^theirs, /, '')
  return group === 'missed' ? left.replace(/^missed /, '') : left
}

/** "Dov Castellane has it in hand until Thu 10 Dec: written to Hob Lanyard"; null once that day has come. */
export function inHandWords({ acknowledged }: DueRow, todayOn: string): string | null {
  if (!acknowledged?.untilOn || acknowledged.untilOn <= todayOn) return null
  const until = formatDate(acknowledged.untilOn, todayOn)
  return `${acknowledged.by} has it in hand until ${until}: ${acknowledged.reason}`
}

const groups = ['missed', 'this_week', 'next_week', 'later'] as const

/** The rows under their headings in reading order, empty ones left out. */
export function groupedRows(
  rows: Due['rows'],
  scope: DueScope,
): { key: string; heading: string; rows: DueRow[] }[] {
  const headings = {
    missed: scope === 'theirs' ? 'They are late' : 'Missed',
    this_week: 'This week',
    next_week: 'Next week',
    later: 'Later',
  }
  return groups
    .map((key) => ({ key, heading: headings[key], rows: rows.filter((row) => row.group === key) }))
    .filter((group) => group.rows.length > 0)
}
