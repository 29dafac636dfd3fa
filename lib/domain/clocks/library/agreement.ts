import { underTheAgreement } from '@/lib/domain/clocks/library/at-any-time'
import { noticeDuty, sources, stepWith, withdrawn } from '@/lib/domain/clocks/library/step-of'
import { testingToOperation } from '@/lib/domain/clocks/library/testing'
import type { Expr, Loop, Roll, Step, StepRef } from '@/lib/domain/clocks/procedure'

const sgip = sources('Pro forma SGIP')
const sgia = sources('Pro forma SGIA')

export const retestLoop: Loop = {
  key: 'retest',
  scope: ['test_notice', 'witness_test'],
  again: { step: 'witness_test', outcome: 'failed' },
}

interface AgreementOptions {
  /** The steps that bring the executable agreement. */
  tendered: StepRef[]
  /** When the utility builds something, so that security and its work are needed. */
  construction: Expr
  /** Business days of notice before the witness test; 5 in the pro forma. */
  testNoticeDays?: number
  /** Whether a deadline in calendar days rolls off a closed day. */
  calendarRoll?: Roll
}

/** Agreement, construction, testing and final accounting: SG-70 to SG-81. */
export function agreementToOperation(options: AgreementOptions): Step[] {
  const roll = options.calendarRoll ? { roll: options.calendarRoll } : {}
  return [
    signStep(options.tendered),
    ...constructionSteps(options.construction),
    ...testingToOperation(options.testNoticeDays ?? 5),
    ...accounting(options.construction, roll),
    ...underTheAgreement(roll),
  ]
}

function signStep(tendered: StepRef[]): Step {
  return stepWith({
    key: 'sign',
    title: 'Sign and return the agreement',
    short: 'Agreement signed',
    stage: 'Agreement',
    party: 'applicant',
    start: { mode: 'any', of: tendered },
    clocks: [{ length: 30, unit: 'business_day' }],
    outcomes: [
      { key: 'signed', title: 'Signed and returned' },
      { key: 'unsigned_filing', title: 'Asked to file it unsigned' },
    ],
    onMiss: withdrawn('Call, then sign or ask for the unsigned filing.'),
    evidence: 'Signed agreement and proof of delivery',
    source: sgip.memory(
      'SG-70',
      '4.8',
      'high',
      'SG-81, SGIA 3.2, 3.3: the term is 10 years or longer; we may end it on 20 business days of notice.',
    ),
  })
}

function constructionSteps(construction: Expr): Step[] {
  return [
    stepWith({
      key: 'security',
      title: 'Post security',
      stage: 'Construction',
      party: 'applicant',
      needs: construction,
      start: { mode: 'all', of: [{ step: 'sign' }] },
      clocks: [
        {
          from: { step: 'work_start', date: 'scheduled' },
          length: 20,
          unit: 'business_day',
          direction: 'before',
        },
      ],
      obligations: [
        {
          key: 'security',
          title: 'Guarantee, bond or letter of credit',
          what: 'money',
          leadBusinessDays: 20,
        },
      ],
      outcomes: [{ key: 'posted', title: 'Posted' }],
      onMiss: {
        effect: 'duty',
        say: 'The utility need not start its work.',
        first: 'Tell the bank and ask for a new start date.',
      },
      source: sgia.adapted('SG-72', '6.3'),
    }),
    stepWith({
      key: 'work_start',
      title: 'Start of the utility’s work',
      short: 'Work starts',
      stage: 'Construction',
      party: 'operator',
      needs: construction,
      start: { mode: 'all', of: [{ step: 'sign' }] },
      clocks: [
        { from: { step: 'work_start', date: 'scheduled' }, length: 0, unit: 'calendar_day' },
      ],
      outcomes: [{ key: 'started', title: 'Started' }],
      typical: { shortest: 20, likely: 45, longest: 90 },
      source: sgia.memory('SG-71', '6.2', 'high', 'Dates are those of the agreement’s milestones.'),
    }),
    stepWith({
      key: 'built',
      title: 'Build the facility',
      short: 'Built',
      stage: 'Construction',
      party: 'applicant',
      owner: 'engineer',
      start: { mode: 'all', of: [{ step: 'sign' }] },
      outcomes: [{ key: 'complete', title: 'Mechanically complete' }],
      typical: { shortest: 70, likely: 190, longest: 390 },
      source: sgia.memory('SG-71', '6.2'),
    }),
  ]
}

function accounting(construction: Expr, roll: { roll?: Roll }): Step[] {
  return [
    stepWith({
      key: 'final_accounting',
      title: 'Final accounting',
      stage: 'Operation',
      party: 'operator',
      needs: construction,
      start: { mode: 'all', of: [{ step: 'operation' }] },
      clocks: [{ length: 3, unit: 'month' }],
      outcomes: [{ key: 'settled', title: 'Account given' }],
      onMiss: { ...noticeDuty, first: 'Ask for the account and the release of security.' },
      source: sgia.memory(
        'SG-74',
        '6.1.2',
        'high',
        'Counted here from operation, the latest date on which construction is complete.',
      ),
    }),
    stepWith({
      key: 'final_payment',
      title: 'Pay or refund the balance',
      short: 'Balance settled',
      stage: 'Operation',
      party: 'both',
      needs: construction,
      start: { mode: 'all', of: [{ step: 'final_accounting' }] },
      clocks: [{ length: 30, unit: 'calendar_day', ...roll }],
      outcomes: [{ key: 'settled', title: 'Paid or refunded' }],
      onMiss: {
        effect: 'duty',
        say: 'The balance stays owed.',
        first: 'Pay it, or ask for the refund in writing.',
      },
      source: sgia.memory('SG-74', '6.1.2'),
    }),
  ]
}
