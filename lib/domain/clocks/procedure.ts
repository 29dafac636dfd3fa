/** The shape of a procedure: a utility's interconnection rules as data. */

export type PartyRole =
  'applicant' | 'operator' | 'wires_owner' | 'affected_system' | 'load_utility' | 'regulator'
export type StepParty = PartyRole | 'both' | 'other'
/**
 * `anytime`: as often as it is recorded, each a numbered round. `recurring`: once for each round
 * of the anytime step that starts it.
 */
export type StepKind = 'normal' | 'window' | 'gate' | 'anytime' | 'recurring'
export type Unit = 'business_day' | 'calendar_day' | 'month' | 'year'
export type Direction = 'after' | 'before'
export type Roll = 'none' | 'next_business_day' | 'previous_business_day'
/** Which date of a fact a reference reads. */
export type DateBasis = 'sent' | 'received' | 'due' | 'scheduled'
/**
 * `same` is the default inside one loop and from a recurring step to what it follows, `latest`
 * everywhere else.
 */
export type InstanceRef = 'same' | 'latest' | 'previous'

export interface StepRef {
  step: string
  instance?: InstanceRef
  /** The reference counts only when the step closed with one of these outcomes. */
  outcome?: string[]
  date?: DateBasis
}

export type Expr =
  | { outcome: string; in: string[]; instance?: InstanceRef }
  | { done: string; instance?: InstanceRef }
  | { term: string; op: '<' | '<=' | '>' | '>=' | '=' | '!='; value: string | number | boolean }
  | { instanceAbove: number }
  | { all: Expr[] }
  | { any: Expr[] }
  | { not: Expr }

export interface StartRule {
  mode: 'any' | 'all'
  of: StepRef[]
}

export interface ClockRule {
  when?: Expr
  length: number
  unit: Unit
  direction?: Direction
  /** Counted from here instead of from the start of the step. */
  from?: StepRef
  includeStart?: boolean
  /**
   * What it counts from is no receipt (a window, a meeting, a tender): that day is day 0 as it
   * stands, whatever the utility's rule for what it receives on a closed day or after hours.
   */
  fromDayItself?: boolean
  roll?: Roll
  /** False: the clock runs to the end of the day, not to the closing hour. */
  closesAtHour?: boolean
  /** Whose business days count; the utility that runs the procedure if left out. */
  calendar?: PartyRole
  /** The due date is never after the due date or event of this step. */
  neverAfter?: StepRef
  notBefore?: StepRef
  /** Where missing this alternative has another consequence than missing the step. */
  onMiss?: Consequence
}

export type MwTerm = 'requestedMw' | 'studiedMw' | 'grantedMw' | 'installedMw'

/** A bracket by MW: from the edge of the one before up to, but not at, its own edge. */
export interface MwBracket {
  /** Left out in the last, which has no upper edge. */
  belowMw?: number
  plusMinor?: number
  perMwMinor?: number
}

/**
 * An amount owed, in integer minor units, as data.
 *
 * `share` is of the network upgrade cost assigned to the request: a total to reach, less what is
 * held on the same account. `mw` names the megawatts that count, the requested ones if left out.
 */
export type MoneyRule =
  | { kind: 'fixed'; amountMinor: number }
  | {
      kind: 'per_mw'
      perMwMinor: number
      plusMinor?: number
      atLeastMinor?: number
      atMostMinor?: number
      mw?: MwTerm
    }
  | { kind: 'per_kw'; perKwMinor: number; plusMinor?: number; mw?: MwTerm }
  | { kind: 'bracketed'; brackets: MwBracket[]; mw?: MwTerm }
  | { kind: 'multiple'; times: number; of: MoneyRule }
  | { kind: 'share'; percent: number }

export interface ObligationRule {
  key: string
  title: string
  what: 'document' | 'data' | 'site_control' | 'money' | 'act'
  target?: MoneyRule
  /**
   * Postings to all obligations of one account count together, so that a later target is a total
   * to reach: what earlier steps hold is taken off.
   */
  account?: string
  /** Until when what is posted comes back, in words. */
  refundable?: string
  owner?: OwnerRole
  leadBusinessDays?: number
}

export type OwnerRole = 'developer' | 'engineer' | 'liaison' | 'executive' | 'administrator'

export interface OutcomeRule {
  key: string
  title: string
}

export type MissEffect =
  | 'withdrawn'
  | 'withdrawn_on_notice'
  | 'cure'
  | 'extension'
  | 'track'
  | 'presumed'
  | 'penalty'
  | 'duty'

export interface Consequence {
  effect: MissEffect
  /** In words: what follows. */
  say: string
  /** In words: what to do first. */
  first?: string
  /** The outcome that is presumed once the clock has run out. */
  outcome?: string
}

export interface RuleSource {
  id?: string
  document: string
  section: string
  /** read: read in the rule; adapted: read in an adapted text; from_memory: not verified. */
  basis: 'read' | 'adapted' | 'from_memory'
  confidence?: 'high' | 'medium' | 'low'
  note?: string
}

export interface Step {
  key: string
  title: string
  /** For labels on drawings. */
  short?: string
  stage: string
  party: StepParty
  /** Whose hour and receipt rule hold for what the applicant sends; the operator if left out. */
  to?: PartyRole
  kind: StepKind
  needs?: Expr
  /** Needed only by some outcomes, but drawn ahead as the way a request usually goes. */
  expected?: boolean
  /** Left out: the step is open from the start of the application. */
  start?: StartRule
  /** Closed as overtaken once one of these steps is done, whether or not it was recorded. */
  overtakenBy?: string[]
  clocks: ClockRule[]
  obligations?: ObligationRule[]
  outcomes: OutcomeRule[]
  onMiss: Consequence
  owner?: OwnerRole
  evidence?: string
  typical?: { shortest: number; likely: number; longest: number }
  source: RuleSource
}

export interface Loop {
  key: string
  scope: string[]
  /** A further instance of the scope begins when this step closes with this outcome. */
  again: { step: string; outcome: string }
  max?: number
}

export interface ProcedureBody {
  key: string
  title: string
  stages: string[]
  steps: Step[]
  loops: Loop[]
  /** The step that makes a draft a filed request. */
  filedStep: string
  /** The step that puts the facility in operation. */
  operationStep?: string
}

/** The step of that key. @throws RangeError when the procedure has none. */
export function stepOf(body: ProcedureBody, key: string): Step {
  const step = body.steps.find((candidate) => candidate.key === key)
  if (!step) throw new RangeError(`The procedure ${body.key} has no step "${key}".`)
  return step
}

/** The loop whose scope holds the step, if any. */
export function loopOf(body: ProcedureBody, key: string): Loop | undefined {
  return body.loops.find((loop) => loop.scope.includes(key))
}
