import { dueWords } from '@/components/applications/clock-words'
import { formatShortDate } from '@/lib/domain/format-date'

interface Dated {
  dueOn: string | null
  dueAt: string | null
  statedDueOn: string | null
  zone: string
}

/** The title of a step with its round: "Cure the deficiency, round 2". */
export function titleWithRound(of: { title: string; instance: number }): string {
  return of.instance > 1 ? `${of.title}, round ${of.instance}` : of.title
}

/**
 * The other of two dates that differ: "they say 4 Dec" where we work to our count, "our count is
 * 4 Dec" where their earlier date counts. Null where there are no two.
 */
export function otherDateWords(of: Dated, todayOn: string): string | null {
  const { dueOn, statedDueOn } = of
  if (!dueOn || !statedDueOn || dueOn === statedDueOn) return null
  return dueOn < statedDueOn
    ? `they say ${formatShortDate(statedDueOn, todayOn)}`
    : `our count is ${formatShortDate(dueOn, todayOn)}`
}

/** "Thu 3 Dec, 4 pm CT · they say 4 Dec", or "no date" for a step that waits for its start. */
export function nextDateWords(of: Dated, todayOn: string): string {
  const words = [dueWords(of, todayOn), otherDateWords(of, todayOn)].filter(Boolean)
  return words.length > 0 ? words.join(' · ') : 'no date'
}
