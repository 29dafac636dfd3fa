import { noticeDuty, sources, stepWith } from '@/lib/domain/clocks/library/step-of'
import type { Step } from '@/lib/domain/clocks/procedure'

const sgip = sources('Pro forma SGIP')
const sgia = sources('Pro forma SGIA')

/** Test notice, witness test, insurance, permission, operation: SG-75 to SG-79. */
export function testingToOperation(testNoticeDays: number): Step[] {
  return [
    ...witnessTest(testNoticeDays),
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
      typical: { shortest: 60, likely: 180, longest: 380 },
      source: sgia.memory(
        'SG-79',
        '8.1',
        'high',
        'SG-78: the amount is what size and nature need; no figure. Self-insurance is possible.',
      ),
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
      typical: { shortest: 3, likely: 10, longest: 30 },
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
      typical: { shortest: 1, likely: 7, longest: 21 },
      source: sgia.memory('SG-77', '2.2'),
    }),
  ]
}

function witnessTest(noticeDays: number): Step[] {
  return [
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
          length: noticeDays,
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
      typical: { shortest: 80, likely: 200, longest: 400 },
      source: sgip.memory('SG-75', '4.4; SGIA 2.1.1', 'high', 'The test is on a business day.'),
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
      typical: { shortest: 7, likely: 14, longest: 30 },
      source: sgia.memory(
        'SG-76',
        '2.1.1, 2.1.2',
        'high',
        'A written report follows and its receipt is acknowledged; no number.',
      ),
    }),
  ]
}
