import type { Door } from '@/lib/http/door'
import { houseDoors } from '@/lib/http/doors/house'
import { linkDoors, ownDoors, peopleDoors } from '@/lib/http/doors/people'

/** Every door of the API. A subject's doors stand in a file of their own beside the others. */
export const doors: readonly Door[] = [...houseDoors, ...peopleDoors, ...ownDoors, ...linkDoors]
