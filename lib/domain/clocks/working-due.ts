import type { CivilDate } from '@/lib/domain/clocks/civil-date'

/** People work to the earlier of our count and the date the utility states. */
export function workingDue(item: {
  dueOn: CivilDate | null
  statedDueOn: CivilDate | null
}): CivilDate | null {
  if (!item.dueOn || !item.statedDueOn) return item.dueOn ?? item.statedDueOn
  return item.dueOn < item.statedDueOn ? item.dueOn : item.statedDueOn
}
