import { type Action, can, type Role } from '@/lib/domain/access'
import { routes } from '@/lib/routes'

export interface NavEntry {
  label: string
  href: string
  /** Stands in the bar of a phone; the others are under "More". */
  onPhoneBar: boolean
}

interface Entry extends NavEntry {
  needs: Action
}

/** Every page that has a place of its own, in the order of the bar. */
const entries: readonly Entry[] = [
  { label: 'Due', href: routes.due(), onPhoneBar: true, needs: 'obligation.read' },
  { label: 'Pipeline', href: routes.pipeline(), onPhoneBar: true, needs: 'application.read' },
  { label: 'Calendar', href: routes.calendar(), onPhoneBar: true, needs: 'calendar.read' },
  { label: 'Day counter', href: routes.countDays(), onPhoneBar: false, needs: 'clock.count' },
  { label: 'Notices', href: routes.notices(), onPhoneBar: false, needs: 'notice.read' },
  { label: 'People', href: routes.people(), onPhoneBar: false, needs: 'person.write' },
]

/** The entries open to a person who holds these roles. */
export function navEntries(roles: readonly Role[]): NavEntry[] {
  return entries
    .filter((entry) => can(roles, entry.needs))
    .map(({ label, href, onPhoneBar }) => ({ label, href, onPhoneBar }))
}
