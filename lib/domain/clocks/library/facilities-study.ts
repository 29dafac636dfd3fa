import { noticeDuty, sources, stepWith } from '@/lib/domain/clocks/library/step-of'
import type { Expr, Roll, Step } from '@/lib/domain/clocks/procedure'

const sgip = sources('Pro forma SGIP')

interface FacilitiesOptions {
  returnDays: number
  depositMinor?: number
  roll: { roll?: Roll }
}

const studied: Expr = { any: [{ done: 'distribution_study' }, { done: 'transmission_study' }] }

const upgrades: Expr = {
  any: [
    { outcome: 'distribution_study', in: ['upgrades'] },
    { outcome: 'transmission_study', in: ['upgrades'] },
  ],
}

/** Facilities study from its agreement to the executable agreement: SG-61 to SG-67. */
export function facilitiesSteps(options: FacilitiesOptions): Step[] {
  return [...agreementSteps(options), ...draftSteps(options.roll), ...resultSteps]
}

function agreementSteps({ returnDays, depositMinor }: FacilitiesOptions): Step[] {
  return [
    stepWith({
      key: 'facilities_tender',
      title: 'Send the impact report with the facilities study agreement',
      short: 'Agreement tendered',
      stage: 'Facilities study',
      party: 'operator',
      needs: studied,
      expected: true,
      start: {
        mode: 'all',
        of: [{ step: 'distribution_study' }, { step: 'transmission_study' }],
      },
      clocks: [{ length: 5, unit: 'business_day' }],
      outcomes: [{ key: 'sent', title: 'Report and agreement sent' }],
      source: sgip.memory('SG-61', '3.5.1'),
    }),
    stepWith({
      key: 'facilities_agreement',
      title: 'Return the facilities study agreement',
      short: 'Agreement returned',
      stage: 'Facilities study',
      party: 'applicant',
      needs: studied,
      expected: true,
      start: { mode: 'all', of: [{ step: 'facilities_tender' }] },
      clocks: [{ length: returnDays, unit: 'business_day' }],
      obligations: [
        { key: 'agreement', title: 'Signed agreement', what: 'document' },
        {
          key: 'deposit',
          title: 'Deposit of the estimated cost',
          what: 'money',
          leadBusinessDays: 3,
          ...(depositMinor !== undefined && {
            target: { kind: 'fixed' as const, amountMinor: depositMinor },
          }),
        },
      ],
      outcomes: [{ key: 'returned', title: 'Returned with the deposit' }],
      onMiss: {
        effect: 'withdrawn',
        say: 'The request drops out of the queue.',
        first: 'Return it, or ask for more time: a request made in time counts as timely.',
      },
      source: sgip.adapted('SG-62', '3.5.2', 'Deposit: SG-63, 3.5.5.'),
    }),
    stepWith({
      key: 'facilities_study',
      title: 'Facilities study, draft report',
      short: 'Facilities study',
      stage: 'Facilities study',
      party: 'operator',
      needs: studied,
      expected: true,
      start: { mode: 'all', of: [{ step: 'facilities_agreement' }] },
      clocks: [
        { when: upgrades, length: 45, unit: 'business_day' },
        { length: 30, unit: 'business_day' },
      ],
      outcomes: [{ key: 'draft', title: 'Draft report given' }],
      onMiss: noticeDuty,
      evidence: 'Draft report',
      source: sgip.adapted('SG-65', 'Att. 8', 'Without upgrades 30 business days: SG-64.'),
    }),
  ]
}

function draftSteps(roll: { roll?: Roll }): Step[] {
  const source = sgip.memory('SG-66', 'Att. 8', 'medium')
  const shared = {
    stage: 'Facilities study',
    needs: studied,
    start: { mode: 'all' as const, of: [{ step: 'facilities_study' }] },
    source,
  }
  return [
    stepWith({
      ...shared,
      key: 'draft_meeting',
      title: 'Meet on the draft report',
      short: 'Draft meeting',
      party: 'both',
      clocks: [{ length: 10, unit: 'business_day' }],
      outcomes: [{ key: 'held', title: 'Held' }],
      overtakenBy: ['final_report'],
    }),
    stepWith({
      ...shared,
      key: 'draft_comments',
      title: 'Comment on the draft report',
      short: 'Comments',
      party: 'applicant',
      owner: 'engineer',
      expected: true,
      clocks: [{ length: 30, unit: 'calendar_day', ...roll }],
      outcomes: [
        { key: 'comments', title: 'Comments given' },
        { key: 'no_comment', title: 'No comment' },
      ],
      onMiss: {
        effect: 'presumed',
        outcome: 'no_comment',
        say: 'The final report is made without our comments.',
        first: 'Send the comments, or say that there are none.',
      },
      overtakenBy: ['final_report'],
    }),
    stepWith({
      ...shared,
      key: 'final_report',
      title: 'Facilities study, final report',
      short: 'Final report',
      party: 'operator',
      expected: true,
      start: { mode: 'all', of: [{ step: 'draft_comments' }] },
      clocks: [{ length: 15, unit: 'business_day' }],
      outcomes: [{ key: 'given', title: 'Final report given' }],
      onMiss: noticeDuty,
      source: { ...source, note: 'May be extended on notice if the comments need more analysis.' },
    }),
  ]
}

const resultSteps: Step[] = [
  stepWith({
    key: 'agree_to_pay',
    title: 'Agree to pay for facilities and upgrades',
    short: 'Agreed to pay',
    stage: 'Agreement',
    party: 'applicant',
    needs: studied,
    expected: true,
    start: { mode: 'all', of: [{ step: 'final_report' }] },
    outcomes: [{ key: 'agreed', title: 'Agreed in writing' }],
    typical: { shortest: 5, likely: 15, longest: 30 },
    source: sgip.memory('SG-67', '3.5.7'),
  }),
  stepWith({
    key: 'agreement_study',
    title: 'Send the agreement after the facilities study',
    short: 'Agreement sent',
    stage: 'Agreement',
    party: 'operator',
    needs: studied,
    expected: true,
    start: { mode: 'all', of: [{ step: 'final_report' }, { step: 'agree_to_pay' }] },
    clocks: [{ length: 5, unit: 'business_day' }],
    outcomes: [{ key: 'sent', title: 'Executable agreement sent' }],
    source: sgip.memory('SG-67', '3.5.7'),
  }),
]
