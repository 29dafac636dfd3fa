import { linePartyOf, workingDueOf, type LineSource } from '@/components/line/line-of-items'
import type { LineClock, LineTone } from '@/components/line/model'
import { daysBetween } from '@/lib/domain/clocks/civil-date'
import { formatDate, formatShortDate } from '@/lib/domain/format-date'

/** What the dimension line reads beyond the line itself. */
export interface ClockSource extends LineSource {
  dueAt: string | null
  startBy: string | null
  moneyHeldMinor: number | null
  consequence: { say: string; first?: string }
  derivation: readonly { kind: string; text: string; on?: string }[]
  standing: LineSource['standing'] & { tone: string; left: string }
}

/** The clock to work to: ours before theirs, the earliest first. None where nothing dated runs. */
export function runningItemOf<Item extends ClockSource>(items: readonly Item[]): Item | undefined {
  const dated = items
    .filter((item) => item.obligation === '' && item.onLine && item.status === 'open')
    .filter((item) => item.dueAt !== null && item.standing.state !== 'not_begun')
    .sort((a, b) => (a.dueAt ?? '').localeCompare(b.dueAt ?? ''))
  return dated.find((item) => linePartyOf(item.party) !== 'theirs') ?? dated[0]
}

/** The running clock in words: "30 calendar days from receipt, 9 left", and what missing it costs. */
export function runningClockOf(
  items: readonly ClockSource[],
  todayOn: string,
): LineClock | undefined {
  const item = runningItemOf(items)
  const toOn = item && workingDueOf(item)
  if (!item?.startOn || !toOn) return undefined
  return {
    // A backward count has no length from its start: what is left of it is drawn.
    fromOn: isBackward(item) && todayOn < toOn ? todayOn : item.startOn,
    toOn,
    label: `${lengthWords(item, toOn, todayOn)}, ${leftWords(item, toOn, todayOn)}`,
    note: noteWords(item, items, todayOn),
    tone: toneOf(item.standing.tone),
  }
}

/** `30 calendar days`, as the derivation counts it; undefined for a date that was not counted. */
export function countedLength(derivation: ClockSource['derivation']): string | undefined {
  const line = derivation.find((one) => one.kind === 'count')
  const found = /^(?:at least )?\d+ (?:business day|calendar day|month|year)s?/i
  return found.exec(line?.text ?? '')?.[0].replace(/^A/, 'a')
}

function lengthWords(item: ClockSource, toOn: string, todayOn: string): string {
  const length = countedLength(item.derivation)
  if (!length) return `since ${formatShortDate(item.startOn ?? toOn, todayOn)}`
  const counted = item.derivation.find((line) => line.kind === 'count')
  if (counted?.on !== undefined && counted.on < toOn) return `${length}, extended`
  if (isBackward(item)) return `${length} before${bookedName(item)}`
  const start = item.derivation.find((line) => line.kind === 'start')?.text ?? ''
  if (start.includes(', received ')) return `${length} from receipt`
  return start.includes(', sent ') ? `${length} from sending` : length
}

function isBackward(item: ClockSource): boolean {
  const text = item.derivation.find((line) => line.kind === 'count')?.text ?? ''
  return /^[^,:]* before[,:]/.test(text)
}

/** The booked event that a backward count ends at. */
function bookedName(item: ClockSource): string {
  const line = item.derivation.findLast((one) => one.kind === 'start')
  const name = /^(.+), booked for /.exec(line?.text ?? '')?.[1]
  return name === undefined ? '' : ` the ${midSentence(name)}`
}

function leftWords(item: ClockSource, toOn: string, todayOn: string): string {
  if (item.standing.tone === 'missed' || item.standing.state === 'theirs_late')
    return item.standing.left.replace(/^theirs, /, '')
  if (toOn === todayOn) return 'closes today'
  const length = countedLength(item.derivation) ?? ''
  if (length.includes('business day')) return `${item.standing.businessDays ?? 0} left`
  const days = daysBetween(todayOn, toOn)
  return length.includes('calendar day') ? `${days} left` : `${days} calendar days left`
}

function noteWords(
  item: ClockSource,
  items: readonly ClockSource[],
  todayOn: string,
): string | undefined {
  const parts = items.filter(
    (one) =>
      one.obligation !== '' &&
      one.step === item.step &&
      one.instance === item.instance &&
      one.status === 'open' &&
      one.startBy !== null,
  )
  const first = parts.sort((a, b) => (a.startBy ?? '').localeCompare(b.startBy ?? ''))[0]
  const what = first?.moneyHeldMinor == null ? 'start' : 'start the wire'
  const words = [
    item.consequence.say === '' ? '' : `missed: ${midSentence(item.consequence.say)}`,
    first?.startBy ? `${what} by ${formatDate(first.startBy, todayOn)}` : '',
  ].filter((text) => text !== '')
  return words.length === 0 ? undefined : words.join(' · ')
}

/** A sentence as it stands after a colon: small first letter, no full stop. */
export function midSentence(text: string): string {
  const [first = '', second = ''] = text
  const isName = second !== '' && second === second.toUpperCase() && /\p{L}/u.test(second)
  return `${isName ? first : first.toLowerCase()}${text.slice(1)}`.replace(/\.$/, '')
}

function toneOf(tone: string): LineTone {
  return tone === 'missed' || tone === 'soon' || tone === 'theirs' ? tone : 'far'
}
