import type { CivilDate } from '@/lib/domain/clocks/civil-date'

export type DerivationKind =
  | 'start'
  | 'receipt'
  | 'count'
  | 'skip'
  | 'roll'
  | 'stop'
  | 'extension'
  | 'cap'
  | 'hour'
  | 'stated'
  | 'presumed'
  | 'provisional'
  | 'done'
  | 'note'
  | 'source'

/** One line that a person can check by hand. */
export interface DerivationLine {
  kind: DerivationKind
  text: string
  on?: CivilDate
}
