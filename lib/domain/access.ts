/** Who may do what: the one table that every page, handler, service and job asks. */

export const roles = ['developer', 'engineer', 'liaison', 'executive', 'administrator'] as const
export type Role = (typeof roles)[number]

const everyone: readonly Role[] = roles
const keepers: readonly Role[] = ['developer', 'liaison', 'administrator']
const recorders: readonly Role[] = ['developer', 'engineer', 'liaison']
const engineers: readonly Role[] = ['engineer']
const house: readonly Role[] = ['administrator']

const table = {
  'application.read': everyone,
  'application.create': ['developer'],
  'fact.record': recorders,
  'fact.correct': recorders,
  'obligation.read': everyone,
  'obligation.assign': ['developer', 'liaison', 'administrator'],
  'obligation.acknowledge': recorders.concat('executive'),
  'entry.read': everyone,
  'entry.record': recorders,
  'file.read': everyone,
  'file.upload': recorders,
  'file.restrict': keepers,
  'project.read': everyone,
  'project.write': ['developer', 'engineer'],
  'organization.read': everyone,
  'organization.write': house,
  'procedure.read': everyone,
  'procedure.write': house,
  'calendar.read': everyone,
  'calendar.write': house,
  'calendar.feed': everyone,
  'clock.count': everyone,
  'plant.estimate': everyone,
  'weather.read': everyone,
  'weather.upload': ['engineer', 'developer'],
  'equipment.read': everyone,
  'equipment.write': engineers,
  'design.read': everyone,
  'design.write': engineers,
  'calculation.read': everyone,
  'calculation.freeze': engineers,
  'exhibit.read': everyone,
  'exhibit.prepare': engineers,
  'exhibit.check': engineers,
  'exhibit.issue': ['engineer', 'developer'],
  'notice.read': everyone,
  'notice.send': [] as readonly Role[],
  'person.read': everyone,
  'person.write': house,
  'self.read': everyone,
  'self.write': everyone,
  'job.run': [] as readonly Role[],
} satisfies Record<string, readonly Role[]>

export type Action = keyof typeof table
export const actions = Object.keys(table) as Action[]

/** Whether a person holding these roles may do the action. */
export function can(held: readonly Role[], action: Action): boolean {
  const allowed: readonly Role[] = table[action]
  return held.some((role) => allowed.includes(role))
}

/** What each of the product's own jobs may do. */
const jobTable = {
  sendNotices: ['notice.send', 'obligation.read', 'notice.read', 'person.read'],
  sweepNotices: ['notice.send', 'obligation.read', 'notice.read', 'person.read'],
  recomputeApplication: ['job.run', 'application.read'],
  renderExhibit: ['job.run', 'exhibit.read', 'application.read', 'calculation.read', 'design.read'],
  compareProjections: ['job.run', 'application.read'],
  demo: [...actions],
} satisfies Record<string, readonly Action[]>

export type JobActorName = keyof typeof jobTable
export const jobActorNames = Object.keys(jobTable) as JobActorName[]

/** Whether the job of that name may do the action. */
export function jobCan(name: JobActorName, action: Action): boolean {
  const allowed: readonly Action[] = jobTable[name]
  return allowed.includes(action)
}

/** Whether a person of these roles may read an entry: internal text is for the company's own. */
export function entryIsVisible(
  held: readonly Role[],
  entry: { visibility: 'internal' | 'shareable' },
): boolean {
  return entry.visibility === 'shareable' || held.some((role) => everyone.includes(role))
}

/** Whether a file's place is open to a person: a restricted one only to those named there. */
export function fileIsOpen(
  personId: string,
  link: { restrictedTo: readonly string[] | null },
): boolean {
  return link.restrictedTo === null || link.restrictedTo.includes(personId)
}
