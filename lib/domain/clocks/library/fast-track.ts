import { agreementToOperation, retestLoop } from '@/lib/domain/clocks/library/agreement'
import { accountSteps, objections } from '@/lib/domain/clocks/library/at-any-time'
import { deficiencyLoop, smallGeneratorEntry } from '@/lib/domain/clocks/library/entry'
import { sources, stepWith } from '@/lib/domain/clocks/library/step-of'
import type { Expr, Loop, ProcedureBody, Step, StepRef } from '@/lib/domain/clocks/procedure'

const sgip = sources('Pro forma SGIP')
const failed: Expr = { outcome: 'initial_review', in: ['fail'] }

const screensLoop: Loop = {
  key: 'screens',
  scope: ['supplemental_review', 'screen_question', 'screen_answer'],
  again: { step: 'screen_answer', outcome: 'continue' },
}

const toStudy: Expr = {
  any: [
    { outcome: 'options', in: ['study'] },
    { outcome: 'accept_supplemental', in: ['study'] },
    { outcome: 'supplemental_review', in: ['more'] },
    { outcome: 'screen_answer', in: ['study'] },
  ],
}

const initialReview: Step[] = [
  stepWith({
    key: 'initial_review',
    title: 'Initial review with the screens',
    short: 'Initial review',
    stage: 'Screens',
    party: 'operator',
    start: { mode: 'all', of: [{ step: 'completeness', outcome: ['complete'], date: 'sent' }] },
    clocks: [{ length: 15, unit: 'business_day' }],
    outcomes: [
      { key: 'pass', title: 'Passes the screens' },
      { key: 'fail_safe', title: 'Fails a screen, found safe' },
      { key: 'fail', title: 'Fails a screen' },
    ],
    evidence: 'Results and supporting analysis',
    source: sgip.adapted('SG-20', '2.2', 'Counted from the notice that the request is complete.'),
  }),
  stepWith({
    key: 'agreement_screens',
    title: 'Send the agreement after the screens',
    short: 'Agreement sent',
    stage: 'Agreement',
    party: 'operator',
    needs: { outcome: 'initial_review', in: ['pass', 'fail_safe'] },
    expected: true,
    start: { mode: 'all', of: [{ step: 'initial_review', outcome: ['pass', 'fail_safe'] }] },
    clocks: [{ length: 5, unit: 'business_day' }],
    outcomes: [{ key: 'sent', title: 'Executable agreement sent' }],
    source: sgip.adapted('SG-21', '2.2.2, 2.2.3', 'Also SG-22: failed, but found safe.'),
  }),
]

const customerOptions: Step[] = [
  stepWith({
    key: 'options_notice',
    title: 'Notice of the failed screens with data',
    short: 'Screen notice',
    stage: 'Customer options',
    party: 'operator',
    needs: failed,
    start: { mode: 'all', of: [{ step: 'initial_review', outcome: ['fail'] }] },
    clocks: [{ length: 5, unit: 'business_day' }],
    outcomes: [{ key: 'given', title: 'Notice and data given' }],
    overtakenBy: ['options'],
    source: sgip.adapted('SG-24', '2.3', 'Offer of options: SG-23, 2.2.4.'),
  }),
  stepWith({
    key: 'options_meeting',
    title: 'Offer the customer options meeting',
    short: 'Options meeting',
    stage: 'Customer options',
    party: 'operator',
    needs: failed,
    start: { mode: 'all', of: [{ step: 'initial_review', outcome: ['fail'] }] },
    clocks: [{ length: 10, unit: 'business_day' }],
    outcomes: [
      { key: 'held', title: 'Meeting held' },
      { key: 'declined', title: 'Meeting declined' },
    ],
    overtakenBy: ['options'],
    source: sgip.adapted('SG-25', '2.3'),
  }),
  stepWith({
    key: 'options',
    title: 'Option offered',
    stage: 'Customer options',
    party: 'operator',
    needs: failed,
    start: {
      mode: 'any',
      of: [
        { step: 'options_notice' },
        { step: 'options_meeting' },
        { step: 'initial_review', outcome: ['fail'] },
      ],
    },
    outcomes: [
      { key: 'modifications', title: 'Minor modifications with a cost estimate' },
      { key: 'supplemental', title: 'Supplemental review with a cost estimate' },
      { key: 'study', title: 'Study process' },
    ],
    source: sgip.adapted('SG-27', '2.3.1 to 2.3.3'),
  }),
  stepWith({
    key: 'accept_modifications',
    title: 'Agree to pay for the modifications',
    short: 'Modifications',
    stage: 'Customer options',
    party: 'applicant',
    needs: { outcome: 'options', in: ['modifications'] },
    start: { mode: 'all', of: [{ step: 'options', outcome: ['modifications'] }] },
    outcomes: [{ key: 'agreed', title: 'Agreed to pay' }],
    source: sgip.adapted('SG-26', '2.3.1', 'The pro forma sets no time to answer.'),
  }),
  stepWith({
    key: 'agreement_modifications',
    title: 'Send the agreement with modifications',
    short: 'Agreement sent',
    stage: 'Agreement',
    party: 'operator',
    needs: { outcome: 'accept_modifications', in: ['agreed'] },
    start: { mode: 'all', of: [{ step: 'accept_modifications' }] },
    clocks: [{ length: 10, unit: 'business_day' }],
    outcomes: [{ key: 'sent', title: 'Executable agreement sent' }],
    source: sgip.adapted('SG-26', '2.3.1'),
  }),
]

const supplementalReview = (depositMinor?: number): Step[] => [
  stepWith({
    key: 'accept_supplemental',
    title: 'Accept supplemental review',
    short: 'Accept review',
    stage: 'Supplemental review',
    party: 'applicant',
    needs: { outcome: 'options', in: ['supplemental'] },
    start: { mode: 'all', of: [{ step: 'options', outcome: ['supplemental'] }] },
    clocks: [{ length: 15, unit: 'business_day' }],
    obligations: [
      {
        key: 'agreement',
        title: 'Written agreement, with the order of screens if wished',
        what: 'document',
      },
      {
        key: 'deposit',
        title: 'Deposit of the estimated cost',
        what: 'money',
        leadBusinessDays: 3,
        ...(depositMinor !== undefined && { target: { kind: 'fixed', amountMinor: depositMinor } }),
      },
    ],
    outcomes: [
      { key: 'accepted', title: 'Accepted, deposit paid' },
      { key: 'study', title: 'Goes to the study process' },
    ],
    onMiss: {
      effect: 'track',
      say: 'The request goes to the study process.',
      first: 'Send the agreement and the deposit.',
    },
    source: sgip.adapted('SG-29', '2.4.1', 'Screen order and standing instructions: SG-30, 2.4.2.'),
  }),
  stepWith({
    key: 'supplemental_review',
    title: 'Supplemental review',
    stage: 'Supplemental review',
    party: 'operator',
    needs: { outcome: 'accept_supplemental', in: ['accepted'] },
    start: {
      mode: 'any',
      of: [
        { step: 'accept_supplemental', outcome: ['accepted'] },
        { step: 'screen_answer', instance: 'previous' },
      ],
    },
    clocks: [{ from: { step: 'accept_supplemental' }, length: 30, unit: 'business_day' }],
    outcomes: [
      { key: 'pass', title: 'Passes, nothing to build' },
      { key: 'pass_minor', title: 'Passes with facilities or minor modifications' },
      { key: 'more', title: 'More than minor modifications' },
      { key: 'screen_failed', title: 'A screen failed or could not be run' },
    ],
    source: sgip.adapted('SG-33', '2.4.4', 'Counted from receipt of the deposit.'),
  }),
  stepWith({
    key: 'screen_question',
    title: 'Ask whether to go on after a failed screen',
    short: 'Failed screen',
    stage: 'Supplemental review',
    party: 'operator',
    needs: { outcome: 'supplemental_review', in: ['screen_failed'] },
    start: { mode: 'all', of: [{ step: 'supplemental_review', outcome: ['screen_failed'] }] },
    clocks: [{ length: 2, unit: 'business_day' }],
    outcomes: [{ key: 'asked', title: 'Asked' }],
    source: sgip.memory('SG-34', '2.4.4'),
  }),
  stepWith({
    key: 'screen_answer',
    title: 'Answer: go on, study, or withdraw',
    short: 'Answer',
    stage: 'Supplemental review',
    party: 'applicant',
    needs: { outcome: 'supplemental_review', in: ['screen_failed'] },
    start: { mode: 'all', of: [{ step: 'screen_question' }] },
    outcomes: [
      { key: 'continue', title: 'Go on with the review' },
      { key: 'study', title: 'Go to the study process' },
    ],
    source: sgip.memory('SG-34', '2.4.4'),
  }),
  stepWith({
    key: 'agreement_supplemental',
    title: 'Send the agreement after the supplemental review',
    short: 'Agreement sent',
    stage: 'Agreement',
    party: 'operator',
    needs: { outcome: 'supplemental_review', in: ['pass', 'pass_minor'] },
    start: { mode: 'all', of: [{ step: 'supplemental_review', outcome: ['pass', 'pass_minor'] }] },
    clocks: [
      {
        when: { outcome: 'supplemental_review', in: ['pass_minor'] },
        length: 15,
        unit: 'business_day',
      },
      { length: 10, unit: 'business_day' },
    ],
    outcomes: [{ key: 'sent', title: 'Executable agreement sent' }],
    source: sgip.memory(
      'SG-35',
      '2.4.5.1, 2.4.5.2',
      'medium',
      'SG-36: 15 business days with facilities, counted from the results.',
    ),
  }),
]

const supplementalAccount: Step[] = accountSteps({
  key: 'supplemental',
  title: 'supplemental review',
  stage: 'Supplemental review',
  clock: { length: 20, unit: 'business_day' },
  source: sgip.adapted(
    'SG-31',
    '2.4.3',
    'SG-32: the refund has the same clock. Counted from receipt of the invoice, or from the end of a dispute about it.',
  ),
})

const studyTrack = stepWith({
  key: 'to_study',
  title: 'Continue in the study process',
  short: 'Study process',
  stage: 'Study process',
  party: 'both',
  needs: toStudy,
  start: {
    mode: 'any',
    of: [
      { step: 'options', outcome: ['study'] },
      { step: 'accept_supplemental', outcome: ['study'] },
      { step: 'supplemental_review', outcome: ['more'] },
      { step: 'screen_answer', outcome: ['study'] },
    ],
  },
  outcomes: [{ key: 'moved', title: 'Moved to the study process' }],
  source: sgip.memory('SG-37', '2.3.3, 2.4.5.3', 'high', 'Also SG-28.'),
})

interface FastTrackOptions {
  supplementalDepositMinor?: number
}

export const fastTrackStages = [
  'Request',
  'Screens',
  'Customer options',
  'Supplemental review',
  'Study process',
  'Agreement',
  'Construction',
  'Testing',
  'Operation',
]

export const fastTrackLoops: Loop[] = [deficiencyLoop, screensLoop, retestLoop]

/** From the complete request to the agreement, or to the study process: SG-20 to SG-37. */
export function screensToAgreement(options: FastTrackOptions = {}): Step[] {
  return [
    ...initialReview,
    ...customerOptions,
    ...supplementalReview(options.supplementalDepositMinor),
    ...supplementalAccount,
    studyTrack,
  ]
}

/** What follows a fast track: where its agreement comes from and when the utility builds. */
export const afterFastTrack = {
  tendered: [
    { step: 'agreement_screens' },
    { step: 'agreement_modifications' },
    { step: 'agreement_supplemental' },
  ] satisfies StepRef[],
  construction: {
    any: [
      { outcome: 'supplemental_review', in: ['pass_minor'] },
      { outcome: 'accept_modifications', in: ['agreed'] },
    ],
  } satisfies Expr,
}

/** The federal small-generator fast track: SG-04 to SG-37, then agreement and testing. */
export function federalFastTrack(options: FastTrackOptions = {}): ProcedureBody {
  return {
    key: 'federal_fast_track',
    title: 'Small generator, fast track',
    stages: fastTrackStages,
    filedStep: 'file',
    operationStep: 'operation',
    loops: fastTrackLoops,
    steps: [
      ...smallGeneratorEntry({ title: 'Fast track fee, not refundable', amountMinor: 50_000 }),
      ...screensToAgreement(options),
      ...agreementToOperation(afterFastTrack),
      ...objections(),
    ],
  }
}
