import { addDays, type CivilDate } from '@/lib/domain/clocks/civil-date'
import { workingDue as earlierDue } from '@/lib/domain/clocks/working-due'
import { localOf } from '@/lib/domain/clocks/zoned'
import { formatDate, formatHour } from '@/lib/domain/format-date'

/** What notices, assignments and acknowledgments read of an obligation. */

/** The key an obligation's notices hang on: stable while the procedure is computed anew. */
export function obligationKey(of: {
  subjectKind: string
  subjectId: string
  step: string
  instance: number
  obligation: string
}): string {
  return [of.subjectKind, of.subjectId, of.step, of.instance, of.obligation].join('/')
}

/** What an obligation's key names. @throws RangeError for any other text. */
export function obligationOfKey(key: string) {
  const [subjectKind, subjectId, step, instance, obligation] = key.split('/')
  if (
    !subjectKind ||
    !subjectId ||
    !step ||
    !/^\d+$/.test(instance ?? '') ||
    obligation === undefined
  )
    throw new RangeError(`Found "${key}"; the key of an obligation is needed.`)
  return { subjectKind, subjectId, step, instance: Number(instance), obligation }
}

interface DueDates {
  dueOn: CivilDate | null
  /** The closing of the day to work to, as `schedule` gives it. */
  dueAt: string | null
  /** The date the other side's letter names, where it names one. */
  statedDueOn: CivilDate | null
}

/** The date to work to: the earlier of the counted and the stated one. Null without either. */
export function workingDue(of: DueDates): { dueOn: CivilDate; dueAt: string | null } | null {
  const dueOn = earlierDue(of)
  return dueOn === null ? null : { dueOn, dueAt: of.dueAt }
}

/** The days a next date may lie in: after today, to the due date, or 30 days on once it is past. */
export function nextDateRange(
  dueOn: CivilDate,
  today: CivilDate,
): { from: CivilDate; to: CivilDate } {
  const from = addDays(today, 1)
  return { from, to: dueOn > today ? dueOn : addDays(today, 30) }
}

interface SaidDue {
  dueOn: CivilDate
  dueAt: string | null
  zone: string
}

/** `Thu 10 Dec 2026, 5 pm MT`. */
export function sayDue(due: SaidDue): string {
  return `${formatDate(due.dueOn)}, ${sayClosing(due)}`
}

/** `5 pm MT`, or `to the end of the day` where it closes with the day. */
export function sayClosing({ dueOn, dueAt, zone }: SaidDue): string {
  const closesAtHour = dueAt !== null && localOf(dueAt, zone).on === dueOn
  return closesAtHour ? formatHour(dueAt, zone) : 'to the end of the day'
}
