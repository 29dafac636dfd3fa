import { addMonths, daysBetween, type CivilDate } from '@/lib/domain/clocks/civil-date'
import { effectiveFacts, type Fact } from '@/lib/domain/clocks/facts'
import { sayDate } from '@/lib/domain/clocks/say'

export interface CodExtension {
  /** The commercial operation date of the request, and the one that holds now. */
  originalOn: CivilDate
  currentOn: CivilDate
  /** Calendar days granted so far, all extensions together. */
  daysGranted: number
  /** The last date that is not material. */
  limitOn: CivilDate
  /** Whether a date asked for stays within the running sum. */
  within: boolean
  account: string
}

/**
 * The running sum of extensions of the commercial operation date against 3 cumulative years,
 * counted from the first date stated: an extension taken back leaves room again. Null without any
 * date. `toOn` is a date asked for; the current one if left out.
 *
 * Source: pro forma LGIP 4.4.5 (from memory, medium confidence).
 */
export function codExtension(
  facts: readonly Fact[],
  toOn?: CivilDate,
  limitMonths = 36,
): CodExtension | null {
  const dates = effectiveFacts(facts)
    .filter((fact) => fact.kind === 'changed')
    .filter(({ body }) => body.decision !== 'asked' && body.decision !== 'refused')
    .flatMap((fact) => fact.body.terms?.codOn ?? [])
  const [originalOn] = dates
  const currentOn = dates.at(-1)
  if (!originalOn || !currentOn) return null
  const limitOn = addMonths(originalOn, limitMonths)
  const wantedOn = toOn ?? currentOn
  const within = wantedOn <= limitOn
  const daysGranted = Math.max(0, daysBetween(originalOn, currentOn))
  const account = `First ${sayDate(originalOn)}, ${daysGranted} calendar days granted so far. ${sayDate(wantedOn)} is ${within ? 'within' : 'past'} ${sayDate(limitOn)}, ${limitMonths} months in all.`
  return { originalOn, currentOn, daysGranted, limitOn, within, account }
}
