export type LineParty = 'ours' | 'theirs' | 'both'

export type LineState = 'done' | 'running' | 'missed' | 'open' | 'ahead' | 'not_needed' | 'waived'

/** One step of an application's sequence, ready to draw: dates are chosen and worded already. */
export interface LineStep {
  key: string
  /** 1 for the first round of a repeated step. */
  instance: number
  title: string
  /** For the drawings; the title where absent. */
  shortTitle?: string
  party: LineParty
  kind: 'step' | 'gate'
  state: LineState
  /** Civil date the step is drawn at: done, due or forecast. */
  on?: string
  /** The date in words, `10 Feb` or `22 Sep, 3 BD over`. */
  onLabel?: string
  forecast?: boolean
  obligations?: { title: string; done: boolean }[]
  /** An affected system taps off below. */
  tap?: boolean
  repeated?: boolean
}

export type LineTone = 'soon' | 'far' | 'missed' | 'theirs'

/** The clock drawn as a dimension line: `30 calendar days from receipt, 9 left`. */
export interface LineClock {
  fromOn: string
  toOn: string
  label: string
  note?: string
  tone: LineTone
}

export interface LineModel {
  steps: LineStep[]
  todayOn: string
  running?: LineClock
  zoneNote?: string
}

/** A step whose switch stands closed: the current passes it. */
export function isClosed(state: LineState): boolean {
  return state === 'done' || state === 'waived' || state === 'not_needed'
}

/** A step that asks for something now. */
export function isLive(state: LineState): boolean {
  return state === 'running' || state === 'missed' || state === 'open'
}

const STATE_WORDS: Record<LineState, string> = {
  done: 'done',
  running: 'running',
  missed: 'missed',
  open: 'open',
  ahead: 'ahead',
  not_needed: 'not needed',
  waived: 'waived',
}

const PARTY_WORDS: Record<LineParty, string> = {
  ours: 'ours',
  theirs: 'theirs',
  both: 'ours and theirs',
}

function stepWords(step: LineStep): string {
  const round = step.repeated === true ? `, round ${step.instance}` : ''
  const date = step.onLabel === undefined ? '' : `, ${step.onLabel}`
  const owed = step.obligations ?? []
  const parts = owed.map((part) => `${part.title} ${part.done ? 'done' : 'open'}`)
  const gate = parts.length === 0 ? '' : ` (${parts.join('; ')})`
  const tap = step.tap === true ? ', affected system' : ''
  const who = PARTY_WORDS[step.party]
  return `${step.title}${round}: ${who}, ${STATE_WORDS[step.state]}${date}${gate}${tap}`
}

/** The whole sequence in words: the text equivalent of the large drawings. */
export function describeLine(model: LineModel): string {
  const clock = model.running === undefined ? [] : [model.running.label]
  const steps = model.steps.map(stepWords)
  return [...clock, ...steps, 'Shows paperwork, not the state of equipment'].join('. ')
}

/** One sentence for a table row: how far, and what is live. */
export function summarizeLine(steps: readonly LineStep[]): string {
  const done = steps.filter((step) => isClosed(step.state)).length
  const live = steps.find((step) => isLive(step.state))
  const next = live === undefined ? '' : `; ${live.title} ${STATE_WORDS[live.state]}`
  return `${done} of ${steps.length} steps done${next}`
}
