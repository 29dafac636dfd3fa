import type { Door } from '@/lib/http/door'
import { applicationDoors } from '@/lib/http/doors/applications'
import { calendarDoors } from '@/lib/http/doors/calendar'
import { correspondenceDoors } from '@/lib/http/doors/correspondence'
import { exhibitDoors } from '@/lib/http/doors/exhibits'
import { houseDoors } from '@/lib/http/doors/house'
import { noticeDoors } from '@/lib/http/doors/notices'
import { designDoors, plantDoors } from '@/lib/http/doors/plant'
import { linkDoors, ownDoors, peopleDoors } from '@/lib/http/doors/people'

/** Every door of the API. A subject's doors stand in a file of their own beside the others. */
export const doors: readonly Door[] = [
  ...houseDoors,
  ...peopleDoors,
  ...ownDoors,
  ...linkDoors,
  ...correspondenceDoors,
  ...noticeDoors,
  ...applicationDoors,
  ...calendarDoors,
  ...plantDoors,
  ...designDoors,
  ...exhibitDoors,
]
