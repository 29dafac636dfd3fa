import { readinessAccount } from '@/lib/domain/clocks/library/cluster-money'
import type { ClusterRules } from '@/lib/domain/clocks/library/cluster-options'
import { affectedWait } from '@/lib/domain/clocks/library/affected-system'
import { noticeDuty, sources, stepWith, withdrawn } from '@/lib/domain/clocks/library/step-of'
import type { Loop, Step } from '@/lib/domain/clocks/procedure'

const lgip = sources('Pro forma LGIP after Order 2023')

export const restudyLoop: Loop = {
  key: 'restudy',
  scope: [
    'cluster_report',
    'affected_notice',
    'report_meeting',
    'gate_1',
    'restudy_decision',
    'affected_wait',
  ],
  again: { step: 'restudy_decision', outcome: 'restudy' },
}

/** Engagement window and cluster study agreement: LG-07 to LG-12. */
export function clusterEngagement(rules: ClusterRules): Step[] {
  const afterWindow: Pick<Step, 'stage' | 'start'> = {
    stage: 'Engagement',
    start: { mode: 'all', of: [{ step: 'window_close' }] },
  }
  return [
    stepWith({
      ...afterWindow,
      key: 'list_posted',
      title: 'Post the list of valid requests',
      short: 'List',
      party: 'operator',
      clocks: [{ length: 10, unit: 'business_day', fromDayItself: true }],
      outcomes: [{ key: 'posted', title: 'Posted' }],
      overtakenBy: ['cluster_agreement', 'cluster_report'],
      source: lgip.memory('LG-09', '3.4.5'),
    }),
    stepWith({
      ...afterWindow,
      key: 'cluster_tender',
      title: 'Tender the cluster study agreement',
      short: 'Agreement tendered',
      party: 'operator',
      needs: { outcome: 'validity', in: ['valid'] },
      expected: true,
      clocks: [{ length: 5, unit: 'business_day', fromDayItself: true }],
      outcomes: [{ key: 'sent', title: 'Agreement sent' }],
      overtakenBy: ['cluster_agreement', 'cluster_report'],
      source: lgip.memory('LG-07', '7.1', 'medium'),
    }),
    stepWith({
      ...afterWindow,
      key: 'group_scoping',
      title: 'Group scoping meeting',
      short: 'Scoping',
      party: 'operator',
      clocks: [byEngagementClose],
      outcomes: [{ key: 'held', title: 'Held' }],
      overtakenBy: ['cluster_report'],
      source: lgip.memory('LG-10', '3.4.5, 3.4.6', 'high', 'Inside the engagement window.'),
    }),
    stepWith({
      ...afterWindow,
      key: 'engagement_close',
      title: 'Customer engagement window closes',
      short: 'Engagement closes',
      party: 'operator',
      kind: 'window',
      clocks: [rules.calendarDays(60, { fromDayItself: true })],
      outcomes: [{ key: 'closed', title: 'Closed' }],
      onMiss: {
        effect: 'presumed',
        outcome: 'closed',
        say: 'The window closes by itself.',
        first: 'Confirm the day on which it closed.',
      },
      overtakenBy: ['cluster_report'],
      source: lgip.memory(
        'LG-08',
        '3.4.5',
        'high',
        'Shorter with the written consent of every customer in the cluster.',
      ),
    }),
    ...agreementSteps,
  ]
}

const byEngagementClose: Step['clocks'][number] = {
  from: { step: 'engagement_close', date: 'due' },
  length: 0,
  unit: 'calendar_day',
  fromDayItself: true,
}

const agreementSteps: Step[] = [
  stepWith({
    key: 'cluster_agreement',
    title: 'Sign the cluster study agreement',
    short: 'Agreement signed',
    stage: 'Engagement',
    party: 'applicant',
    needs: { outcome: 'validity', in: ['valid'] },
    expected: true,
    start: { mode: 'all', of: [{ step: 'cluster_tender' }] },
    clocks: [byEngagementClose],
    outcomes: [{ key: 'signed', title: 'Signed and returned' }],
    onMiss: {
      ...withdrawn('Sign and send it before the hour closes.'),
      say: 'Not studied: the request is withdrawn.',
    },
    evidence: 'Signed agreement and proof of delivery',
    source: lgip.memory(
      'LG-11',
      '7.2',
      'high',
      'LG-39, 4.4.1: until it is returned the request may be cut by up to 60 %.',
    ),
  }),
  stepWith({
    key: 'data_check',
    title: 'Notice of deficient technical data',
    short: 'Data check',
    stage: 'Engagement',
    party: 'operator',
    start: { mode: 'all', of: [{ step: 'cluster_agreement' }] },
    clocks: [{ length: 5, unit: 'business_day' }],
    outcomes: [
      { key: 'in_order', title: 'In order' },
      { key: 'deficient', title: 'Deficient' },
    ],
    onMiss: {
      effect: 'duty',
      say: 'Without a notice the data stand.',
      first: 'Ask whether the data are in order.',
    },
    overtakenBy: ['cluster_report'],
    source: lgip.memory('LG-12', '7.2', 'medium'),
  }),
  stepWith({
    key: 'data_cure',
    title: 'Cure the technical data',
    short: 'Data cure',
    stage: 'Engagement',
    party: 'applicant',
    owner: 'engineer',
    needs: { outcome: 'data_check', in: ['deficient'] },
    start: { mode: 'all', of: [{ step: 'data_check', outcome: ['deficient'] }] },
    clocks: [{ length: 10, unit: 'business_day' }],
    outcomes: [{ key: 'supplied', title: 'Supplied' }],
    onMiss: withdrawn('Send what is ready, and ask in writing for the rest.'),
    source: lgip.memory('LG-12', '7.2', 'medium'),
  }),
]

/** Cluster study and restudies, each with its meeting, gate 1 and decision: LG-14 to LG-21. */
export function clusterStudy(rules: ClusterRules): Step[] {
  return [
    reportStep(rules),
    noticeStep,
    meetingStep,
    gateOne(rules),
    decisionStep(rules),
    affectedWait,
  ]
}

function reportStep(rules: ClusterRules): Step {
  return stepWith({
    key: 'cluster_report',
    title: 'Cluster study report',
    short: 'Cluster report',
    stage: 'Cluster study',
    party: 'operator',
    start: {
      mode: 'any',
      of: [
        { step: 'engagement_close' },
        { step: 'restudy_decision', instance: 'previous', outcome: ['restudy'] },
      ],
    },
    clocks: [
      rules.calendarDays(150, { when: { instanceAbove: 1 }, onMiss: rules.late('$2,000') }),
      rules.calendarDays(150, { fromDayItself: true }),
    ],
    outcomes: [{ key: 'issued', title: 'Issued and posted' }],
    onMiss: rules.late('$1,000'),
    evidence: 'Report with the cost assigned to the request',
    typical: { shortest: 150, likely: 165, longest: 230 },
    source: lgip.memory(
      'LG-14',
      '7.4',
      'high',
      'A restudy counts 150 calendar days from its notice: LG-19, 7.5 (read). Penalties: 3.9.',
    ),
  })
}

const noticeStep = stepWith({
  key: 'affected_notice',
  title: 'Tell the affected system operator',
  short: 'Affected system told',
  stage: 'Cluster study',
  party: 'operator',
  start: { mode: 'all', of: [{ step: 'cluster_report' }] },
  clocks: [{ length: 10, unit: 'business_day' }],
  outcomes: [
    { key: 'none', title: 'No affected system' },
    { key: 'told', title: 'Affected system operator told' },
  ],
  overtakenBy: ['facilities_tender'],
  source: lgip.memory(
    'LG-16',
    '3.6.1',
    'high',
    'LG-21 (read): after a restudy whether or not it was named before.',
  ),
})

const meetingStep = stepWith({
  key: 'report_meeting',
  title: 'Cluster study report meeting',
  short: 'Report meeting',
  stage: 'Cluster study',
  party: 'operator',
  start: { mode: 'all', of: [{ step: 'cluster_report' }] },
  clocks: [{ length: 10, unit: 'business_day' }],
  outcomes: [{ key: 'held', title: 'Held' }],
  onMiss: { ...noticeDuty, first: 'Ask for a day: the gate counts from the meeting.' },
  source: lgip.memory('LG-15', '7.4'),
})

function gateOne(rules: ClusterRules): Step {
  return stepWith({
    key: 'gate_1',
    title: 'Gate 1: site control and deposit',
    short: 'Gate 1',
    stage: 'Cluster study',
    party: 'applicant',
    kind: 'gate',
    start: { mode: 'all', of: [{ step: 'report_meeting' }] },
    clocks: [rules.calendarDays(20, { fromDayItself: true })],
    obligations: [
      { key: 'land', title: 'Continued site control', what: 'site_control' },
      {
        key: 'deposit',
        title: `Readiness deposit to ${rules.gatePercents.gate1} % of assigned cost`,
        what: 'money',
        target: { kind: 'share', percent: rules.gatePercents.gate1 },
        account: readinessAccount,
        refundable: 'At commercial operation, or at withdrawal less the penalty.',
        leadBusinessDays: rules.depositLeadDays,
      },
    ],
    outcomes: [
      { key: 'proceed', title: 'Proceed' },
      { key: 'reduced', title: 'Proceed with fewer MW' },
    ],
    onMiss: rules.gateMissed,
    evidence: 'Receipt of the deposit and of the site control',
    source: lgip.memory(
      'LG-17',
      '7.5',
      'medium',
      'After a restudy the deposit is adjusted to the new assignment: LG-20, 7.5.',
    ),
  })
}

function decisionStep(rules: ClusterRules): Step {
  return stepWith({
    key: 'restudy_decision',
    title: 'Notice whether a restudy is needed',
    short: 'Restudy or not',
    stage: 'Cluster study',
    party: 'operator',
    start: { mode: 'all', of: [{ step: 'report_meeting' }] },
    clocks: [rules.calendarDays(30, { fromDayItself: true })],
    outcomes: [
      { key: 'none', title: 'No restudy' },
      { key: 'restudy', title: 'Restudy' },
    ],
    typical: { shortest: 25, likely: 30, longest: 40 },
    source: lgip.memory('LG-18', '7.5', 'medium'),
  })
}
