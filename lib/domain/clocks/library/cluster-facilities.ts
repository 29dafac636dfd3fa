import { readinessAccount } from '@/lib/domain/clocks/library/cluster-money'
import type { ClusterRules } from '@/lib/domain/clocks/library/cluster-options'
import { noticeDuty, sources, stepWith } from '@/lib/domain/clocks/library/step-of'
import type { Expr, Step } from '@/lib/domain/clocks/procedure'

const lgip = sources('Pro forma LGIP after Order 2023')
const stage = 'Facilities study'
/** No restudy in the last round: the way to the facilities study is open. */
const goesOn: Expr = { outcome: 'restudy_decision', in: ['none'] }

/** Facilities study with gate 2: LG-22 to LG-28. */
export function clusterFacilities(rules: ClusterRules): Step[] {
  return [
    stepWith({
      key: 'facilities_tender',
      title: 'Tender the facilities study agreement',
      short: 'Agreement tendered',
      stage,
      party: 'operator',
      needs: goesOn,
      expected: true,
      start: { mode: 'all', of: [{ step: 'restudy_decision', outcome: ['none'] }] },
      clocks: [{ length: 5, unit: 'business_day' }],
      outcomes: [{ key: 'sent', title: 'Agreement sent' }],
      source: lgip.memory('LG-22', '8.1', 'medium'),
    }),
    gateTwo(rules),
    draftStep(rules),
    ...reportSteps(rules),
    ...facilitiesRestudy(rules),
  ]
}

function gateTwo(rules: ClusterRules): Step {
  const percent = rules.gatePercents.gate2
  return stepWith({
    key: 'gate_2',
    title: 'Gate 2: agreement, data, site control and deposit',
    short: 'Gate 2',
    stage,
    party: 'applicant',
    kind: 'gate',
    needs: goesOn,
    expected: true,
    start: { mode: 'all', of: [{ step: 'facilities_tender' }] },
    clocks: [rules.calendarDays(30)],
    obligations: [
      { key: 'agreement', title: 'Facilities study agreement, signed', what: 'document' },
      { key: 'data', title: 'Technical data', what: 'data', owner: 'engineer' },
      { key: 'land', title: 'Site control of 100 %', what: 'site_control' },
      {
        key: 'deposit',
        title: `Readiness deposit to ${percent} % of assigned cost`,
        what: 'money',
        target: { kind: 'share', percent },
        account: readinessAccount,
        refundable: 'At commercial operation, or at withdrawal less the penalty.',
        leadBusinessDays: rules.depositLeadDays,
      },
    ],
    outcomes: [
      { key: 'within_20', title: 'Proceed, study within 20 %' },
      { key: 'within_10', title: 'Proceed, study within 10 %' },
    ],
    onMiss: rules.gateMissed,
    evidence: 'Signed agreement, receipt of the deposit, site control',
    source: lgip.memory(
      'LG-23',
      '8.1',
      'high',
      'LG-39, 4.4.2: a further cut by up to 15 % until the agreement is returned.',
    ),
  })
}

function draftStep(rules: ClusterRules): Step {
  return stepWith({
    key: 'facilities_draft',
    title: 'Facilities study, draft report',
    short: 'Draft report',
    stage,
    party: 'operator',
    needs: goesOn,
    expected: true,
    start: { mode: 'all', of: [{ step: 'gate_2' }] },
    clocks: [
      rules.calendarDays(180, { when: { outcome: 'gate_2', in: ['within_10'] } }),
      rules.calendarDays(90),
    ],
    outcomes: [{ key: 'given', title: 'Draft report given' }],
    onMiss: rules.late('$2,500'),
    evidence: 'Draft report',
    typical: { shortest: 90, likely: 125, longest: 160 },
    source: lgip.adapted(
      'LG-24',
      '8.3',
      'Within 20 %: 90 calendar days; within 10 %: 180 (from memory). We choose with gate 2.',
    ),
  })
}

function reportSteps(rules: ClusterRules): Step[] {
  const shared = {
    stage,
    needs: goesOn,
    start: { mode: 'all' as const, of: [{ step: 'facilities_draft' }] },
  }
  return [
    stepWith({
      ...shared,
      key: 'draft_meeting',
      title: 'Meet on the draft report',
      short: 'Draft meeting',
      party: 'both',
      owner: 'liaison',
      clocks: [{ length: 10, unit: 'business_day' }],
      outcomes: [{ key: 'held', title: 'Held' }],
      onMiss: {
        effect: 'duty',
        say: 'The meeting is still owed.',
        first: 'Agree on a day in writing.',
      },
      overtakenBy: ['final_report'],
      source: lgip.adapted('LG-25', '8.4'),
    }),
    stepWith({
      ...shared,
      key: 'draft_comments',
      title: 'Comment on the draft report',
      short: 'Comments',
      party: 'applicant',
      owner: 'engineer',
      expected: true,
      clocks: [rules.calendarDays(30)],
      outcomes: [
        { key: 'no_comment', title: 'No comment' },
        { key: 'comments', title: 'Comments given' },
      ],
      onMiss: {
        effect: 'presumed',
        outcome: 'no_comment',
        say: 'They proceed without our comments.',
        first: 'Send the comments, or say that there are none.',
      },
      overtakenBy: ['final_report'],
      source: lgip.adapted('LG-26', '8.3'),
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
      onMiss: { ...noticeDuty, say: 'Reasonable extension on notice.' },
      evidence: 'Final report with the cost assigned to the request',
      source: lgip.adapted('LG-27', '8.3'),
    }),
  ]
}

function facilitiesRestudy(rules: ClusterRules): Step[] {
  const source = lgip.memory('LG-28', '8.5', 'medium')
  return [
    stepWith({
      key: 'facilities_restudy_notice',
      title: 'Notice of a facilities restudy',
      short: 'Restudy notice',
      stage,
      party: 'operator',
      kind: 'anytime',
      outcomes: [{ key: 'given', title: 'Notice given' }],
      source,
    }),
    stepWith({
      key: 'facilities_restudy',
      title: 'Facilities restudy',
      stage,
      party: 'operator',
      kind: 'recurring',
      start: { mode: 'all', of: [{ step: 'facilities_restudy_notice' }] },
      clocks: [rules.calendarDays(60)],
      outcomes: [{ key: 'given', title: 'Report given' }],
      source,
    }),
  ]
}
