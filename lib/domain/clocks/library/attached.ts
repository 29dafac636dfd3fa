import { sources, stepWith } from '@/lib/domain/clocks/library/step-of'
import type { Consequence, ProcedureBody, RuleSource, Step } from '@/lib/domain/clocks/procedure'

/**
 * Procedures attached to a request when something changes. Each is a procedure of its own with
 * facts of its own: the request it belongs to goes on meanwhile.
 */

const lgip = sources('Pro forma LGIP after Order 2023')
const lgia = sources('Pro forma LGIA')

const stages = ['Asked', 'Reviewed', 'Settled']
const chase: Consequence = {
  effect: 'duty',
  say: 'The answer is still owed; nothing is granted by silence.',
  first: 'Ask for the answer and a date; do not act on the change before.',
}

interface Ask {
  title: string
  obligations: Step['obligations']
  source: RuleSource
}

function ask({ title, obligations, source }: Ask): Step {
  return stepWith({
    key: 'file',
    title,
    short: 'Asked',
    stage: 'Asked',
    party: 'applicant',
    obligations,
    outcomes: [{ key: 'filed', title: 'Asked in writing' }],
    evidence: 'What was asked, with proof of receipt',
    source,
  })
}

interface Answer {
  title: string
  clock?: Step['clocks'][number]
  outcomes: Step['outcomes']
  onMiss?: Consequence
  source: RuleSource
}

function answer({ title, clock, outcomes, onMiss, source }: Answer): Step {
  return stepWith({
    key: 'answer',
    title,
    short: 'Answer',
    stage: 'Reviewed',
    party: 'operator',
    start: { mode: 'all', of: [{ step: 'file' }] },
    clocks: clock ? [clock] : [],
    outcomes,
    onMiss: onMiss ?? chase,
    evidence: 'Written answer',
    source,
  })
}

/** What we do with an answer that is not a plain yes. */
function settle(title: string, outcomes: Step['outcomes'], source: RuleSource): Step {
  return stepWith({
    key: 'settle',
    title,
    short: 'Settled',
    stage: 'Settled',
    party: 'applicant',
    needs: { not: { outcome: 'answer', in: ['granted'] } },
    start: { mode: 'all', of: [{ step: 'answer' }] },
    outcomes,
    source,
  })
}

const procedure = (key: string, title: string, steps: Step[]): ProcedureBody => ({
  key,
  title,
  stages,
  filedStep: 'file',
  loops: [],
  steps,
})

const drop = { key: 'dropped', title: 'Change dropped' }

/** Whether a change is material. Source: LGIP 4.4.3, 30 calendar days (from memory). */
export function modificationDetermination(
  options: { depositMinor?: number; answerDays?: number } = {},
): ProcedureBody {
  const source = lgip.memory('LG-MOD', '4.4.3', 'medium', 'Counted from receipt of the request.')
  return procedure('attached_modification', 'Modification determination', [
    ask({
      title: 'Ask whether a change is material',
      obligations: [
        { key: 'description', title: 'Description of the change', what: 'document' },
        { key: 'data', title: 'Changed technical data', what: 'data', owner: 'engineer' },
        {
          key: 'deposit',
          title: 'Deposit for the evaluation',
          what: 'money',
          target: { kind: 'fixed', amountMinor: options.depositMinor ?? 1_000_000 },
          leadBusinessDays: 3,
        },
      ],
      source,
    }),
    answer({
      title: 'Answer whether the change is material',
      clock: { length: options.answerDays ?? 30, unit: 'calendar_day' },
      outcomes: [
        { key: 'granted', title: 'Not material' },
        { key: 'material', title: 'Material' },
      ],
      source,
    }),
    settle(
      'Drop the change or take a new position',
      [drop, { key: 'new_request', title: 'New request' }],
      source,
    ),
  ])
}

/** Technological advancement. Source: LGIP 4.4.6, 30 calendar days (from memory). */
export function technologyChange(options: { depositMinor?: number } = {}): ProcedureBody {
  const source = lgip.memory('LG-TECH', '4.4.6', 'medium')
  return procedure('attached_technology', 'Technology change', [
    ask({
      title: 'Ask for the technology change',
      obligations: [
        {
          key: 'description',
          title: 'Equal or better electrical performance, shown',
          what: 'document',
          owner: 'engineer',
        },
        { key: 'models', title: 'Models of the new equipment', what: 'data', owner: 'engineer' },
        {
          key: 'deposit',
          title: 'Study deposit, if a study is needed',
          what: 'money',
          target: { kind: 'fixed', amountMinor: options.depositMinor ?? 1_000_000 },
          leadBusinessDays: 3,
        },
      ],
      source,
    }),
    answer({
      title: 'Answer on the technology change',
      clock: { length: 30, unit: 'calendar_day' },
      outcomes: [
        { key: 'granted', title: 'Not material: incorporated' },
        { key: 'material', title: 'Material' },
      ],
      source,
    }),
    settle(
      'Drop the change or ask for a modification',
      [drop, { key: 'modification', title: 'Modification asked for' }],
      source,
    ),
  ])
}

/** A later commercial operation date. Source: LGIP 4.4.5 (from memory); `codExtension` adds up. */
export function codExtensionProcedure(): ProcedureBody {
  const source = lgip.memory(
    'LG-38',
    '4.4.5',
    'medium',
    'Up to 3 years in all is not material; no clock for the answer.',
  )
  return procedure('attached_cod_extension', 'Extension of the commercial operation date', [
    ask({
      title: 'Ask for a later commercial operation date',
      obligations: [
        { key: 'letter', title: 'Letter with the new date and the reason', what: 'document' },
      ],
      source,
    }),
    answer({
      title: 'Answer on the later date',
      outcomes: [
        { key: 'granted', title: 'Granted' },
        { key: 'material', title: 'Reviewed as a modification' },
        { key: 'refused', title: 'Refused' },
      ],
      source,
    }),
    settle(
      'Keep the date or ask for a modification',
      [drop, { key: 'modification', title: 'Modification asked for' }],
      source,
    ),
  ])
}

/** Transfer of a request or agreement. Source: LGIP 4.3, LGIA 19.1 (from memory). */
export function transfer(): ProcedureBody {
  const source = lgia.memory(
    'LGIA-19.1',
    '19.1; LGIP 4.3',
    'medium',
    'Only with the facility and the same POI.',
  )
  return procedure('attached_transfer', 'Transfer to another company', [
    ask({
      title: 'Give notice of the transfer',
      obligations: [
        { key: 'notice', title: 'Notice with the new company and its signatory', what: 'document' },
        { key: 'land', title: 'Site control in the new name', what: 'site_control' },
        {
          key: 'security',
          title: 'Letters of credit and insurance in the new name',
          what: 'document',
        },
      ],
      source,
    }),
    answer({
      title: 'Consent to the transfer',
      outcomes: [
        { key: 'granted', title: 'Consented' },
        { key: 'refused', title: 'Refused, with the reason' },
      ],
      source,
    }),
    settle(
      'Meet what was asked or keep the company',
      [drop, { key: 'met', title: 'Conditions met' }],
      source,
    ),
  ])
}

/** Suspension of work, up to three years. Source: LGIA 5.16 (from memory). */
export function suspension(options: { years?: number } = {}): ProcedureBody {
  const source = lgia.memory('LGIA-5.16', '5.16', 'medium', 'Costs of standing still are ours.')
  return procedure('attached_suspension', 'Suspension of work', [
    ask({
      title: 'Give notice of the suspension',
      obligations: [
        { key: 'notice', title: 'Written notice with the planned end', what: 'document' },
      ],
      source,
    }),
    answer({
      title: 'Account of the cost of standing still',
      outcomes: [{ key: 'granted', title: 'Acknowledged' }],
      source,
    }),
    stepWith({
      key: 'resumed',
      title: 'Ask to go on with the work',
      short: 'Work goes on',
      stage: 'Settled',
      party: 'applicant',
      start: { mode: 'all', of: [{ step: 'file' }] },
      clocks: [{ length: options.years ?? 3, unit: 'year' }],
      outcomes: [{ key: 'asked', title: 'Asked in writing' }],
      onMiss: {
        effect: 'withdrawn',
        say: 'The agreement counts as ended.',
        first: 'Ask in writing to go on before the hour closes.',
      },
      source,
    }),
  ])
}
