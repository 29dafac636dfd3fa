import type { CivilDate } from '@/lib/domain/clocks/civil-date'
import type { Design } from '@/lib/domain/plant/design'
import type { DesignYear } from '@/lib/domain/plant/design-year'

export const exhibitStates = ['draft', 'checked', 'issued', 'superseded'] as const
export type ExhibitState = (typeof exhibitStates)[number]

export const exhibitTitles = { C: 'Export limit, DC/AC ratio and clipping' } as const
export type ExhibitLetter = keyof typeof exhibitTitles

export interface Signature {
  name: string
  on: CivilDate
}

/** A revision before this one, as the revision table prints it. */
export interface EarlierRevision {
  no: number
  on: CivilDate
  preparedBy: string
  checkedBy: string | null
  /** False for one that never left the house. */
  wasIssued: boolean
  what: string
}

/**
 * What a revision holds beside its calculation, taken when it is prepared and signed when it is
 * checked: with it and the calculation the document can be made again, byte for byte.
 */
export interface ExhibitData {
  project: {
    name: string
    town: string | null
    latitude: number | null
    longitude: number | null
  }
  requestNo: string | null
  operator: { name: string; zone: string }
  terms: { poi: string | null; poiVoltageKv: number | null; poiMw: number | null }
  calculation: { no: number; sha256: string; recordedOn: CivilDate; engineVersion: string }
  design: { no: number; recordedOn: CivilDate }
  /** Why a synthetic year stands in for a station's; null for a file. */
  weatherReason: string | null
  /** What is new in this revision. */
  what: string
  prepared: Signature
  checked: Signature | null
  checkNotes: string | null
  earlier: EarlierRevision[]
  /** The issued revision that the marks of change compare with. */
  comparedWithId: string | null
}

/** One revision with its frozen calculation: all that its document is made of. */
export interface ExhibitSource {
  no: number
  data: ExhibitData
  weatherName: string
  design: Design
  result: DesignYear
}

/** The MWac at the POI that count now: installed, granted, studied, requested, the furthest known. */
export function poiMegawatts(terms: {
  installedMw?: number
  grantedMw?: number
  studiedMw?: number
  requestedMw?: number
}): number | null {
  return terms.installedMw ?? terms.grantedMw ?? terms.studiedMw ?? terms.requestedMw ?? null
}

export interface StepInputs {
  /** The design revision of the calculation, and the project's latest. */
  designNo: number
  latestDesign: { no: number; on: string }
  exportLimitMw: number
  /** MWac at the POI by the terms in force, and the day of the fact that set them. */
  poiMw: number | null
  termsOn: string | null
}

/**
 * Why a revision no longer matches the plant or the request, in words: "design revision 4 of
 * 30 Nov"; null while it does. `on` values are dates in words.
 */
export function outOfStepWords(inputs: StepInputs): string | null {
  const { designNo, latestDesign, exportLimitMw, poiMw, termsOn } = inputs
  const reasons: string[] = []
  if (latestDesign.no > designNo)
    reasons.push(`design revision ${latestDesign.no} of ${latestDesign.on}`)
  if (poiMw !== null && Math.abs(poiMw - exportLimitMw) > 1e-6) {
    const since = termsOn ? ` since ${termsOn}` : ''
    reasons.push(`the request says ${poiMw} MWac at the POI${since}, this one ${exportLimitMw}`)
  }
  return reasons.length === 0 ? null : reasons.join('; ')
}

export interface RevisionStanding {
  state: ExhibitState
  wasIssued: boolean
  outOfStep: string | null
}

/** A revision's state as a person reads it: "issued, out of step: design revision 4 of 30 Nov". */
export function revisionStateWords({ state, wasIssued, outOfStep }: RevisionStanding): string {
  if (state === 'superseded')
    return wasIssued ? 'superseded by a later issue' : 'set aside, never issued'
  const words = {
    draft: 'draft, to be checked',
    checked: 'checked, to be issued',
    issued: 'issued',
  }
  return outOfStep ? `${words[state]}, out of step: ${outOfStep}` : words[state]
}
