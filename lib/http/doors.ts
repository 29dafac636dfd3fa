import type { Door } from '@/lib/http/door'
import { correspondenceDoors } from '@/lib/http/doors/correspondence'
import { houseDoors } from '@/lib/http/doors/house'
import { noticeDoors } from '@/lib/http/doors/notices'
import { linkDoors, ownDoors, peopleDoors } from '@/lib/http/doors/people'

/** Every door of the API. A subject's doors stand in a file of their own beside the others. */
export const doors: readonly Door[] = [
  ...houseDoors,
  ...peopleDoors,
  ...ownDoors,
  ...linkDoors,
  ...correspondenceDoors,
  ...noticeDoors,
]
