import type { ClusterRules } from '@/lib/domain/clocks/library/cluster-options'
import { sources, stepWith } from '@/lib/domain/clocks/library/step-of'
import type { Step } from '@/lib/domain/clocks/procedure'

const lgia = sources('Pro forma LGIA')
const lgip = sources('Pro forma LGIP after Order 2023')

/** From the signed agreement to operation: dates are those of the agreement's milestones. */
export function clusterOperation(rules: ClusterRules): Step[] {
  return [securityStep(rules), ...works, ...energised]
}

function securityStep(rules: ClusterRules): Step {
  return stepWith({
    key: 'security',
    title: 'Post construction security',
    short: 'Security',
    stage: 'Construction',
    party: 'applicant',
    start: { mode: 'all', of: [{ step: 'gate_3' }] },
    clocks: [
      {
        from: { step: 'work_start', date: 'scheduled' },
        length: rules.securityDays,
        unit: 'calendar_day',
        direction: 'before',
        roll: 'previous_business_day',
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
    typical: { shortest: 20, likely: 40, longest: 80 },
    source: lgia.memory(
      'LGIA-11.5',
      '11.5',
      'medium',
      'At least 30 calendar days before the work.',
    ),
  })
}

const works: Step[] = [
  stepWith({
    key: 'work_start',
    title: 'Start of the utility’s work',
    short: 'Work starts',
    stage: 'Construction',
    party: 'operator',
    start: { mode: 'all', of: [{ step: 'gate_3' }] },
    clocks: [
      {
        from: { step: 'work_start', date: 'scheduled' },
        length: 0,
        unit: 'calendar_day',
        fromDayItself: true,
      },
    ],
    outcomes: [{ key: 'started', title: 'Started' }],
    typical: { shortest: 30, likely: 60, longest: 90 },
    source: lgia.memory('LGIA-B', 'Appendix B'),
  }),
  stepWith({
    key: 'utility_built',
    title: 'Utility facilities in service',
    short: 'Utility built',
    stage: 'Construction',
    party: 'operator',
    start: { mode: 'all', of: [{ step: 'work_start' }] },
    clocks: [
      {
        from: { step: 'utility_built', date: 'scheduled' },
        length: 0,
        unit: 'calendar_day',
        fromDayItself: true,
      },
    ],
    outcomes: [{ key: 'in_service', title: 'In service' }],
    typical: { shortest: 420, likely: 560, longest: 700 },
    source: lgia.memory('LGIA-B', 'Appendix B'),
  }),
  stepWith({
    key: 'built',
    title: 'Build the facility',
    short: 'Built',
    stage: 'Construction',
    party: 'applicant',
    owner: 'engineer',
    start: { mode: 'all', of: [{ step: 'gate_3' }] },
    outcomes: [{ key: 'complete', title: 'Mechanically complete' }],
    typical: { shortest: 400, likely: 540, longest: 680 },
    source: lgia.memory('LGIA-B', 'Appendix B'),
  }),
]

const energised: Step[] = [
  stepWith({
    key: 'backfeed',
    title: 'Back-feed',
    stage: 'Construction',
    party: 'operator',
    start: { mode: 'all', of: [{ step: 'utility_built' }, { step: 'built' }] },
    clocks: [
      {
        from: { step: 'backfeed', date: 'scheduled' },
        length: 0,
        unit: 'calendar_day',
        fromDayItself: true,
      },
    ],
    outcomes: [{ key: 'given', title: 'Given' }],
    typical: { shortest: 7, likely: 21, longest: 30 },
    source: lgia.memory('LGIA-B', 'Appendix B', 'high', 'The in-service date of the agreement.'),
  }),
  stepWith({
    key: 'first_sync',
    title: 'First synchronization and trial operation',
    short: 'First sync',
    stage: 'Operation',
    party: 'applicant',
    owner: 'engineer',
    start: { mode: 'all', of: [{ step: 'backfeed' }] },
    clocks: [
      {
        from: { step: 'first_sync', date: 'scheduled' },
        length: 0,
        unit: 'calendar_day',
        fromDayItself: true,
      },
    ],
    outcomes: [{ key: 'synchronized', title: 'Synchronized' }],
    typical: { shortest: 45, likely: 75, longest: 90 },
    source: lgia.memory('LGIA-B', 'Appendix B'),
  }),
  stepWith({
    key: 'operation',
    title: 'Commercial operation',
    short: 'COD',
    stage: 'Operation',
    party: 'applicant',
    start: { mode: 'all', of: [{ step: 'first_sync' }] },
    clocks: [
      {
        from: { step: 'operation', date: 'scheduled' },
        length: 0,
        unit: 'calendar_day',
        fromDayItself: true,
      },
    ],
    outcomes: [{ key: 'operating', title: 'In operation' }],
    onMiss: {
      effect: 'extension',
      say: 'A later date is not material up to 3 years in all; beyond that it is reviewed.',
      first: 'Ask for the extension before the date passes.',
    },
    typical: { shortest: 45, likely: 60, longest: 75 },
    source: lgip.memory('LG-38', '4.4.5', 'medium'),
  }),
]
