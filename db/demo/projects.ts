import { ambrelFastTrackProjects } from '@/db/demo/ambrel-fast-track'
import { demoCalendars } from '@/db/demo/calendars'
import { dunmarrowProjects } from '@/db/demo/dunmarrow'
import { outlineProjects } from '@/db/demo/outline-projects'
import { studyProjects } from '@/db/demo/studies'
import { DemoDates, type DemoProject } from '@/db/demo/story'
import { businessCalendar, type BusinessCalendar } from '@/lib/domain/clocks/calendar'
import type { CivilDate } from '@/lib/domain/clocks/civil-date'

// Compiled once: a calendar remembers the days it was asked for.
const calendars = Object.fromEntries(
  Object.entries(demoCalendars).map(([key, { name, rules }]) => [
    key,
    businessCalendar(name, rules),
  ]),
) as Record<keyof typeof demoCalendars, BusinessCalendar>

/** Every project of the demo, told relative to today. Pure. */
export function demoProjects(todayOn: CivilDate): DemoProject[] {
  const dates = (key: keyof typeof demoCalendars) => new DemoDates(todayOn, calendars[key])
  return [
    ...dunmarrowProjects(dates('dml')),
    ...ambrelFastTrackProjects(dates('ave')),
    ...studyProjects({ ave: dates('ave'), tfec: dates('tfec') }),
    ...outlineProjects({ ave: dates('ave'), cbto: dates('cbto') }),
  ]
}
