import type { Expr, Loop, Step, StepRef } from '@/lib/domain/clocks/procedure'
import { noticeDuty, sources, stepWith, withdrawn } from '@/lib/domain/clocks/library/step-of'

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
}

/** Agreement, construction, testing and final accounting: SG-70 to SG-79. */
export function agreementToOperation({ tendered, construction }: AgreementOptions): Step[] {
  return [
    stepWith({
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
      onMiss: withdrawn('Sign, or ask for the unsigned filing, before the hour closes.'),
      evidence: 'Signed agreement and proof of delivery',
      source: sgip.memory('SG-70', '4.8'),
    }),
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
      source: sgia.memory('SG-71', '6.2'),
    }),
    stepWith({
      key: 'test_notice',
      title: 'Give notice of the witness test',
      short: 'Test notice',
      stage: 'Testing',
      party: 'applicant',
      owner: 'liaison',
      start: {
        mode: 'any',
        of: [{ step: 'sign' }, { step: 'witness_test', instance: 'previous' }],
      },
      clocks: [
        {
          from: { step: 'witness_test', date: 'scheduled' },
          length: 5,
          unit: 'business_day',
          direction: 'before',
        },
      ],
      outcomes: [{ key: 'given', title: 'Notice given' }],
      onMiss: {
        effect: 'duty',
        say: 'The test moves by the days lost.',
        first: 'Give the notice now and name the new day.',
      },
      source: sgip.memory('SG-75', '4.4; SGIA 2.1.1'),
    }),
    stepWith({
      key: 'witness_test',
      title: 'Witness test',
      stage: 'Testing',
      party: 'both',
      owner: 'engineer',
      start: { mode: 'all', of: [{ step: 'test_notice' }] },
      clocks: [
        { from: { step: 'witness_test', date: 'scheduled' }, length: 0, unit: 'calendar_day' },
      ],
      outcomes: [
        { key: 'passed', title: 'Passed' },
        { key: 'failed', title: 'Failed, to be repeated' },
      ],
      onMiss: {
        effect: 'duty',
        say: 'The test is to be booked anew.',
        first: 'Agree on a new day.',
      },
      evidence: 'Test report',
      source: sgia.memory('SG-76', '2.1.1, 2.1.2'),
    }),
    stepWith({
      key: 'insurance',
      title: 'Show proof of insurance',
      short: 'Insurance',
      stage: 'Testing',
      party: 'applicant',
      start: { mode: 'all', of: [{ step: 'sign' }] },
      clocks: [
        {
          from: { step: 'operation', date: 'scheduled' },
          length: 10,
          unit: 'business_day',
          direction: 'before',
        },
      ],
      outcomes: [{ key: 'shown', title: 'Proof given' }],
      onMiss: {
        effect: 'duty',
        say: 'No parallel operation before it is shown.',
        first: 'Send the certificate.',
      },
      source: sgia.memory('SG-79', '8.1'),
    }),
    stepWith({
      key: 'authorization',
      title: 'Authorize parallel operation',
      short: 'Permission',
      stage: 'Testing',
      party: 'operator',
      start: { mode: 'all', of: [{ step: 'witness_test', outcome: ['passed'] }] },
      clocks: [],
      outcomes: [{ key: 'authorized', title: 'Authorized in writing' }],
      onMiss: noticeDuty,
      source: sgia.memory('SG-77', '2.2', 'high', 'No number; not to be withheld without reason.'),
    }),
    stepWith({
      key: 'operation',
      title: 'Commercial operation',
      short: 'COD',
      stage: 'Operation',
      party: 'applicant',
      start: { mode: 'all', of: [{ step: 'authorization' }] },
      outcomes: [{ key: 'operating', title: 'In operation' }],
      source: sgia.memory('SG-77', '2.2'),
    }),
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
  ]
}
