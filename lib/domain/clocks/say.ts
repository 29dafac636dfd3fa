import { partsOf, weekdayOf, type CivilDate } from '@/lib/domain/clocks/civil-date'
import type { Unit } from '@/lib/domain/clocks/procedure'

const weekdays = ['Sun', 'Mon', 'Tue', 'Wed', 'Thu', 'Fri', 'Sat']
const months = ['Jan', 'Feb', 'Mar', 'Apr', 'May', 'Jun', 'Jul', 'Aug', 'Sep', 'Oct', 'Nov', 'Dec']

/** `Thu 10 Dec 2026`. */
export function sayDate(on: CivilDate): string {
  const { year, month, day } = partsOf(on)
  return `${weekdays[weekdayOf(on)]} ${day} ${months[month - 1]} ${year}`
}

const unitNames: Record<Unit, string> = {
  business_day: 'business day',
  calendar_day: 'calendar day',
  month: 'month',
  year: 'year',
}

/** `15 business days`, `1 month`. */
export function sayLength(length: number, unit: Unit): string {
  return `${length} ${unitNames[unit]}${length === 1 ? '' : 's'}`
}
