import type { ClusterRules } from '@/lib/domain/clocks/library/cluster-options'
import { readinessAccount } from '@/lib/domain/clocks/library/cluster-money'
import { noticeDuty, sources, stepWith } from '@/lib/domain/clocks/library/step-of'
import type { Loop, ObligationRule, Step } from '@/lib/domain/clocks/procedure'

const lgip = sources('Pro forma LGIP after Order 2023')

export const clusterDeficiencyLoop: Loop = {
  key: 'deficiency',
  scope: ['validity', 'cure'],
  again: { step: 'cure', outcome: 'supplied' },
}

/** Window, request, deficiency and cure: LG-01 to LG-06. */
export function clusterRequest(rules: ClusterRules): Step[] {
  return [...windowSteps(rules), fileStep(rules), ...validitySteps(rules)]
}

function windowSteps(rules: ClusterRules): Step[] {
  const source = lgip.read('LG-01', '3.4.1', '45 days, yearly; calendar days from memory.')
  return [
    stepWith({
      key: 'window_open',
      title: 'Request window opens',
      short: 'Window opens',
      stage: 'Request',
      party: 'operator',
      kind: 'window',
      clocks: [
        {
          from: { step: 'window_open', date: 'scheduled' },
          length: 0,
          unit: 'calendar_day',
          fromDayItself: true,
        },
      ],
      outcomes: [{ key: 'opened', title: 'Opened' }],
      overtakenBy: ['window_close', 'cluster_agreement', 'cluster_report'],
      source,
    }),
    stepWith({
      key: 'window_close',
      title: 'Request window closes',
      short: 'Window closes',
      stage: 'Request',
      party: 'operator',
      kind: 'window',
      start: { mode: 'all', of: [{ step: 'window_open' }] },
      clocks: [rules.calendarDays(rules.windowDays, { fromDayItself: true })],
      outcomes: [{ key: 'closed', title: 'Closed' }],
      onMiss: {
        effect: 'presumed',
        outcome: 'closed',
        say: 'The window closes by itself.',
        first: 'Confirm the day on which it closed.',
      },
      overtakenBy: ['cluster_agreement', 'cluster_report'],
      source,
    }),
  ]
}

function fileStep(rules: ClusterRules): Step {
  return stepWith({
    key: 'file',
    title: 'File the request',
    short: 'Filed',
    stage: 'Request',
    party: 'applicant',
    clocks: [
      {
        from: { step: 'window_close', date: 'due' },
        length: 0,
        unit: 'calendar_day',
        fromDayItself: true,
      },
    ],
    obligations: [...filedDocuments, ...filedMoney(rules)],
    outcomes: [{ key: 'filed', title: 'Filed' }],
    onMiss: {
      effect: 'track',
      say: 'The request waits for the next window.',
      first: 'File what is ready before the hour closes; a deficiency can be cured.',
    },
    evidence: 'Portal receipt with date and time',
    source: lgip.memory(
      'LG-02',
      '3.4.2, 3.1.1.1',
      'high',
      'LG-03, 3.4.2: in service within 7 years of the request, up to 10 by showing or agreement.',
    ),
  })
}

const filedDocuments: ObligationRule[] = [
  {
    key: 'form',
    title: 'Application: MW, POI, service type',
    what: 'document',
  },
  { key: 'models', title: 'Technical data and models', what: 'data', owner: 'engineer' },
  {
    key: 'land',
    title: 'Site control of at least 90 %, or the deposit in lieu',
    what: 'site_control',
  },
]

function filedMoney(rules: ClusterRules): ObligationRule[] {
  const lead = { what: 'money' as const, leadBusinessDays: rules.depositLeadDays }
  return [
    {
      ...lead,
      key: 'fee',
      title: 'Application fee',
      target: { kind: 'fixed', amountMinor: rules.applicationFeeMinor },
      refundable: 'Never.',
    },
    {
      ...lead,
      key: 'study_deposit',
      title: 'Study deposit',
      target: rules.studyDeposit,
      refundable: 'Less the cost of the studies.',
    },
    {
      ...lead,
      key: 'readiness',
      title: 'Readiness deposit',
      target: rules.readiness,
      account: readinessAccount,
      refundable: 'At commercial operation, or at withdrawal less the penalty.',
    },
  ]
}

function validitySteps(rules: ClusterRules): Step[] {
  return [
    stepWith({
      key: 'acknowledge',
      title: 'Acknowledge the request',
      short: 'Receipt',
      stage: 'Request',
      party: 'operator',
      start: { mode: 'all', of: [{ step: 'file' }] },
      clocks: [{ length: 5, unit: 'business_day' }],
      outcomes: [{ key: 'acknowledged', title: 'Acknowledged' }],
      overtakenBy: ['validity'],
      source: lgip.adapted('LG-04', '3.4.3'),
    }),
    stepWith({
      key: 'validity',
      title: 'Notice that the request is valid or deficient',
      short: 'Validity',
      stage: 'Request',
      party: 'operator',
      start: { mode: 'any', of: [{ step: 'file' }, { step: 'cure', instance: 'previous' }] },
      clocks: [{ length: 5, unit: 'business_day' }],
      outcomes: [
        { key: 'valid', title: 'Valid' },
        { key: 'deficient', title: 'Deficient, with a list of what is missing' },
      ],
      onMiss: {
        ...noticeDuty,
        first: 'Ask today: what is deficient must be cured before the window closes.',
      },
      evidence: 'Notice of validity or deficiency',
      source: lgip.memory('LG-05', '3.4.4', 'high', 'After a cure counted the same way.'),
    }),
    stepWith({
      key: 'cure',
      title: 'Cure the deficiency',
      short: 'Cure',
      stage: 'Request',
      party: 'applicant',
      owner: 'engineer',
      needs: { outcome: 'validity', in: ['deficient'] },
      start: { mode: 'all', of: [{ step: 'validity', outcome: ['deficient'] }] },
      clocks: [
        {
          length: rules.cureDays,
          unit: 'business_day',
          neverAfter: { step: 'window_close', date: 'due' },
        },
      ],
      outcomes: [{ key: 'supplied', title: 'Listed items supplied' }],
      onMiss: rules.cureMissed,
      evidence: 'Receipt of what was supplied',
      source: lgip.memory(
        'LG-06',
        '3.4.4',
        'medium',
        'Never after the window closes: validity is settled by then (read, Order 2023-A).',
      ),
    }),
  ]
}
