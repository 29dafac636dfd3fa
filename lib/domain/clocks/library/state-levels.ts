import { agreementToOperation, retestLoop } from '@/lib/domain/clocks/library/agreement'
import { objections } from '@/lib/domain/clocks/library/at-any-time'
import { deficiencyLoop, smallGeneratorEntry } from '@/lib/domain/clocks/library/entry'
import { levelThree } from '@/lib/domain/clocks/library/state-level-three'
import { noticeDuty, sources, stepWith } from '@/lib/domain/clocks/library/step-of'
import type { Consequence, Expr, ProcedureBody, Step, StepRef } from '@/lib/domain/clocks/procedure'

const state = sources('State procedures, generic')

/** Where states differ; left out: the commonest value read. */
export interface StateLevelOptions {
  key?: string
  title?: string
  feeMinor?: number
  /** Business days of review at level 1. */
  levelOneDays?: number
  /** Business days to screen at level 2. */
  levelTwoDays?: number
  /** Business days of the supplemental review: 10 in older texts, 30 in newer. */
  supplementalDays?: number
  /** Business days to return a study agreement. */
  returnDays?: number
  testNoticeDays?: number
  cureMissed?: Consequence
}

const level = (key: string): Expr => ({ outcome: 'level', in: [key] })

/** Level 3 takes what levels 1 and 2 do not pass. */
const toLevelThree: StepRef[] = [
  'level',
  'level_one_review',
  'level_two_review',
  'supplemental',
  'supplemental_review',
].map((step) => ({ step, outcome: ['level_3'] }))

const studied: Expr = {
  any: toLevelThree.map(({ step }) => ({ outcome: step, in: ['level_3'] })),
}

/**
 * A generic three-level state procedure: small certified inverters, certified machines by
 * screens with a supplemental review, study for the rest. No single state's; each is to be fitted.
 */
export function stateThreeLevels(options: StateLevelOptions = {}): ProcedureBody {
  const returnDays = options.returnDays ?? 15
  return {
    key: options.key ?? 'state_three_levels',
    title: options.title ?? 'State procedure, three levels',
    stages: ['Request', 'Review', 'Study', 'Agreement', 'Construction', 'Testing', 'Operation'],
    filedStep: 'file',
    operationStep: 'operation',
    loops: [deficiencyLoop, retestLoop],
    steps: [
      ...smallGeneratorEntry(
        { title: 'Application fee', amountMinor: options.feeMinor ?? 10_000 },
        { ...(options.cureMissed && { cureMissed: options.cureMissed }) },
      ),
      levelStep,
      levelOne(options.levelOneDays ?? 15),
      ...levelTwo(options.levelTwoDays ?? 15, options.supplementalDays ?? 30),
      ...levelThree({ needs: studied, from: toLevelThree, returnDays }),
      agreementStep,
      ...agreementToOperation({
        tendered: [{ step: 'agreement' }],
        construction: { outcome: 'agreement', in: ['construction'] },
        testNoticeDays: options.testNoticeDays ?? 10,
      }),
      ...objections(),
    ],
  }
}

const levelStep: Step = stepWith({
  key: 'level',
  title: 'Notice of the level of review',
  short: 'Level',
  stage: 'Request',
  party: 'operator',
  start: { mode: 'all', of: [{ step: 'completeness', outcome: ['complete'], date: 'sent' }] },
  outcomes: [
    { key: 'level_1', title: 'Level 1: small certified inverter' },
    { key: 'level_2', title: 'Level 2: certified, by screens' },
    { key: 'level_3', title: 'Level 3: study' },
  ],
  typical: { shortest: 0, likely: 5, longest: 15 },
  source: state.memory(
    'ST-01',
    'Levels',
    'medium',
    'Often 10 to 25 kW at level 1 and 2 to 5 MW at level 2; the numbering differs.',
  ),
})

/** The review of a level: its title follows the level that the notice named. */
function review(
  given: Pick<Step, 'key' | 'title' | 'needs' | 'source' | 'expected'>,
  days: number,
): Step {
  return stepWith({
    ...given,
    short: 'Review',
    stage: 'Review',
    party: 'operator',
    start: { mode: 'all', of: [{ step: 'completeness', outcome: ['complete'], date: 'sent' }] },
    clocks: [{ length: days, unit: 'business_day' }],
    outcomes: [
      { key: 'pass', title: 'Passes' },
      ...(given.key === 'level_two_review'
        ? [{ key: 'supplemental', title: 'Fails; supplemental review offered' }]
        : []),
      { key: 'level_3', title: 'Goes to level 3' },
    ],
    onMiss: noticeDuty,
    evidence: 'Results and supporting analysis',
    typical: { shortest: 14, likely: 24, longest: 45 },
  })
}

function levelOne(days: number): Step {
  return review(
    {
      key: 'level_one_review',
      title: 'Review at level 1',
      needs: level('level_1'),
      source: state.read('ST-02', 'Level 1', '15 business days after completeness in Mississippi.'),
    },
    days,
  )
}

function levelTwo(days: number, supplementalDays: number): Step[] {
  const offered: Expr = { outcome: 'level_two_review', in: ['supplemental'] }
  return [
    review(
      {
        key: 'level_two_review',
        title: 'Review at level 2 with the screens',
        needs: level('level_2'),
        expected: true,
        source: state.adapted('ST-03', 'Level 2'),
      },
      days,
    ),
    stepWith({
      key: 'supplemental',
      title: 'Accept the supplemental review',
      short: 'Supplemental review',
      stage: 'Review',
      party: 'applicant',
      needs: offered,
      start: { mode: 'all', of: [{ step: 'level_two_review', outcome: ['supplemental'] }] },
      clocks: [{ length: 15, unit: 'business_day' }],
      obligations: [
        { key: 'agreement', title: 'Written agreement', what: 'document' },
        {
          key: 'deposit',
          title: 'Deposit of the estimated cost',
          what: 'money',
          leadBusinessDays: 3,
        },
      ],
      outcomes: [
        { key: 'accepted', title: 'Accepted with the deposit' },
        { key: 'level_3', title: 'Goes to level 3' },
      ],
      onMiss: {
        effect: 'track',
        say: 'The request goes to level 3; some states withdraw it.',
        first: 'Accept in writing with the deposit before the hour closes.',
      },
      source: state.read('ST-04', 'Supplemental review', 'Accept in 15 business days.'),
    }),
    stepWith({
      key: 'supplemental_review',
      title: 'Supplemental review',
      short: 'Supplemental results',
      stage: 'Review',
      party: 'operator',
      needs: { outcome: 'supplemental', in: ['accepted'] },
      start: { mode: 'all', of: [{ step: 'supplemental', outcome: ['accepted'] }] },
      clocks: [{ length: supplementalDays, unit: 'business_day' }],
      outcomes: [
        { key: 'pass', title: 'Passes' },
        { key: 'level_3', title: 'Goes to level 3' },
      ],
      onMiss: noticeDuty,
      typical: { shortest: 30, likely: 45, longest: 70 },
      source: state.read('ST-05', 'Supplemental review', '10 business days in older texts.'),
    }),
  ]
}

const agreementStep: Step = stepWith({
  key: 'agreement',
  title: 'Send the interconnection agreement',
  short: 'Agreement sent',
  stage: 'Agreement',
  party: 'operator',
  expected: true,
  start: {
    mode: 'any',
    of: [
      { step: 'level_one_review', outcome: ['pass'] },
      { step: 'level_two_review', outcome: ['pass'] },
      { step: 'supplemental_review', outcome: ['pass'] },
      { step: 'facilities_report' },
    ],
  },
  clocks: [{ length: 5, unit: 'business_day' }],
  outcomes: [
    { key: 'sent', title: 'Sent, nothing to build' },
    { key: 'construction', title: 'Sent, with facilities to build' },
  ],
  onMiss: noticeDuty,
  source: state.adapted('ST-06', 'Agreement'),
})
